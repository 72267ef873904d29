/**
 * The conditional permutation test of every area's local Geary's c.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { permuteNeighborSums } from "./neighbor_sums.ts";
import { type PermuteLocalOptions, settleLocal } from "./permute_local.ts";
import type { SumCounts } from "./sum_counts.ts";

/**
 * Holds each area's own value, permutes the other n - 1 over the map, and counts how often its local Geary's c
 * (Anselin 1995, eq. 18: Σ_j w_ij (z_i - z_j)²) is at least (unlike its neighbors) and at most (like them) as large as
 * observed, ties in both.
 *
 * The sum depends on the own value, so areas share draws but no ranks: each is weighed, and goes beyond 10,240
 * draws only until both tails have 25 hits (`stopped`; Besag & Clifford 1991). `values` has one finite number for
 * each area; an area that is alone has 0 permutations. Cost: one squared difference for each draw and link; about a
 * second for 100,000 areas, eight links each and 9,999 permutations.
 *
 * @throws UnfitDataError for fewer than 3 areas and for values all equal or not finite.
 * @throws UsageError for a number of permutations that is not whole, below 99 or above 9,999,999.
 * @throws RangeError when lengths differ or a weight is not finite. Rejects with the signal's reason when aborted.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * const { atMost, permutations } = await permuteLocalGeary(Float64Array.of(9, 7, 2, 1), chain);
 * assert.equal(permutations[0], 3); // its one neighbor could be any of 3 areas
 * assert.equal(atMost[0], 1); // and no other is as close to its 9 as the 7 it has
 * ```
 */
export async function permuteLocalGeary(
  values: Float64Array,
  weights: Weights,
  options: PermuteLocalOptions = {},
): Promise<SumCounts> {
  const { z, settled } = settleLocal(values, weights, options);
  return await permuteNeighborSums(z, weights, { ...settled, term: "squaredDifference" });
}
