/**
 * Whether the boundary of an area crosses itself.
 *
 * @module
 */
import { type FlatGeometry, GEOMETRY_KINDS, ringsOf } from "../layer/geometry.ts";

/** Segments as x0, y0, x1, y1 with x0 <= x1, four numbers each. */
type Segments = Float64Array;

/** Up to this many segments comparing every pair is faster than sorting. */
const FEW_SEGMENTS = 32;

/**
 * The polygons whose boundary crosses itself, ascending. Their neighbors are found as those of any other area;
 * it is area and centroid that cannot be trusted. Cost: see {@link crossesItself}.
 */
export function findSelfCrossings(geometry: FlatGeometry): number[] {
  const polygon = GEOMETRY_KINDS.indexOf("polygon");
  const crossing: number[] = [];
  geometry.kinds.forEach((kind, row) => {
    if (kind === polygon && crossesItself(ringsOf(geometry, row))) crossing.push(row);
  });
  return crossing;
}

/**
 * Whether any two segments of these rings cross at a point inside both.
 *
 * Rings are given as x0, y0, x1, y1, … Segments that share an end, touch, or overlap along a stretch do not
 * count; nor does a crossing that rounding could have made (Shewchuk 1997, bound A of the orientation test).
 *
 * Cost: for few segments a look at every pair, else a sort and a sweep along x over those whose ranges of x overlap.
 */
export function crossesItself(rings: readonly Float64Array[]): boolean {
  const segments = segmentsOf(rings);
  return segments.length <= 4 * FEW_SEGMENTS
    ? somePairCrosses(segments)
    : sweepFindsCrossing(sorted(segments));
}

function segmentsOf(rings: readonly Float64Array[]): Segments {
  const count = rings.reduce((sum, ring) => sum + Math.max(0, ring.length / 2 - 1), 0);
  const segments = new Float64Array(4 * count);
  let at = 0;
  for (const ring of rings) {
    for (let v = 0; v + 3 < ring.length; v += 2, at += 4) {
      const first = ring[v] <= ring[v + 2] ? v : v + 2, last = 2 * v + 2 - first;
      segments[at] = ring[first];
      segments[at + 1] = ring[first + 1];
      segments[at + 2] = ring[last];
      segments[at + 3] = ring[last + 1];
    }
  }
  return segments;
}

function somePairCrosses(segments: Segments): boolean {
  for (let s = 4; s < segments.length; s += 4) {
    for (let t = 0; t < s; t += 4) {
      const apart = segments[s] > segments[t + 2] || segments[t] > segments[s + 2];
      if (!apart && crosses(segments, s, t)) return true;
    }
  }
  return false;
}

/** The segments in order of their western ends. */
function sorted(segments: Segments): Segments {
  const order = Array.from({ length: segments.length / 4 }, (_, s) => 4 * s)
    .sort((a, b) => segments[a] - segments[b]);
  const inOrder = new Float64Array(segments.length);
  order.forEach((from, at) => inOrder.set(segments.subarray(from, from + 4), 4 * at));
  return inOrder;
}

function sweepFindsCrossing(segments: Segments): boolean {
  let active: number[] = [];
  for (let s = 0; s < segments.length; s += 4) {
    active = active.filter((other) => segments[other + 2] >= segments[s]);
    if (active.some((other) => crosses(segments, s, other))) return true;
    active.push(s);
  }
  return false;
}

function crosses(segments: Segments, s: number, t: number): boolean {
  const [ax, ay, bx, by] = [segments[s], segments[s + 1], segments[s + 2], segments[s + 3]];
  const [cx, cy, dx, dy] = [segments[t], segments[t + 1], segments[t + 2], segments[t + 3]];
  if (Math.max(ay, by) < Math.min(cy, dy) || Math.max(cy, dy) < Math.min(ay, by)) return false;
  return side(ax, ay, bx, by, cx, cy) * side(ax, ay, bx, by, dx, dy) < 0 &&
    side(cx, cy, dx, dy, ax, ay) * side(cx, cy, dx, dy, bx, by) < 0;
}

/** Rounding error of the determinant, relative to the size of its two products. */
const ERROR_BOUND = (3 + 16 * 2 ** -53) * 2 ** -53;

/** 1 or -1 by the side of the line a → b on which p certainly lies, else 0. */
function side(ax: number, ay: number, bx: number, by: number, px: number, py: number): number {
  const left = (ax - px) * (by - py);
  const right = (ay - py) * (bx - px);
  const determinant = left - right;
  const certain = Math.abs(determinant) > ERROR_BOUND * (Math.abs(left) + Math.abs(right));
  return certain ? Math.sign(determinant) : 0;
}
