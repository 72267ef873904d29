/**
 * The rule `within:DIST`: areas whose points lie no farther apart than a distance.
 *
 * @module
 */
import { closePairs } from "./close_pairs.ts";
import { MOST_LINKS, refuseTooMany, sortRow } from "./link_room.ts";
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
  const { count, ids, perUnit } = index;
  const reach = (Math.round(distance * perUnit) + 0.5) / perUnit;
  // When a guess is far beyond the limit, counting all links would take as long as they are many.
  const guess = guessLinks(index, reach);
  if (guess > 2 * MOST_LINKS) refuse(guess);
  const { starts, near } = linksInTree(index, reach);
  const offsets = new Uint32Array(areas + 1);
  for (let at = 0; at < count; at++) offsets[ids[at] + 1] = starts[at + 1] - starts[at];
  for (let i = 0; i < areas; i++) offsets[i + 1] += offsets[i];
  const indices = new Uint32Array(near.length);
  for (let at = 0; at < count; at++) {
    const start = offsets[ids[at]];
    let write = start;
    for (let link = starts[at]; link < starts[at + 1]; link++) indices[write++] = ids[near[link]];
    sortRow(indices, start, write);
  }
  return { offsets, indices };
}

/** Links by tree positions, which keeps neighbors together in memory until all are known. */
function linksInTree(index: PointIndex, reach: number): { starts: Uint32Array; near: Uint32Array } {
  const { pairs, counts, partners } = closePairs(index, reach);
  refuse(2 * pairs);
  const starts = new Uint32Array(index.count + 1);
  for (let at = 0, pair = 0; at < index.count; at++) {
    starts[at + 1] += counts[at];
    for (const end = pair + counts[at]; pair < end; pair++) starts[partners[pair] + 1]++;
  }
  for (let at = 0; at < index.count; at++) starts[at + 1] += starts[at];
  const next = starts.slice(0, index.count);
  const near = new Uint32Array(2 * pairs);
  for (let at = 0, pair = 0; at < index.count; at++) {
    for (const end = pair + counts[at]; pair < end; pair++) {
      near[next[at]++] = partners[pair];
      near[next[partners[pair]]++] = at;
    }
  }
  return { starts, near };
}

function refuse(links: number): void {
  refuseTooMany(links, "this distance", "choose a shorter one, or nearest:K");
}

/** Points asked for a guess. */
const SAMPLE = 500;

/** Links of some points, evenly chosen in tree order, scaled up to all. */
function guessLinks(index: PointIndex, reach: number): number {
  const { count, xy } = index;
  const { around } = rangeSearch(index);
  const step = Math.max(1, Math.floor(count / SAMPLE));
  let links = 0, asked = 0;
  for (let at = 0; at < count; at += step, asked++) {
    links += around(xy[2 * at], xy[2 * at + 1], reach) - 1;
  }
  return asked > 0 ? Math.round(links / asked * count) : 0;
}
