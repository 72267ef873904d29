/**
 * The spatial lag: what an area's neighbors hold.
 *
 * @module
 */
import type { Weights } from "./weights.ts";

/**
 * Σ_j w_ij x_j for every area i: with row-standardized weights the weighted mean of its neighbors,
 * else their weighted sum.
 *
 * @param values One number an area, length n; a NaN makes the lags of its neighbors NaN.
 * @returns Length n, in the unit of `values`; 0 for an area without neighbors (what it adds to a
 * statistic; where a lag is reported, such areas have none).
 * @throws {RangeError} when the lengths differ. Cost: one pass over the links.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 4),
 *   indices: Uint32Array.of(1, 0, 2, 1),
 *   values: Float64Array.of(1, 0.5, 0.5, 1),
 *   equalInRows: true,
 * };
 * assert.deepEqual(spatialLag(chain, Float64Array.of(2, 4, 8)), Float64Array.of(4, 5, 4));
 * ```
 */
export function spatialLag(weights: Weights, values: Float64Array): Float64Array {
  const { offsets, indices } = weights;
  const n = offsets.length - 1;
  if (values.length !== n) {
    throw new RangeError(`Cannot lag ${values.length} values with weights of ${n} areas`);
  }
  const lags = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    let lag = 0;
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      lag += weights.values[link] * values[indices[link]];
    }
    lags[i] = lag;
  }
  return lags;
}
