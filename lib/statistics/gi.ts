/**
 * The local statistics Gi and Gi* of Getis and Ord, standardized.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { conditionalLag, weightSpread } from "./conditional_lag.ts";
import { standardize } from "./standardize.ts";

/** Options of {@link giStar}. */
export interface GiStarOptions {
  /**
   * Weight of each area in its own neighborhood, on the scale of the weights given: the weight at
   * distance 0, which is 1 for equal weights and for every kernel. @default 1
   */
  readonly selfWeight?: number;
}

/**
 * Standardized Gi of every area (Ord & Getis 1995, Geographical Analysis 27:286-306): how far the
 * neighbors' weighted sum lies above or below that of randomly chosen areas. Positive: surrounded by
 * high values; negative: by low ones. The area itself does not count.
 *
 * (Σ_j w_ij x_j - W x̄(i)) / (s(i) sqrt(((n - 1) Σw² - W²) / (n - 2))), mean and standard deviation
 * (divisor n - 1) over the other n - 1 areas: the number of conditional standard deviations from the
 * conditional mean. Scaling a row changes nothing, nor does a + b·x for b above 0. NaN for an area that
 * is alone or whose neighbors are all other areas with equal weights, as then nothing can vary. Cost:
 * one pass over the links.
 *
 * @returns Length n, in standard deviations.
 * @throws UnfitDataError for fewer than 3 areas and for values all equal or not finite.
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const pairAndOne = {
 *   offsets: Uint32Array.of(0, 1, 2, 2),
 *   indices: Uint32Array.of(1, 0),
 *   values: Float64Array.of(1, 1),
 *   equalInRows: true,
 * };
 * // Beside area 0 stand 4 and 1, mean 2.5 and standard deviation 1.5; its neighbor has the 4.
 * const z = gi(Float64Array.of(4, 4, 1), pairAndOne);
 * assert.ok(Math.abs(z[0] - 1) < 1e-14);
 * assert.ok(Number.isNaN(z[2]));
 * ```
 */
export function gi(values: Float64Array, weights: Weights): Float64Array {
  checkLengths(values, weights);
  const { lag, expected, variance } = conditionalLag(standardize(values).z, weights);
  return lag.map((sum, i) => variance[i] > 0 ? (sum - expected[i]) / Math.sqrt(variance[i]) : NaN);
}

/**
 * Standardized Gi* of every area (Ord & Getis 1995): like {@link gi}, but the area itself counts in its
 * neighborhood, so that an area that is high among high ones stands out. Mean and standard deviation
 * are those of all n areas. Positive: a neighborhood of high values; negative: of low ones.
 *
 * (Σ_j w_ij x_j - W x̄) / (s sqrt((n Σw² - W²) / (n - 1))), sums with the self-weight. Give the weights
 * as they are before rows are scaled, since the self-weight is on that scale; scaling rows afterwards
 * would not change Gi*. Conditional on the own value its p is that of {@link gi}. NaN for an area that
 * is alone, and where the neighborhood is the whole map with equal weights. Cost: one pass over the
 * links.
 *
 * @returns Length n, in standard deviations.
 * @throws UnfitDataError for fewer than 3 areas and for values all equal or not finite.
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * // z is 1 1 -1 -1; area 0 and its neighbor sum to 2, with variance (4·2 - 2²) / 3.
 * const star = giStar(Float64Array.of(3, 3, 1, 1), chain);
 * assert.ok(Math.abs(star[0] - 2 / Math.sqrt(4 / 3)) < 1e-14);
 * ```
 */
export function giStar(
  values: Float64Array,
  weights: Weights,
  options: GiStarOptions = {},
): Float64Array {
  checkLengths(values, weights);
  const { z } = standardize(values);
  const n = z.length, self = options.selfWeight ?? 1;
  return z.map((own, area) => {
    const start = weights.offsets[area], end = weights.offsets[area + 1];
    if (start === end) return NaN;
    let sum = self * own, total = self, squares = self * self;
    for (let e = start; e < end; e++) {
      const weight = weights.values[e];
      sum += weight * z[weights.indices[e]];
      total += weight;
      squares += weight * weight;
    }
    const variance = weightSpread(total, squares, n) * n / (n - 1);
    return variance > 0 ? sum / Math.sqrt(variance) : NaN;
  });
}
