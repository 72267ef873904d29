/**
 * The product of two columns.
 *
 * @module
 */
import { compensatedSum } from "../weights/compensated_sum.ts";

/**
 * Σ a_i b_i with a compensated sum; the arrays have the same length.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.equal(dot(Float64Array.of(1, 2), Float64Array.of(3, 4)), 11);
 * ```
 */
export function dot(a: Float64Array, b: Float64Array): number {
  return compensatedSum(a.map((each, i) => each * b[i]));
}
