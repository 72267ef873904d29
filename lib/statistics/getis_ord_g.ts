/**
 * The global G of Getis and Ord, with its moments over all orders of the values.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { compensatedSum } from "../weights/compensated_sum.ts";
import { spatialLag } from "../weights/lag.ts";
import { weightSums } from "../weights/sums.ts";
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { checkWeightSum, moranI } from "./moran.ts";
import { standardize } from "./standardize.ts";

/** G with what is needed to judge it. */
export interface GetisOrdG {
  /** G, 0 or more, and at most 1 with weights of 1. */
  readonly value: number;
  /** S0 / (n (n - 1)) over all orders of the values. */
  readonly expected: number;
  /** Variance over all orders of the values; NaN for n = 3. */
  readonly variance: number;
  /** (value - expected) / sqrt(variance); NaN where the variance is 0 or undefined. */
  readonly z: number;
}

/**
 * Getis and Ord's G (Getis & Ord 1992, Geographical Analysis 24:189-206): the share of all products of
 * two areas' values that falls on neighbors. One wants it to tell whether high values or low ones
 * cluster, which Moran's I cannot: G above its expectation means high values next to high ones, below
 * it low next to low (or high ones kept apart).
 *
 * G = Σ w_ij x_i x_j / Σ_{i≠j} x_i x_j, with the weights as they are. `values` has one finite number
 * of 0 or more for each area, on a scale with a true zero: G is the same for b·x, but not for a + x.
 *
 * Moments over all orders of the values, equal to those of Getis & Ord 1992, but written around the mean
 * so that nothing cancels. With x = x̄ + d, only A = x̄ Σ (w_i· + w_·i) d_i and B = Σ w_ij d_i d_j vary
 * in the numerator; var A, var B (that of Moran's I) and their covariance have closed forms in S0, S1,
 * S2 and the second to fourth powers of d. Cost: three passes over the links.
 *
 * @throws UnfitDataError for fewer than 3 areas, for values negative, all equal or not finite, for
 * fewer than two values above 0, and for weights whose sum is not above 0.
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // Values 1 2 3 in a row. Neighbors: 2 (1·2 + 2·3) = 16; everybody: 2 (2 + 3 + 6) = 22.
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 4),
 *   indices: Uint32Array.of(1, 0, 2, 1),
 *   values: new Float64Array(4).fill(1),
 *   equalInRows: true,
 * };
 * const { value, expected } = getisOrdG(Float64Array.of(1, 2, 3), chain);
 * assert.ok(Math.abs(value - 16 / 22) < 1e-15);
 * assert.ok(Math.abs(expected - 4 / 6) < 1e-15);
 * ```
 */
export function getisOrdG(values: Float64Array, weights: Weights): GetisOrdG {
  checkLengths(values, weights);
  const { z, mean, sd } = standardize(values);
  checkNotNegative(values);
  const n = z.length;
  const { s0, s2 } = weightSums(weights);
  checkWeightSum(s0, "the Getis-Ord G");
  const all = productsOfAllPairs(values);
  const ofNeighbors = compensatedSum(spatialLag(weights, values).map((lag, i) => lag * values[i]));
  const value = ofNeighbors / all, expected = s0 / (n * (n - 1));

  // How far rows and columns are from summing to the same everywhere; 0 where order cannot matter.
  const difference = s2 - 4 * s0 * s0 / n;
  const unevenness = difference > 1e-12 * s2 ? difference : 0;
  const skewness = compensatedSum(z.map((score) => score ** 3)) / n;
  const varianceOfA = (mean * sd) ** 2 * unevenness * n / (n - 1);
  const varianceOfB = (s0 * sd * sd) ** 2 * moranI(values, weights).varianceRandomization;
  const covariance = -mean * sd ** 3 * skewness * unevenness * n / ((n - 1) * (n - 2));
  const variance = (varianceOfA + varianceOfB + 2 * covariance) / (all * all);
  const deviation = value - expected;
  return { value, expected, variance, z: variance > 0 ? deviation / Math.sqrt(variance) : NaN };
}

function checkNotNegative(values: Float64Array): void {
  const at = values.findIndex((value) => value < 0);
  if (at >= 0) {
    throw new UnfitDataError(
      `Cannot compute the Getis-Ord G as the value of area ${at} is ${values[at]}; ` +
        "it takes values of 0 or more, so choose another statistic or a field without negative values",
    );
  }
  if (values.filter((value) => value > 0).length < 2) {
    throw new UnfitDataError(
      "Cannot compute the Getis-Ord G as fewer than 2 values are above 0; choose another statistic",
    );
  }
}

/** Σ_{i≠j} x_i x_j, summed against the total of the others so that one huge value does not cancel. */
function productsOfAllPairs(values: Float64Array): number {
  const total = compensatedSum(values);
  return compensatedSum(values.map((value) => value * (total - value)));
}
