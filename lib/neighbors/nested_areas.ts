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

/**
 * Finds pairs of polygons of which one has a part inside the other. Only parts with a loose segment are
 * looked at, by one point each, since a part whose whole boundary is shared fills its place. Areas that
 * go around the globe have no inside on a flat map and hold nobody.
 *
 * Cost: for each such part, a search along a ray to the nearer side of the layer.
 *
 * @returns Both areas of each pair, the inner one first; a pair that also touches may come out or not.
 */
export function nestedAreas(
  geometry: FlatGeometry,
  boundaries: Boundaries,
  { loose, index, period }: NestedSearch,
): { inner: number; outer: number }[] {
  const { xy, areaOf } = boundaries;
  const { tree, starts, stops } = index;
  if (!tree) return [];
  const middle = (tree.minX + tree.maxX) / 2;
  const nested: { inner: number; outer: number }[] = [];
  const holds = holdersOf(boundaries, period);
  for (const v of probesOf(geometry, boundaries, loose)) {
    const x = (xy[2 * v] + xy[2 * v + 2]) / 2, y = (xy[2 * v + 1] + xy[2 * v + 3]) / 2;
    const eastward = x > middle;
    const crossings = new Map<number, number>();
    tree.search(eastward ? x : -Infinity, y, eastward ? Infinity : x, y, (chunk) => {
      for (let t = starts[chunk]; t < stops[chunk]; t++) {
        if (!holds[areaOf[t]] || xy[2 * t + 1] > y === xy[2 * t + 3] > y) continue;
        const share = (y - xy[2 * t + 1]) / (xy[2 * t + 3] - xy[2 * t + 1]);
        const at = xy[2 * t] + share * (xy[2 * t + 2] - xy[2 * t]);
        if (eastward ? at > x : at < x) {
          crossings.set(areaOf[t], (crossings.get(areaOf[t]) ?? 0) + 1);
        }
      }
      return false;
    });
    for (const [outer, count] of crossings) {
      if (count % 2 === 1 && outer !== areaOf[v]) nested.push({ inner: areaOf[v], outer });
    }
  }
  return nested;
}

/** Polygons without a segment that spans more than half the globe. */
function holdersOf({ xy, areaOf, ends, solid }: Boundaries, period: number): Uint8Array {
  if (period === 0) return solid;
  const holds = solid.slice();
  for (let v = 0; v + 1 < ends.length; v++) {
    if (!ends[v] && 2 * Math.abs(xy[2 * v + 2] - xy[2 * v]) > period) holds[areaOf[v]] = 0;
  }
  return holds;
}

/** The first loose segment of each polygon part that has one. */
function probesOf(
  { partStarts, ringStarts, vertexStarts }: FlatGeometry,
  { areas, solid }: Boundaries,
  loose: Uint8Array,
): number[] {
  const probes: number[] = [];
  for (let area = 0; area < areas; area++) {
    if (!solid[area]) continue;
    for (let part = partStarts[area]; part < partStarts[area + 1]; part++) {
      const stop = vertexStarts[ringStarts[part + 1]];
      const probe = loose.subarray(0, stop).indexOf(1, vertexStarts[ringStarts[part]]);
      if (probe >= 0) probes.push(probe);
    }
  }
  return probes;
}
