/**
 * The conditional permutation test of every area's bivariate local Moran's I.
 *
 * @module
 */
import { checkLengths } from "../statistics/check_lengths.ts";
import { standardize } from "../statistics/standardize.ts";
import type { Weights } from "../weights/weights.ts";
import { permuteNeighborSums } from "./neighbor_sums.ts";
import {
  type LocalReference,
  type PermuteLocalOptions,
  settleLocal,
  turnBySign,
} from "./permute_local.ts";

/**
 * Holds each area's x, permutes y over the other n - 1 areas, and counts how often its bivariate local Moran's I
 * (x_i times the neighbors' weighted sum of y) is at least and at most as large as observed, ties in both.
 *
 * The area's own y stays where it is. An area whose x is the mean has I = 0 in every permutation, so all its
 * permutations tie. Options, errors and cost are those of `permuteLocalMoran`, for both fields.
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
 * const x = Float64Array.of(9, 7, 2, 1), y = Float64Array.of(0, 5, 6, 4);
 * const { atLeast } = await permuteLocalBivariateMoran(x, y, chain);
 * assert.equal(atLeast[0], 2); // beside the high x could stand a y of 5, as it does, or of 6
 * ```
 */
export async function permuteLocalBivariateMoran(
  x: Float64Array,
  y: Float64Array,
  weights: Weights,
  options: PermuteLocalOptions = {},
): Promise<LocalReference> {
  checkLengths(x, weights);
  const held = standardize(x).z;
  const { z, settled } = settleLocal(y, weights, options);
  return turnBySign(await permuteNeighborSums(z, weights, settled), held);
}
