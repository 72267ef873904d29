/**
 * Areas that lie inside another one that has no hole for them.
 *
 * @module
 */
import type { FlatGeometry } from "../layer/geometry.ts";
import type { Boundaries } from "./boundaries.ts";
import type { SegmentIndex } from "./segment_index.ts";

/** What is known of the segments. */
export interface NestedSearch {
  /** 1 at the first vertex of each segment that no other area has. */
  readonly loose: Uint8Array;
  /** All segments. */
  readonly index: SegmentIndex;
  /** Coordinate units around the globe, where boundaries may go around it; else 0. */
  readonly period: number;
}

/** Two polygons that overlap. */
export interface NestedPair {
  /** The area of which a point was found in the other. */
  readonly inner: number;
  readonly outer: number;
}

/**
 * Finds pairs of polygons of which one has a part inside the other, by one inner point of each part that
 * has a loose segment: a part whose whole boundary is shared fills its place. Areas that go around the globe have
 * no inside on a flat map and are left out.
 *
 * Cost: for each such part, a search along a ray to the nearer side of the layer.
 */
export function nestedAreas(
  geometry: FlatGeometry,
  boundaries: Boundaries,
  { loose, index, period }: NestedSearch,
): NestedPair[] {
  const flat = flatPolygons(boundaries, period);
  const nested: NestedPair[] = [];
  for (const { area, from, to } of loosePolygonParts(geometry, flat, loose)) {
    const point = innerPoint(boundaries, from, to);
    if (!point) continue;
    for (const [outer, crossings] of crossingsBeside(boundaries, index, point)) {
      const holds = flat[outer] === 1 && outer !== area && crossings % 2 === 1;
      if (holds) nested.push({ inner: area, outer });
    }
  }
  return nested;
}

/** Mask of the polygons without a segment that spans more than half the globe. */
function flatPolygons({ xy, areaOf, ends, solid }: Boundaries, period: number): Uint8Array {
  if (period === 0) return solid;
  const flat = solid.slice();
  for (let v = 0; v + 1 < ends.length; v++) {
    if (!ends[v] && 2 * Math.abs(xy[2 * v + 2] - xy[2 * v]) > period) flat[areaOf[v]] = 0;
  }
  return flat;
}

/** Parts of the areas of a mask that have a loose segment, as runs of vertices. */
function* loosePolygonParts(
  { partStarts, ringStarts, vertexStarts }: FlatGeometry,
  areas: Uint8Array,
  loose: Uint8Array,
): Generator<{ area: number; from: number; to: number }> {
  for (let area = 0; area < areas.length; area++) {
    if (!areas[area]) continue;
    for (let part = partStarts[area]; part < partStarts[area + 1]; part++) {
      const from = vertexStarts[ringStarts[part]], to = vertexStarts[ringStarts[part + 1]];
      if (loose.subarray(from, to).includes(1)) yield { area, from, to };
    }
  }
}

/** A place on the map. */
interface Point {
  readonly x: number;
  readonly y: number;
}

/**
 * A point inside the rings of vertices `from` … `to` - 1: on a level half-way up that no vertex lies on, in
 * the middle of the widest stretch inside. Null for rings without height.
 */
function innerPoint({ xy, ends }: Boundaries, from: number, to: number): Point | null {
  let low = Infinity, high = -Infinity;
  for (let v = from; v < to; v++) {
    low = Math.min(low, xy[2 * v + 1]);
    high = Math.max(high, xy[2 * v + 1]);
  }
  const half = (low + high) / 2;
  for (let v = from; v < to; v++) {
    const y = xy[2 * v + 1];
    if (y <= half && y > low) low = y;
    if (y > half && y < high) high = y;
  }
  const y = (low + high) / 2;
  const crossings: number[] = [];
  for (let v = from; v < to; v++) {
    if (!ends[v] && straddles(xy, v, y)) crossings.push(crossingAt(xy, v, y));
  }
  crossings.sort((a, b) => a - b);
  let widest = 0, x = NaN;
  for (let at = 0; at + 1 < crossings.length; at += 2) {
    const width = crossings[at + 1] - crossings[at];
    if (width <= widest) continue;
    widest = width;
    x = crossings[at] + width / 2;
  }
  return widest > 0 ? { x, y } : null;
}

/** How often the boundary of each area crosses the level of a point, on the way to the nearer side of the map. */
function crossingsBeside(
  { xy, areaOf }: Boundaries,
  { tree, starts, stops }: SegmentIndex,
  { x, y }: Point,
): Map<number, number> {
  const counts = new Map<number, number>();
  if (!tree) return counts;
  const eastward = x > (tree.minX + tree.maxX) / 2;
  tree.search(eastward ? x : -Infinity, y, eastward ? Infinity : x, y, (chunk) => {
    for (let v = starts[chunk]; v < stops[chunk]; v++) {
      if (!straddles(xy, v, y) || crossingAt(xy, v, y) > x !== eastward) continue;
      counts.set(areaOf[v], (counts.get(areaOf[v]) ?? 0) + 1);
    }
    return false;
  });
  return counts;
}

function straddles(xy: Float64Array, v: number, y: number): boolean {
  return xy[2 * v + 1] > y !== xy[2 * v + 3] > y;
}

function crossingAt(xy: Float64Array, v: number, y: number): number {
  const share = (y - xy[2 * v + 1]) / (xy[2 * v + 3] - xy[2 * v + 1]);
  return xy[2 * v] + share * (xy[2 * v + 2] - xy[2 * v]);
}
