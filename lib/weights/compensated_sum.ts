/**
 * Sums that stay exact to the last digits however many terms they have.
 *
 * @module
 */

/**
 * Sum of numbers with the rounding error of each addition carried along (Neumaier 1974): its own
 * error does not grow with the number of terms. 0 for no terms. Cost: about four plain additions a
 * term.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.equal(compensatedSum([1, 1e100, 1, -1e100]), 2);
 * ```
 */
export function compensatedSum(terms: ArrayLike<number>): number {
  let sum = 0, lost = 0;
  for (let at = 0; at < terms.length; at++) {
    const term = terms[at];
    const next = sum + term;
    lost += Math.abs(sum) >= Math.abs(term) ? (sum - next) + term : (term - next) + sum;
    sum = next;
  }
  return sum + lost;
}
