/**
 * The spatial lag along links taken backward.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";

/**
 * Σ_i w_ij x_i for every area j: the sum over the areas that have j as their neighbor, where the spatial
 * lag sums over the neighbors of j. The same for symmetric weights. `values` has one number for each
 * area. Cost: one pass over the links.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // Area 0 has the neighbor 1, and not the other way round.
 * const oneWay = {
 *   offsets: Uint32Array.of(0, 1, 1),
 *   indices: Uint32Array.of(1),
 *   values: Float64Array.of(3),
 *   equalInRows: true,
 * };
 * assert.deepEqual(reverseLag(oneWay, Float64Array.of(5, 7)), Float64Array.of(0, 15));
 * ```
 */
export function reverseLag(weights: Weights, values: Float64Array): Float64Array {
  const { offsets, indices } = weights;
  const received = new Float64Array(values.length);
  for (let i = 0; i < values.length; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      received[indices[link]] += weights.values[link] * values[i];
    }
  }
  return received;
}
