/**
 * The conditional permutation test of every area's local Moran's I.
 *
 * @module
 */
import { checkLengths } from "../statistics/check_lengths.ts";
import { standardize, TIE } from "../statistics/standardize.ts";
import type { Weights } from "../weights/weights.ts";
import { permuteNeighborSums, type SumOptions } from "./neighbor_sums.ts";
import { checkPermutations, checkWorkers, type PermuteOptions } from "./options.ts";
import type { SumCounts } from "./sum_counts.ts";

/**
 * Counts of each area, length n, in terms of local I: `atLeast` is how many permutations gave an I at least
 * as large, `atMost` as small, ties in both. `permutations` is 0 where the area is alone.
 */
export type LocalReference = SumCounts;

/** Options of {@link permuteLocalMoran}. */
export interface PermuteLocalOptions extends PermuteOptions {
  /**
   * Permutations of each area, 99 to 9,999,999.
   * @default 999_999
   */
  readonly permutations?: number;
  /**
   * Areas to test, ascending positions.
   * @default all areas
   */
  readonly areas?: Uint32Array;
}

/** Permutations of a local test unless told otherwise; false-discovery control needs fine p-values. */
export const DEFAULT_LOCAL_PERMUTATIONS = 999_999;

/**
 * Holds each area's own value, permutes the other n - 1 over the map, and counts how often its local Moran's I
 * is at least (at most) what was observed.
 *
 * Where the weights of a row are equal, all areas share sorted draws, and where fewer subsets of neighbors
 * exist than permutations are asked for, all are counted instead (`enumerated`). Where they are unequal,
 * areas go beyond 10,240 draws only until both tails have 25 hits (`stopped`). An area whose own value is
 * the mean has I = 0 in every permutation, so all its permutations tie. Cost: about 0.2 s for 100,000
 * areas and 999,999 permutations with equal weights.
 *
 * @throws UnfitDataError for fewer than 3 areas and for values all equal or not finite.
 * @throws UsageError for a number of permutations that is not whole, below 99 or above 9,999,999.
 * @throws RangeError when lengths differ, a weight is not finite, or an area has more neighbors than there are other
 * areas. Rejects with the signal's reason when aborted.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * const { atLeast, permutations } = await permuteLocalMoran(Float64Array.of(9, 7, 2, 1), chain);
 * assert.equal(permutations[0], 3); // its one neighbor could be any of 3 areas
 * assert.equal(atLeast[0], 1); // and none of the others is as high as the 7 it has
 * ```
 */
export async function permuteLocalMoran(
  values: Float64Array,
  weights: Weights,
  options: PermuteLocalOptions = {},
): Promise<LocalReference> {
  const { z, settled } = settleLocal(values, weights, options);
  return turnBySign(await permuteNeighborSums(z, weights, settled), z);
}

/**
 * The door of every local permutation test: checks what was given, and gives standard scores and settled options.
 *
 * @throws as {@link permuteLocalMoran} does.
 */
export function settleLocal(
  values: Float64Array,
  weights: Weights,
  options: PermuteLocalOptions,
): { z: Float64Array; settled: SumOptions } {
  checkLengths(values, weights);
  const permutations = checkPermutations(options.permutations ?? DEFAULT_LOCAL_PERMUTATIONS);
  if (options.workers !== undefined) checkWorkers(options.workers);
  return { z: standardize(values).z, settled: { ...options, permutations } };
}

/**
 * From counts of the neighbors' sums to counts of that sum times the own score `z`: below the mean the tails
 * change places, at the mean every permutation ties.
 */
export function turnBySign(sums: SumCounts, z: Float64Array): LocalReference {
  const pick = (above: Uint32Array, below: Uint32Array) =>
    above.map((count, i) =>
      Math.abs(z[i]) <= TIE ? sums.permutations[i] : z[i] > 0 ? count : below[i]
    );
  return {
    ...sums,
    atLeast: pick(sums.atLeast, sums.atMost),
    atMost: pick(sums.atMost, sums.atLeast),
  };
}
