/**
 * What counts chance alone gives an area, as exact tables of probabilities.
 *
 * @module
 */
import type { RateCounts } from "./rate_moments.ts";

/** Terms below this share of the largest one cannot change a sum. */
const NEGLIGIBLE = 1e-18;

/** A distribution of counts: P(X = first + k) is `terms[k] / total`. */
export interface CountTable {
  readonly first: number;
  readonly terms: Float64Array;
  readonly total: number;
}

/** The count of area `i` at a rate common to all: binomial for a share, else Poisson. */
export function countTable({ population, share }: RateCounts, i: number, rate: number): CountTable {
  const size = population[i];
  return share ? binomialTable(size, rate) : poissonTable(rate * size);
}

/**
 * All probabilities of a Poisson distribution that matter, as shares of the largest: P(k) = P(k - 1) mean / k. Takes
 * about 18 sqrt(mean) steps.
 *
 * @param mean Finite, 0 or more.
 */
export function poissonTable(mean: number): CountTable {
  return tableAround(Math.floor(mean), (k) => mean / k);
}

/**
 * The same for a binomial distribution: P(k) = P(k - 1) (n - k + 1) / k · p / (1 - p).
 *
 * @param n Whole, 0 or more.
 * @param p At least 0, below 1.
 */
export function binomialTable(n: number, p: number): CountTable {
  return tableAround(Math.floor((n + 1) * p), (k) => (n - k + 1) / k * p / (1 - p));
}

/**
 * From the mode outward each term is the one before times (or divided by) a ratio. That takes no logarithm and no
 * factorial, only products and quotients, which round alike in every engine.
 *
 * @param ratio P(k) / P(k - 1), for k of 1 or more.
 */
function tableAround(mode: number, ratio: (k: number) => number): CountTable {
  const below: number[] = [], above: number[] = [];
  for (let k = mode, term = 1; k > 0 && term > NEGLIGIBLE; k--) below.push(term /= ratio(k));
  for (let k = mode + 1, term = 1; term > NEGLIGIBLE; k++) above.push(term *= ratio(k));
  const terms = Float64Array.from([...below.reverse(), 1, ...above]);
  return { first: mode - below.length, terms, total: terms.reduce((sum, term) => sum + term, 0) };
}

/**
 * For each probability the smallest k with P(X <= k) at least as large.
 *
 * @param probabilities Ascending, each between 0 and 1.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // P(X <= 0) = 0.37, P(X <= 1) = 0.74, P(X <= 2) = 0.92
 * assert.deepEqual(tableQuantiles(poissonTable(1), [0.1, 0.5, 0.9]), [0, 1, 2]);
 * ```
 */
export function tableQuantiles(
  { first, terms, total }: CountTable,
  probabilities: readonly number[],
): number[] {
  let k = 0, sum = terms[0];
  return probabilities.map((probability) => {
    while (sum < probability * total && k < terms.length - 1) sum += terms[++k];
    return first + k;
  });
}
