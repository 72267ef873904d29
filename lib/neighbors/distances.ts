/**
 * How far neighbors are apart, and which distances would leave nobody out.
 *
 * @module
 */
import { joinSets, singleSets } from "./disjoint_sets.ts";
import { distanceBetween } from "./distance_between.ts";
import { type NearestTable, nearestTables } from "./nearest_table.ts";
import { distinctPlaces } from "./places.ts";
import { indexPoints, type PointIndex } from "./point_index.ts";
import { type RoundedPoints, roundPoints } from "./rounded_points.ts";
import type { Topology } from "./topology.ts";
import { triangulate } from "./triangulate.ts";

/**
 * Length of every link, parallel to `indices`.
 *
 * @param distance Between two areas by position; NaN where one has no place.
 */
export function linkDistances(
  { offsets, indices }: Topology,
  distance: (i: number, j: number) => number,
): Float64Array {
  const lengths = new Float64Array(indices.length);
  for (let i = 0; i + 1 < offsets.length; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      lengths[link] = distance(i, indices[link]);
    }
  }
  return lengths;
}

/**
 * Distance from each point to its k-th nearest other, in the units of the points; NaN for a point
 * without a place, and for all when there are not more than k points. Cost: see `nearestTable`.
 */
export function kNearestDistances(points: Float64Array, k: number): Float64Array {
  const index = indexPoints(roundPoints(points));
  return distancesToNearest(index, points.length / 2, { k, tables: nearestTables(index) });
}

/**
 * The same from an index and its tables.
 *
 * @param areas Number of points, located or not.
 */
export function distancesToNearest(
  index: PointIndex,
  areas: number,
  { k, tables }: { readonly k: number; readonly tables: (width: number) => NearestTable },
): Float64Array {
  const distances = new Float64Array(areas).fill(NaN);
  if (k >= index.count) return distances;
  const { near, width } = tables(k);
  for (let at = 0; at < index.count; at++) {
    distances[index.ids[at]] = distanceBetween(index.xy, at, near[at * width + k - 1]);
  }
  return distances;
}

/** The shortest distances that do what a band should do. */
export interface ConnectingDistances {
  /** Shortest distance at which no area is alone: the largest of all distances to a nearest area. */
  readonly noneAlone: number;
  /** Shortest distance at which all areas hang together: the longest edge of the minimum spanning tree. */
  readonly oneComponent: number;
}

/**
 * Both distances, exact to the grain of the points; NaN with fewer than two located points.
 *
 * Cost: a triangulation (the minimum spanning tree is part of it) and a sort of its edges.
 */
export function connectingDistances(points: Float64Array): ConnectingDistances {
  const rounded = roundPoints(points);
  let noneAlone = NaN;
  for (const nearest of kNearestDistances(points, 1)) {
    if (!(nearest <= noneAlone) && !Number.isNaN(nearest)) noneAlone = nearest;
  }
  return { noneAlone, oneComponent: Number.isNaN(noneAlone) ? NaN : longestOfTree(rounded) };
}

/**
 * Longest edge of the minimum spanning tree (Kruskal 1956): the shortest length at which the edges up to it
 * connect everybody, found by halving. 0 where all points are at one place.
 */
function longestOfTree(points: RoundedPoints): number {
  const { xy } = distinctPlaces(points);
  const { one, other } = triangulate({ xy, perUnit: points.perUnit });
  const lengths = Float64Array.from(one, (p, e) => distanceBetween(xy, p, other[e]));
  const sorted = lengths.toSorted();
  let low = 0, high = sorted.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (connects(xy.length / 2, { one, other, lengths }, sorted[middle])) high = middle;
    else low = middle + 1;
  }
  return sorted.length > 0 ? sorted[low] : 0;
}

interface MeasuredEdges {
  readonly one: Uint32Array;
  readonly other: Uint32Array;
  readonly lengths: Float64Array;
}

/** Whether the edges up to a length connect all places. */
function connects(places: number, { one, other, lengths }: MeasuredEdges, limit: number): boolean {
  const parents = singleSets(places);
  let pieces = places;
  for (let e = 0; e < one.length && pieces > 1; e++) {
    if (lengths[e] <= limit && joinSets(parents, one[e], other[e])) pieces--;
  }
  return pieces <= 1;
}
