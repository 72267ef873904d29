/**
 * Values replaced by their place in the order.
 *
 * @module
 */

/**
 * Ranks from 1 (smallest) to n; equal values share the mean of their ranks. `values` are finite. Cost:
 * one sort.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.deepEqual(ranks(Float64Array.of(5, 1, 5, 9)), Float64Array.of(2.5, 1, 2.5, 4));
 * ```
 */
export function ranks(values: Float64Array): Float64Array {
  const order = Uint32Array.from(values.keys()).sort((a, b) => values[a] - values[b]);
  const ranked = new Float64Array(values.length);
  for (let start = 0; start < order.length;) {
    let end = start + 1;
    while (end < order.length && values[order[end]] === values[order[start]]) end++;
    for (let at = start; at < end; at++) ranked[order[at]] = (start + 1 + end) / 2;
    start = end;
  }
  return ranked;
}
