/**
 * The rule `within:DIST`: areas whose points lie no farther apart than a distance.
 *
 * @module
 */
import { MOST_LINKS, refuseTooMany, sortRow, withRoom } from "./link_room.ts";
import { type PointIndex, rangeSearch } from "./point_index.ts";
import type { Topology } from "./topology.ts";

/**
 * Links points no farther apart than `distance`, the border included: distances are compared in whole
 * grains. Points at the same place are linked.
 *
 * Cost: n log n, and the links.
 *
 * @param areas Number of areas, located or not; one without a point is linked with nobody.
 * @param distance In the units of the points.
 * @throws {UnfitDataError} beyond 200 million links.
 */
export function linkWithin(index: PointIndex, areas: number, distance: number): Topology {
  const { count, ids } = index;
  const { counts, near } = searchAll(index, distance);
  const offsets = new Uint32Array(areas + 1);
  for (let at = 0; at < count; at++) offsets[ids[at] + 1] = counts[at];
  for (let i = 0; i < areas; i++) offsets[i + 1] += offsets[i];
  const indices = new Uint32Array(offsets[areas]);
  let read = 0;
  for (let at = 0; at < count; at++) {
    const start = offsets[ids[at]], end = offsets[ids[at] + 1];
    for (let link = start; link < end; link++) indices[link] = ids[near[read++]];
    sortRow(indices, start, end);
  }
  return { offsets, indices };
}

/** Points asked to estimate how many links there will be. */
const SAMPLE = 500;

/** Rows by tree order, holding tree positions. */
function searchAll(
  index: PointIndex,
  distance: number,
): { counts: Uint32Array; near: Uint32Array } {
  const { count, xy, perUnit } = index;
  const reach = (Math.round(distance * perUnit) + 0.5) / perUnit;
  const { found, around } = rangeSearch(index);
  const search = (at: number) => around(xy[2 * at], xy[2 * at + 1], reach) - 1;
  const estimate = estimateLinks(count, search);
  // A wrong guess costs only time below the limit; beyond twice the limit it spares the search.
  if (estimate > 2 * MOST_LINKS) refuseTooMany(estimate, BAND, REMEDY);
  const counts = new Uint32Array(count);
  let near: Uint32Array = new Uint32Array(Math.min(MOST_LINKS, estimate + 16)), links = 0;
  for (let at = 0; at < count; at++) {
    counts[at] = search(at);
    let write = links;
    links += counts[at];
    if (links > MOST_LINKS) continue;
    near = withRoom(near, links);
    for (let f = 0; f <= counts[at]; f++) if (found[f] !== at) near[write++] = found[f];
  }
  refuseTooMany(links, BAND, REMEDY);
  return { counts, near };
}

const BAND = "this distance", REMEDY = "choose a shorter one, or nearest:K";

/** Links of evenly chosen points, scaled up. */
function estimateLinks(count: number, search: (at: number) => number): number {
  const step = Math.max(1, Math.floor(count / SAMPLE));
  let links = 0, asked = 0;
  for (let at = 0; at < count; at += step, asked++) links += search(at);
  return asked > 0 ? Math.round(links / asked * count) : 0;
}
