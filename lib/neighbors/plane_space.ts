/**
 * Points in a plane, with straight lines between them.
 *
 * @module
 */
import { distanceBetween } from "./distance_between.ts";
import { connectingDistances, distancesToNearest } from "./distances.ts";
import { nearestFinder } from "./nearest.ts";
import { nearestTables } from "./nearest_table.ts";
import { once } from "./once.ts";
import { countSharingPlaces } from "./places.ts";
import { pointGraphFinder } from "./point_graph.ts";
import { indexPoints } from "./point_index.ts";
import type { PointSpace } from "./point_space.ts";
import { locatedPoints, roundPoints } from "./rounded_points.ts";
import { linkWithin } from "./within.ts";

/**
 * The space of points in a plane. Coordinates are rounded once, before any distance is compared.
 *
 * @param points x and y of each, NaN where it has no place.
 */
export function planeSpace(points: Float64Array): PointSpace {
  const areas = points.length / 2;
  const rounded = once(() => roundPoints(points));
  const index = once(() => indexPoints(rounded()));
  const tables = once(() => nearestTables(index()));
  const nearest = once(() => nearestFinder(index(), areas, tables()));
  const graph = once(() => pointGraphFinder(rounded()));
  return {
    get located() {
      return locatedPoints(points).length;
    },
    planar: true,
    distance: (i, j) => distanceBetween(points, i, j),
    nearest: (count) => nearest()(count),
    within: (length) => linkWithin(index(), areas, length),
    graph: (kind) => graph()(kind),
    toNearest: (k) => distancesToNearest(index(), areas, { k, tables: tables() }),
    connecting: once(() => connectingDistances(points)),
    countSharing: () => countSharingPlaces(points),
  };
}
