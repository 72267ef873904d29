/**
 * Exact local counts for rows of unequal weights on very small maps.
 *
 * @module
 */
import { TIE } from "../statistics/standardize.ts";

/** Number of ordered ways to draw `k` of `n`. */
export function arrangementsOf(n: number, k: number): number {
  let ways = 1;
  for (let i = 0; i < k; i++) ways *= n - i;
  return ways;
}

/**
 * Ordered ways to give the other areas' terms to the weights of `area`'s row whose weighted sum is at least
 * and at most `observed`, ties in both. Cost: all arrangements, one by one.
 */
export function countArrangements(
  terms: Float64Array,
  { area, weights, observed }: { area: number; weights: Float64Array; observed: number },
): { atLeast: number; atMost: number } {
  const taken = new Uint8Array(terms.length);
  taken[area] = 1;
  let atLeast = 0, atMost = 0;
  const place = (m: number, sum: number): void => {
    if (m === weights.length) {
      if (sum >= observed - TIE) atLeast++;
      if (sum <= observed + TIE) atMost++;
      return;
    }
    for (let other = 0; other < terms.length; other++) {
      if (taken[other]) continue;
      taken[other] = 1;
      place(m + 1, sum + weights[m] * terms[other]);
      taken[other] = 0;
    }
  };
  place(0, 0);
  return { atLeast, atMost };
}
