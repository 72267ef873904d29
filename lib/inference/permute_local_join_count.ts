/**
 * The conditional permutation test of local join counts.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import type { Topology } from "../neighbors/topology.ts";
import { permuteNeighborSums } from "./neighbor_sums.ts";
import { type PermuteLocalOptions, settleLocal } from "./permute_local.ts";
import type { SumCounts } from "./sum_counts.ts";

/**
 * Holds the class of each area of a class, permutes those of the other n - 1 over the map, and counts how often it has
 * at least and at most as many neighbors of its class as observed. Areas that are not of the class or are alone have 0
 * permutations.
 *
 * `isOfClass` holds 1 for areas of the class and 0 for all others. The exact p of the same question is that of
 * `localJoinCount`, whose counts are hypergeometric; this is the way for a count that goes with other permuted
 * statistics. One-sided: use `atLeast`. Options and cost are those of `permuteLocalMoran`.
 *
 * @throws UnfitDataError for fewer than 3 areas and for a class that no area or every area has.
 * @throws UsageError for a number of permutations that is not whole, below 99 or above 9,999,999.
 * @throws RangeError when lengths differ. Rejects with the signal's reason when aborted.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = { offsets: Uint32Array.of(0, 1, 3, 5, 6), indices: Uint32Array.of(1, 0, 2, 1, 3, 2) };
 * const { atLeast, permutations } = await permuteLocalJoinCount(Uint8Array.of(1, 1, 0, 0), chain);
 * // The one other area of the class is the only neighbor of area 0 in 1 of 3 orders.
 * assert.deepEqual([atLeast[0], permutations[0]], [1, 3]);
 * ```
 */
export async function permuteLocalJoinCount(
  isOfClass: Uint8Array,
  { offsets, indices }: Topology,
  options: PermuteLocalOptions = {},
): Promise<SumCounts> {
  const members = isOfClass.reduce((count, member) => count + (member ? 1 : 0), 0);
  if (members === 0 || members === isOfClass.length) {
    throw new UnfitDataError(
      `Cannot count joins of a class that ${members} of ${isOfClass.length} areas have; choose a class ` +
        "that some have and some have not",
    );
  }
  const weights = {
    offsets,
    indices,
    values: new Float64Array(indices.length).fill(1),
    equalInRows: true,
  };
  const { z, settled } = settleLocal(Float64Array.from(isOfClass, Number), weights, options);
  const areas = (options.areas ?? Uint32Array.from(isOfClass.keys()))
    .filter((area) => isOfClass[area]);
  return await permuteNeighborSums(z, weights, { ...settled, areas });
}
