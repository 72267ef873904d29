/**
 * The sphere-of-influence graph (Toussaint 1988).
 *
 * @module
 */
import { distanceBetween } from "./distance_between.ts";
import { withRoom } from "./link_room.ts";
import { nearestTable } from "./nearest_table.ts";
import { indexPoints, type PointIndex, rangeSearch } from "./point_index.ts";
import type { RoundedPoints } from "./rounded_points.ts";

/**
 * Links places whose circles overlap, each circle reaching to the nearest other place: d(p,q) <
 * r(p) + r(q), compared in whole grains. Circles that only touch do not overlap.
 *
 * Cost: one search around each place, over twice its circle: a pair is found from its larger circle.
 *
 * @returns Both ends of each link, each pair once.
 */
export function sphereEdges(places: RoundedPoints): { one: Uint32Array; other: Uint32Array } {
  const { xy, perUnit } = places;
  const index = indexPoints(places);
  const radii = circleGrains(places, index);
  const { found, around } = rangeSearch(index);
  let one: Uint32Array = new Uint32Array(4 * index.count + 16), other: Uint32Array = one.slice();
  let pairs = 0;
  for (let p = 0; p < radii.length; p++) {
    const size = around(xy[2 * p], xy[2 * p + 1], 2 * radii[p] / perUnit);
    for (let f = 0; f < size; f++) {
      const q = index.ids[found[f]];
      const smaller = radii[q] < radii[p] || (radii[q] === radii[p] && q < p);
      if (!smaller || Math.round(distanceBetween(xy, p, q) * perUnit) >= radii[p] + radii[q]) {
        continue;
      }
      one = withRoom(one, pairs + 1);
      other = withRoom(other, pairs + 1);
      one[pairs] = p;
      other[pairs++] = q;
    }
  }
  return { one: one.slice(0, pairs), other: other.slice(0, pairs) };
}

/** Distance from each place to its nearest other, in whole grains; 0 for a place that has no other. */
function circleGrains({ xy, perUnit }: RoundedPoints, index: PointIndex): Float64Array {
  const radii = new Float64Array(index.count);
  if (index.count < 2) return radii;
  const { near } = nearestTable(index, 1);
  for (let at = 0; at < index.count; at++) {
    radii[index.ids[at]] = Math.round(
      distanceBetween(xy, index.ids[at], index.ids[near[at]]) * perUnit,
    );
  }
  return radii;
}
