/**
 * Bivariate Moran's I: one field against another field's neighbors.
 *
 * @module
 */
import { compensatedSum } from "../weights/compensated_sum.ts";
import { spatialLag } from "../weights/lag.ts";
import { weightSums } from "../weights/sums.ts";
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { dot } from "./dot.ts";
import { checkWeightSum } from "./moran.ts";
import { reverseLag } from "./reverse_lag.ts";
import { standardize } from "./standardize.ts";

/** Bivariate I with what is needed to judge it. */
export interface BivariateMoranI {
  /** I of x against the neighbors' y. */
  readonly value: number;
  /** Mean over all orders of y against a fixed x: 0. */
  readonly expected: number;
  /** Variance over all orders of y against a fixed x. */
  readonly variance: number;
  /** value / sqrt(variance); NaN where the variance is 0. */
  readonly z: number;
  /** Pearson correlation r of x and y in the same areas, which I does not contain. */
  readonly correlation: number;
}

/**
 * Bivariate Moran's I (Wartenberg 1985, Geographical Analysis 17:263-283): does a high `x` go with high
 * `y` next door? One wants it for then-and-now questions and for spill-over from one field to another.
 *
 * I = n/S0 · Σ w_ij zx_i zy_j / sqrt(Σ zx² Σ zy²). Positive: x goes with the neighbors' y; negative:
 * against it. Not symmetric: x with neighbors' y is not y with neighbors' x unless the weights are.
 * Both fields have one finite number for each area; I is the same for a + b·x, b above 0.
 *
 * Null: all orders of y against a fixed x, mean 0; the statistic is then a linear function of the
 * permuted y, so its variance is exact (Σ(a - ā)² n / (n - 1) / S0², a_j = Σ_i w_ij zx_i). That null also
 * breaks the bond between x and y in the same area: where x and y are correlated and each is
 * clustered, I is far from 0 without any spill-over. (If areas kept both their values and pairs were
 * permuted, the mean would be -r / (n - 1).) Cost: two passes over the links.
 *
 * @throws UnfitDataError for fewer than 3 areas, a field all equal or not finite, and weights whose sum
 * is not above 0.
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
 * // zx is 1 1 -1 -1, zy is 1 -1 -1 1, whose lag is -1 0 0 -1: I = 1/6 · (-1 + 1) = 0.
 * const { value } = bivariateMoranI(Float64Array.of(3, 3, 1, 1), Float64Array.of(8, 2, 2, 8), chain);
 * assert.equal(value, 0);
 * ```
 */
export function bivariateMoranI(
  x: Float64Array,
  y: Float64Array,
  weights: Weights,
): BivariateMoranI {
  checkLengths(x, weights);
  checkLengths(y, weights);
  const zx = standardize(x).z, zy = standardize(y).z;
  const { s0 } = weightSums(weights);
  checkWeightSum(s0, "bivariate Moran's I");
  const n = zx.length;
  const value = dot(spatialLag(weights, zy), zx) / s0;
  const variance = varianceOfOrders(reverseLag(weights, zx)) / (s0 * s0);
  const z = variance > 0 ? value / Math.sqrt(variance) : NaN;
  return { value, expected: 0, variance, z, correlation: dot(zx, zy) / n };
}

/**
 * Variance of Σ a_j z_j over all orders of the standard scores z: Σ(a - ā)² n / (n - 1); exactly 0
 * where all a are equal up to rounding.
 */
export function varianceOfOrders(a: Float64Array): number {
  const n = a.length;
  const mean = compensatedSum(a) / n;
  const spread = compensatedSum(a.map((each) => (each - mean) ** 2));
  return spread > 1e-26 * compensatedSum(a.map((each) => each * each)) ? spread * n / (n - 1) : 0;
}
