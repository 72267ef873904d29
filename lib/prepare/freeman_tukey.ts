/**
 * The transform that evens out the variance of counts.
 *
 * @module
 */
import type { RateCounts } from "./rate_moments.ts";

/**
 * sqrt(1000) (sqrt(y / n) + sqrt((y + 1) / n)) for y cases in a population of n: twice the square root of
 * the rate per 1,000, adjusted so that counts of 0 and 1 still differ sensibly. 0 or more; rises with the rate. Its variance
 * depends on the population but hardly on the rate.
 *
 * Source: Freeman & Tukey 1950, Annals of Mathematical Statistics 21, 607–611, in the form for rates of Cressie
 * & Read 1989.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // 3 of 1,000: sqrt(3) + sqrt(4)
 * const counts = { cases: Float64Array.of(3), population: Float64Array.of(1000) };
 * assert.ok(Math.abs(freemanTukey(counts)[0] - (Math.sqrt(3) + 2)) < 1e-12);
 * ```
 */
export function freemanTukey({ cases, population }: RateCounts): Float64Array {
  return cases.map((count, i) =>
    Math.sqrt(1000) * (Math.sqrt(count / population[i]) + Math.sqrt((count + 1) / population[i]))
  );
}
