/**
 * The rule `nearest:K`: the K nearest areas by representative point.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { refuseTooMany, sortRow } from "./link_room.ts";
import { type NearestTable, nearestTables } from "./nearest_table.ts";
import { grainsBetween, type PointIndex } from "./point_index.ts";
import type { Topology } from "./topology.ts";

/** Who the nearest areas are, and how often distance alone could not say. */
export interface NearestLinks {
  readonly topology: Topology;
  /** Areas whose last neighbor is no nearer than the one left out: the smaller position won. */
  readonly tied: number;
}

/**
 * A function that links each located point with its `count` nearest. Ties at the last place go to the
 * smaller position.
 *
 * Cost: see {@link nearestTable}.
 *
 * @param areas Number of areas, located or not; one without a point is linked with nobody.
 * @param tables Where the nearest are looked up, to share what was found.
 */
export function nearestFinder(
  index: PointIndex,
  areas: number,
  tables: (width: number) => NearestTable = nearestTables(index),
): (count: number) => NearestLinks {
  return (count) => {
    refuseAbsent(count, index.count);
    const table = tables(Math.min(count + 1, index.count - 1));
    return firstColumns(index, table, areas, count);
  };
}

/** Refuses to link more nearest than there are others. @throws {UnfitDataError} */
export function refuseAbsent(count: number, located: number): void {
  if (count < located) return;
  throw new UnfitDataError(
    `Cannot link ${count} nearest neighbor${count === 1 ? "" : "s"} as the layer has only ` +
      `${located} usable area${located === 1 ? "" : "s"}`,
  );
}

function firstColumns(
  index: PointIndex,
  { width, near }: NearestTable,
  areas: number,
  count: number,
): NearestLinks {
  refuseTooMany(index.count * count, `nearest:${count}`, "choose fewer neighbors");
  const offsets = new Uint32Array(areas + 1);
  for (const id of index.ids) offsets[id + 1] = count;
  for (let i = 0; i < areas; i++) offsets[i + 1] += offsets[i];
  const indices = new Uint32Array(index.count * count);
  let tied = 0;
  for (let at = 0; at < index.count; at++) {
    const start = offsets[index.ids[at]];
    for (let slot = 0; slot < count; slot++) {
      indices[start + slot] = index.ids[near[at * width + slot]];
    }
    sortRow(indices, start, start + count);
    if (count === width) continue;
    const last = at * width + count;
    if (grainsBetween(index, at, near[last - 1]) === grainsBetween(index, at, near[last])) tied++;
  }
  return { topology: { offsets, indices }, tied };
}
