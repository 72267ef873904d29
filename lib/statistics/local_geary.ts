/**
 * Local Geary's c of every area, with its moments when the area keeps its own value.
 *
 * @module
 */
import { compensatedSum } from "../weights/compensated_sum.ts";
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { weightSpread } from "./conditional_lag.ts";
import { standardize } from "./standardize.ts";

/** One entry for each area, in the order of the values; NaN where the area is alone. */
export interface LocalGeary {
  /** Weighted sum of squared differences to the neighbors, in units of the variance; 0 or more. */
  readonly c: Float64Array;
  /** Mean of `c` when the other n - 1 values are permuted; `c` below it: neighbors are alike. */
  readonly expected: Float64Array;
  /** Variance of `c` when the other n - 1 values are permuted. */
  readonly variance: Float64Array;
}

/**
 * Local Geary's c (Anselin 1995, eq. 18, with the population variance m2): Σ_j w_ij (x_i - x_j)² / m2, how
 * much each area differs from its neighbors. Small: alike, whatever the level, also where the own
 * value is near the mean and local Moran sees nothing; large: unlike. The values sum to
 * 2 S0 n / (n - 1) times the global c.
 *
 * Moments: with the own value held, c is a weighted sum of the N = n - 1 permuted numbers
 * u_j = (z_i - z_j)², so its mean is W·ū and its variance (Σw² - W²/N)·S²(u), divisor N - 1. Both come
 * from the power sums of z in closed form. `values` has one finite number for each area. Cost: one pass
 * over the links.
 *
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
 * // m2 of 4 4 1 is 2. The neighbor of area 0 is as often a 4 (u = 0) as the 1 (u = 9/2).
 * const { c, expected } = localGeary(Float64Array.of(4, 4, 1), pairAndOne);
 * assert.equal(c[0], 0);
 * assert.ok(Math.abs(expected[0] - 9 / 4) < 1e-14);
 * assert.ok(Number.isNaN(c[2]));
 * ```
 */
export function localGeary(values: Float64Array, weights: Weights): LocalGeary {
  checkLengths(values, weights);
  const { z } = standardize(values);
  const n = z.length;
  const cubes = compensatedSum(z.map((score) => score ** 3));
  const fourths = compensatedSum(z.map((score) => score ** 4));
  const undefinedForAll = () => new Float64Array(n).fill(NaN);
  const c = undefinedForAll(), expected = undefinedForAll(), variance = undefinedForAll();
  for (let area = 0; area < n; area++) {
    const start = weights.offsets[area], end = weights.offsets[area + 1];
    if (start === end) continue;
    const own = z[area];
    let sum = 0, total = 0, squares = 0;
    for (let e = start; e < end; e++) {
      const weight = weights.values[e];
      sum += weight * (own - z[weights.indices[e]]) ** 2;
      total += weight;
      squares += weight * weight;
    }
    const others = differenceMoments(own, n, cubes, fourths);
    c[area] = sum;
    expected[area] = total * others.mean;
    variance[area] = weightSpread(total, squares, n - 1) * others.variance;
  }
  return { c, expected, variance };
}

/**
 * Mean and variance (divisor N - 1) of (own - z_j)² over the N = n - 1 other areas. The own term is 0,
 * so the sums run over all areas; Σz = 0 and Σz² = n take the rest out of the binomials.
 */
function differenceMoments(
  own: number,
  n: number,
  cubes: number,
  fourths: number,
): { mean: number; variance: number } {
  const count = n - 1, square = own * own;
  const sum = n * (square + 1);
  const sumOfSquares = n * square * square + 6 * n * square - 4 * own * cubes + fourths;
  const mean = sum / count;
  const spread = sumOfSquares - sum * mean;
  const variance = spread > 1e-13 * sumOfSquares ? spread / (count - 1) : 0;
  return { mean, variance };
}
