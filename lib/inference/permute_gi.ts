/**
 * The conditional permutation test of every area's Gi.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { permuteNeighborSums } from "./neighbor_sums.ts";
import { type PermuteLocalOptions, settleLocal } from "./permute_local.ts";
import type { SumCounts } from "./sum_counts.ts";

/**
 * Holds each area's own value, permutes the other n - 1 over the map, and counts how often its Gi (Ord & Getis 1995) is
 * at least (among high values) and at most (among low ones) as large as observed, ties in both.
 *
 * With the own value held, Gi rises with the neighbors' weighted sum alone, and Gi* adds the same to all
 * permutations: the counts are those of both. Options, errors and cost are those of `permuteLocalMoran`.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * const { atLeast, permutations } = await permuteGi(Float64Array.of(1, 7, 2, 9), chain);
 * assert.equal(permutations[0], 3); // its one neighbor could be any of 3 areas
 * assert.equal(atLeast[0], 2); // the 7 that it has, or the 9
 * ```
 */
export async function permuteGi(
  values: Float64Array,
  weights: Weights,
  options: PermuteLocalOptions = {},
): Promise<SumCounts> {
  const { z, settled } = settleLocal(values, weights, options);
  return await permuteNeighborSums(z, weights, settled);
}
