/**
 * Global Geary's c and its moments under two nulls.
 *
 * @module
 */
import { compensatedSum } from "../weights/compensated_sum.ts";
import { type WeightSums, weightSums } from "../weights/sums.ts";
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { checkWeightSum } from "./moran.ts";
import { standardize } from "./standardize.ts";

/** Geary's c with what is needed to judge it. */
export interface GearyC {
  /** c, 0 or more; below 1 neighbors are alike, above 1 they differ. */
  readonly value: number;
  /** 1 under either null. */
  readonly expected: number;
  /** Variance if the values were independent draws of one normal distribution. */
  readonly varianceNormality: number;
  /** Variance over all orders of the values found; NaN for n = 3. */
  readonly varianceRandomization: number;
  /** (1 - value) / sqrt(varianceNormality): positive means clustering; NaN where that variance is 0. */
  readonly zNormality: number;
  /** (1 - value) / sqrt(varianceRandomization); NaN where that variance is 0 or undefined. */
  readonly zRandomization: number;
}

/**
 * Geary's c (Geary 1954, The Incorporated Statistician 5:115-145): the mean squared difference between
 * neighbors, against that between any two areas. It looks at the differences between neighbors where
 * Moran's I looks at their common departure from the mean, so local unevenness counts more and level less.
 *
 * c = (n - 1) / (2 S0) · Σ w_ij (x_i - x_j)² / Σ (x - x̄)². Range 0 to well above 1; 1 is "no pattern".
 * The sign of z is turned around, so that positive means clustering for every statistic here. `values`
 * has one finite number for each area; c is the same for a + b·x. Areas without a neighbor stay in n
 * and in the mean.
 *
 * Moments: Cliff & Ord 1981, Spatial Processes, p. 21. Where everybody is everybody's neighbor c
 * cannot vary: both variances are 0 and the z are NaN. Cost: one pass over the links, and one for S1.
 *
 * @throws UnfitDataError for fewer than 3 areas, values all equal or not finite, and weights whose sum
 * is not above 0.
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // Values 1 1 3 3 in a row: of 3 pairs one differs, by 2. c = 3 / (2 · 6) · (2 · 4) / 4 = 1/2.
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * assert.equal(gearyC(Float64Array.of(1, 1, 3, 3), chain).value, 0.5);
 * ```
 */
export function gearyC(values: Float64Array, weights: Weights): GearyC {
  checkLengths(values, weights);
  const { z } = standardize(values);
  const n = z.length;
  const sums = weightSums(weights);
  checkWeightSum(sums.s0, "Geary's c");
  const b2 = compensatedSum(z.map((score) => score ** 4)) / n;
  const value = (n - 1) / (2 * sums.s0 * n) * compensatedSum(squaredDifferences(z, weights));
  const varianceNormality = normalityVariance(n, sums);
  const varianceRandomization = randomizationVariance(n, sums, b2);
  const zOf = (variance: number) => variance > 0 ? (1 - value) / Math.sqrt(variance) : NaN;
  return {
    value,
    expected: 1,
    varianceNormality,
    varianceRandomization,
    zNormality: zOf(varianceNormality),
    zRandomization: zOf(varianceRandomization),
  };
}

/** Σ_j w_ij (z_i - z_j)² of every area i; 0 for an area without neighbors. */
function squaredDifferences(z: Float64Array, { offsets, indices, values }: Weights): Float64Array {
  return z.map((own, i) => {
    let sum = 0;
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      sum += values[link] * (own - z[indices[link]]) ** 2;
    }
    return sum;
  });
}

function normalityVariance(n: number, { s0, s1, s2 }: WeightSums): number {
  return sumOrZero([2 * s1 * (n - 1), s2 * (n - 1), -4 * s0 * s0]) / (2 * (n + 1) * s0 * s0);
}

function randomizationVariance(n: number, { s0, s1, s2 }: WeightSums, b2: number): number {
  if (n === 3) return NaN;
  const square = n * n;
  return sumOrZero([
    (n - 1) * s1 * (square - 3 * n + 3 - (n - 1) * b2),
    -(n - 1) * s2 * (square + 3 * n - 6 - (square - n + 2) * b2) / 4,
    s0 * s0 * (square - 3 - (n - 1) ** 2 * b2),
  ]) / (n * (n - 2) * (n - 3) * s0 * s0);
}

/** Terms that cancel leave rounding, of either sign, where the variance is 0. */
function sumOrZero(terms: readonly number[]): number {
  const sum = compensatedSum(terms);
  const size = Math.max(...terms.map(Math.abs));
  return Math.abs(sum) <= 1e-12 * size ? 0 : sum;
}
