/**
 * Global Moran's I and its moments under two nulls.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { compensatedSum } from "../weights/compensated_sum.ts";
import { spatialLag } from "../weights/lag.ts";
import { weightSums } from "../weights/sums.ts";
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { standardize } from "./standardize.ts";

/** Moran's I with what is needed to judge it. */
export interface MoranI {
  /** I; 0 is not "no pattern", `expected` is. */
  readonly value: number;
  /** -1 / (n - 1) under either null. */
  readonly expected: number;
  /** Variance if the values were independent draws of one normal distribution. */
  readonly varianceNormality: number;
  /** Variance over all orders of the values found; NaN for n = 3. */
  readonly varianceRandomization: number;
  /** (value - expected) / sqrt(varianceNormality); NaN where that variance is 0. */
  readonly zNormality: number;
  /** (value - expected) / sqrt(varianceRandomization); NaN where that variance is 0 or undefined. */
  readonly zRandomization: number;
  /** Kurtosis of the values, m4 / m2². */
  readonly b2: number;
}

/**
 * Moran's I, the correlation of each value with its neighbors' values, weighted by `weights`.
 *
 * I = n/S0 · Σ w_ij z_i z_j / Σ z². Positive: neighbors are alike; negative: neighbors differ. Areas
 * without a neighbor stay in n and in the mean. `values` has one finite number for each area; the
 * unit does not matter, as I is the same for a + b·x.
 *
 * Moments: Cliff & Ord 1981, Spatial Processes, eqs 2.36 (normality) and 2.37 to 2.39
 * (randomization). On a map where everybody is everybody's neighbor I cannot vary: both variances are
 * 0 and the z are NaN. Cost: one pass over the links.
 *
 * @throws UnfitDataError for fewer than 3 areas, values all equal or not finite, and weights whose sum
 * is not above 0.
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // Four areas in a row, values 1 1 3 3: of 3 pairs two are alike and one differs, I = (1 - 1 + 1) / 3.
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * assert.ok(Math.abs(moranI(Float64Array.of(1, 1, 3, 3), chain).value - 1 / 3) < 1e-15);
 * ```
 */
export function moranI(values: Float64Array, weights: Weights): MoranI {
  checkLengths(values, weights);
  const { z } = standardize(values);
  const n = z.length;
  const { s0, s1, s2 } = weightSums(weights);
  checkWeightSum(s0);
  const squares = compensatedSum(z.map((score) => score ** 2));
  const b2 = compensatedSum(z.map((score) => score ** 4)) * n / squares ** 2;
  const value = n / s0 * compensatedSum(spatialLag(weights, z).map((lag, i) => z[i] * lag)) /
    squares;
  const expected = -1 / (n - 1);
  const varianceNormality = clean(
    (n * n * s1 - n * s2 + 3 * s0 * s0) / (s0 * s0 * (n * n - 1)) - expected ** 2,
    expected,
  );
  const varianceRandomization = clean(randomizationVariance(n, s0, s1, s2, b2), expected);
  const zOf = (variance: number) => variance > 0 ? (value - expected) / Math.sqrt(variance) : NaN;
  return {
    value,
    expected,
    varianceNormality,
    varianceRandomization,
    zNormality: zOf(varianceNormality),
    zRandomization: zOf(varianceRandomization),
    b2,
  };
}

/**
 * Makes sure that the weights can divide; `statistic` is the name that a refusal gives.
 *
 * @throws UnfitDataError where the sum of all weights is not above 0: no links at all, or negative ones.
 */
export function checkWeightSum(s0: number, statistic = "Moran's I"): void {
  if (s0 > 0) return;
  throw new UnfitDataError(
    s0 === 0
      ? `Cannot compute ${statistic} as no area has a neighbor; choose a rule that links areas`
      : `Cannot compute ${statistic} as the weights sum to ${s0}; the sum has to be above 0`,
  );
}

function randomizationVariance(n: number, s0: number, s1: number, s2: number, b2: number): number {
  if (n === 3) return NaN;
  const ofAll = n * ((n * n - 3 * n + 3) * s1 - n * s2 + 3 * s0 * s0);
  const ofKurtosis = b2 * ((n * n - n) * s1 - 2 * n * s2 + 6 * s0 * s0);
  return (ofAll - ofKurtosis) / ((n - 1) * (n - 2) * (n - 3) * s0 * s0) - 1 / (n - 1) ** 2;
}

/** A difference of equal moments leaves rounding, of either sign, where the variance is 0. */
function clean(variance: number, expected: number): number {
  return Math.abs(variance) <= 1e-12 * expected ** 2 ? 0 : variance;
}
