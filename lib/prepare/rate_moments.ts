/**
 * Mean and variance of rates on unequal populations, by the method of moments.
 *
 * @module
 */

/** Cases and the population they could have come from, parallel, one entry an area. */
export interface RateCounts {
  /** Whole numbers of 0 or more. */
  readonly cases: Float64Array;
  /** Above 0; need not be whole (person-years, estimates). */
  readonly population: Float64Array;
  /** True where nobody counts twice, so that cases cannot exceed the population, which is whole. @default false */
  readonly share?: boolean;
}

/** What {@link rateMoments} finds; rates are cases per one of the population. */
export interface RateMoments {
  /** Overall rate b = Σ cases / Σ population. */
  readonly rate: number;
  /** Variance s² of the rates around b, weighted by population. */
  readonly variance: number;
  /** Variance between areas beyond chance, a = s² - b / n̄, and 0 where that is negative. */
  readonly between: number;
}

/**
 * Moments of the rates r_i = cases / population of some areas: with n̄ the mean population,
 * b = Σ y_i / Σ n_i, s² = Σ n_i (r_i - b)² / Σ n_i, a = max(0, s² - b / n̄).
 *
 * Source: Marshall 1991, Applied Statistics 40, 283–294; Assunção & Reis 1999, Statistics in Medicine 18,
 * 2147–2162. Cost: two passes.
 *
 * @param areas Positions of the areas to look at. @default all
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // Rates 0.1 and 0.3 on 100 each: b 0.2, s² 0.01, chance gives 0.2 / 100 of it.
 * const counts = { cases: Float64Array.of(10, 30), population: Float64Array.of(100, 100) };
 * assert.ok(Math.abs(rateMoments(counts).between - 0.008) < 1e-15);
 * ```
 */
export function rateMoments(
  { cases, population }: RateCounts,
  areas?: ArrayLike<number>,
): RateMoments {
  const members = areas?.length ?? cases.length;
  let allCases = 0, all = 0;
  for (let at = 0; at < members; at++) {
    const i = areas ? areas[at] : at;
    allCases += cases[i];
    all += population[i];
  }
  const rate = allCases / all;
  let squares = 0;
  for (let at = 0; at < members; at++) {
    const i = areas ? areas[at] : at;
    squares += population[i] * (cases[i] / population[i] - rate) ** 2;
  }
  const variance = squares / all;
  return { rate, variance, between: Math.max(0, variance - rate * members / all) };
}

/** Rates as they are: cases / population of each area. */
export function rawRates({ cases, population }: RateCounts): Float64Array {
  return cases.map((count, i) => count / population[i]);
}
