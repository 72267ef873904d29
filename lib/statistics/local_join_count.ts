/**
 * Local join counts: how many neighbors of an area share its class, with their exact chance.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import type { Topology } from "../neighbors/topology.ts";
import { hypergeometricUpperTail } from "./hypergeometric.ts";

/** One entry for each area; NaN for areas that are not of the class and for those that are alone. */
export interface LocalJoinCount {
  /** Neighbors that are of the class. */
  readonly count: Float64Array;
  /** Exact one-sided p: chance of at least as many when the other areas' classes are permuted. */
  readonly p: Float64Array;
}

/**
 * Local join count of every area of one class: its neighbors of the same class. High: the class is
 * clustered here. It is asked only of areas that are of the class, and without weights.
 *
 * Null: the area keeps its class, the classes of the other n - 1 areas are dealt in any order. The count
 * is then hypergeometric (the local form of the nonfree sampling of Cliff & Ord 1981), so p is exact and
 * no permutation is needed. `isOfClass` holds 1 for areas of the class and 0 for all others. Cost: one
 * pass over the links, and at most one step for each neighbor for p.
 *
 * @throws UnfitDataError for fewer than 3 areas, and for a class that no area or every area has.
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = { offsets: Uint32Array.of(0, 1, 3, 5, 6), indices: Uint32Array.of(1, 0, 2, 1, 3, 2) };
 * const { count, p } = localJoinCount(Uint8Array.of(1, 1, 0, 0), chain);
 * assert.deepEqual([...count], [1, 1, NaN, NaN]);
 * // The one other area of the class is the only neighbor of area 0 in 1 of 3 orders.
 * assert.ok(Math.abs(p[0] - 1 / 3) < 1e-15);
 * ```
 */
export function localJoinCount(isOfClass: Uint8Array, topology: Topology): LocalJoinCount {
  const { offsets, indices } = topology;
  const n = offsets.length - 1;
  const members = countMembers(isOfClass, n);
  const count = new Float64Array(n).fill(NaN), p = new Float64Array(n).fill(NaN);
  for (let area = 0; area < n; area++) {
    const neighbors = offsets[area + 1] - offsets[area];
    if (!isOfClass[area] || neighbors === 0) continue;
    let alike = 0;
    for (let link = offsets[area]; link < offsets[area + 1]; link++) {
      if (isOfClass[indices[link]]) alike++;
    }
    count[area] = alike;
    p[area] = hypergeometricUpperTail(alike, {
      population: n - 1,
      marked: members - 1,
      drawn: neighbors,
    });
  }
  return { count, p };
}

function countMembers(isOfClass: Uint8Array, n: number): number {
  if (isOfClass.length !== n) {
    throw new RangeError(`Cannot match ${isOfClass.length} areas to links of ${n} areas`);
  }
  if (n < 3) {
    throw new UnfitDataError(
      `Cannot measure clustering of ${n} usable areas as it takes at least 3`,
    );
  }
  const members = isOfClass.reduce((sum, member) => sum + (member ? 1 : 0), 0);
  if (members > 0 && members < n) return members;
  throw new UnfitDataError(
    `Cannot count joins of a class that ${members} of ${n} areas have; choose a class that some have and some have not`,
  );
}
