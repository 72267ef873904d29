/**
 * Whether the boundary of an area crosses itself.
 *
 * @module
 */
import { type FlatGeometry, GEOMETRY_KINDS, ringsOf } from "../layer/geometry.ts";

/** Segments as x0, y0, x1, y1 with x0 <= x1, four numbers each, in order of x0. */
type Segments = Float64Array;

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
 * Cost: a sort of the segments and a sweep along x over those whose ranges of x overlap.
 */
export function crossesItself(rings: readonly Float64Array[]): boolean {
  const segments = sortedSegments(rings);
  let active: number[] = [];
  for (let s = 0; s < segments.length; s += 4) {
    active = active.filter((other) => segments[other + 2] >= segments[s]);
    if (active.some((other) => crosses(segments, s, other))) return true;
    active.push(s);
  }
  return false;
}

function sortedSegments(rings: readonly Float64Array[]): Segments {
  const loose: number[][] = [];
  for (const ring of rings) {
    for (let v = 0; v + 3 < ring.length; v += 2) {
      const [x0, y0, x1, y1] = [ring[v], ring[v + 1], ring[v + 2], ring[v + 3]];
      loose.push(x0 <= x1 ? [x0, y0, x1, y1] : [x1, y1, x0, y0]);
    }
  }
  return Float64Array.from(loose.sort((a, b) => a[0] - b[0]).flat());
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
