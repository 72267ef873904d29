/**
 * The lag of standard scores and what it would be by chance when an area keeps its own value: the
 * part that the local statistics have in common.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";

/** One entry for each area; NaN where the area is alone. */
export interface ConditionalLag {
  /** Σ_j w_ij z_j, with the weights as they are. */
  readonly lag: Float64Array;
  /** Σ_j w_ij. */
  readonly total: Float64Array;
  /** Mean of the lag when the scores of the other n - 1 areas are permuted. */
  readonly expected: Float64Array;
  /** Variance of the lag when the scores of the other n - 1 areas are permuted; 0 where it cannot vary. */
  readonly variance: Float64Array;
}

/**
 * Lag of `z` (standard scores: mean 0, squares summing to n) with its conditional moments: with N = n - 1
 * other scores of mean m and variance S² (divisor N - 1), the lag has mean W·m and variance
 * (Σw² - W²/N)·S², W the row's weight sum. Cost: one pass over the links.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const pairAndOne = {
 *   offsets: Uint32Array.of(0, 1, 2, 2),
 *   indices: Uint32Array.of(1, 0),
 *   values: Float64Array.of(1, 1),
 *   equalInRows: true,
 * };
 * const high = Math.sqrt(1 / 2), low = -Math.sqrt(2);
 * const { expected, variance } = conditionalLag(Float64Array.of(high, high, low), pairAndOne);
 * // The only neighbor of area 0 is as often high as low.
 * assert.ok(Math.abs(expected[0] - (high + low) / 2) < 1e-15);
 * assert.ok(Math.abs(variance[0] - (high - low) ** 2 / 4) < 1e-15);
 * assert.ok(Number.isNaN(expected[2]));
 * ```
 */
export function conditionalLag(z: Float64Array, weights: Weights): ConditionalLag {
  const n = z.length;
  const undefinedForAll = () => new Float64Array(n).fill(NaN);
  const lag = undefinedForAll(), total = undefinedForAll();
  const expected = undefinedForAll(), variance = undefinedForAll();
  for (let area = 0; area < n; area++) {
    const start = weights.offsets[area], end = weights.offsets[area + 1];
    if (start === end) continue;
    let sum = 0, all = 0, squares = 0;
    for (let e = start; e < end; e++) {
      const weight = weights.values[e];
      sum += weight * z[weights.indices[e]];
      all += weight;
      squares += weight * weight;
    }
    const others = momentsWithout(z[area], n);
    lag[area] = sum;
    total[area] = all;
    expected[area] = all * others.mean;
    variance[area] = weightSpread(all, squares, n - 1) * others.variance;
  }
  return { lag, total, expected, variance };
}

/**
 * Σw² - W²/N, the variance of a weighted sum of N permuted numbers of variance 1; exactly 0 where all N
 * have the same weight, which rounding would hide.
 */
export function weightSpread(total: number, squares: number, count: number): number {
  const spread = squares - total * total / count;
  return spread > 1e-14 * squares ? spread : 0;
}

/** Mean and variance (divisor N - 1) of the N = n - 1 standard scores that are left without `own`. */
function momentsWithout(own: number, n: number): { mean: number; variance: number } {
  const count = n - 1;
  const mean = -own / count;
  return { mean, variance: (n - own * own - count * mean * mean) / (count - 1) };
}
