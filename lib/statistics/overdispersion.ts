/**
 * Whether counts vary more between areas than one common rate would make them.
 *
 * @module
 */
import type { RateCounts } from "../prepare/rate_moments.ts";

/**
 * Index of over-dispersion of Potthoff & Whittinghill 1966 (Biometrika 53, 183–190): Σ y_i (y_i - 1) / p_i divided by
 * its expectation Y (Y - 1), where area i has the share p_i of the population and Y is the number of cases. 1 where the
 * counts vary as chance would make them, larger where they vary more; 0 or more. NaN for fewer than 2
 * cases. Cost: one pass.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // Shares ½ and ½, counts 4 and 0: (12 + 0) / ½ / 12
 * const counts = { cases: Float64Array.of(4, 0), population: Float64Array.of(50, 50) };
 * assert.equal(overdispersion(counts), 2);
 * ```
 */
export function overdispersion({ cases, population }: RateCounts): number {
  let allCases = 0, all = 0, sum = 0;
  for (let i = 0; i < cases.length; i++) {
    allCases += cases[i];
    all += population[i];
    sum += cases[i] * (cases[i] - 1) / population[i];
  }
  return allCases < 2 ? NaN : sum * all / (allCases * (allCases - 1));
}
