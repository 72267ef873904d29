/**
 * Rates on a scale on which small and large populations can be compared.
 *
 * @module
 */
import { type RateCounts, rateMoments } from "./rate_moments.ts";

/**
 * Standardized rates z_i = (r_i - b) / sqrt(a + b / n_i) of Assunção & Reis 1999 (Statistics in Medicine 18,
 * 2147–2162): the distance of each rate from the overall rate in units of the spread that chance and true
 * differences between areas together give a population of its size. Without unit; about 0 on
 * average. Shuffling raw rates of unequal populations is not a fair null; shuffling these is close to it.
 *
 * All 0 divided by 0, thus NaN, where there are no cases at all. Cost: three passes.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // b 0.2, a 0.008, so that the variance is 0.008 + 0.2 / 100 = 0.01 in both areas.
 * const counts = { cases: Float64Array.of(10, 30), population: Float64Array.of(100, 100) };
 * const [low, high] = standardizedRates(counts);
 * assert.ok(Math.abs(low + 1) < 1e-12 && Math.abs(high - 1) < 1e-12);
 * ```
 */
export function standardizedRates(counts: RateCounts): Float64Array {
  const { cases, population } = counts;
  const { rate, between } = rateMoments(counts);
  return cases.map((count, i) => {
    const size = population[i];
    return (count / size - rate) / Math.sqrt(between + rate / size);
  });
}
