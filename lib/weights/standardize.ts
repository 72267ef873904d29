/**
 * How rows are scaled: the second half of what makes weights, apart from how much each neighbor
 * counts.
 *
 * @module
 */
import { compensatedSum } from "./compensated_sum.ts";

/** Ways to scale rows, as `--standardize` knows them. */
export const STANDARDIZATIONS = ["row", "none", "total", "variance"] as const;
/** See {@link STANDARDIZATIONS}. */
export type Standardize = typeof STANDARDIZATIONS[number];

/**
 * Scales weights. With n₊ the number of areas that have a neighbor:
 *
 * - `row`: every row sums to 1, so that the lag is a weighted mean;
 * - `none`: as they are;
 * - `total`: all weights together sum to n₊;
 * - `variance`: w_ij / sqrt(Σ_j w_ij²), then all scaled to sum to n₊ (the S coding of Tiefelsdorf,
 * Griffith & Boots 1999), between `row`, which favors areas with few neighbors, and `total`, which
 * favors those with many.
 *
 * @param offsets Row starts, length n + 1.
 * @param values Weights above 0, one per link.
 * @returns New weights in the same order; rows without links stay empty. Cost: one or two passes.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // An area with two neighbors, one with one, one with none.
 * const scaled = standardize(Uint32Array.of(0, 2, 3, 3), Float64Array.of(1, 3, 5), "row");
 * assert.deepEqual(scaled, Float64Array.of(0.25, 0.75, 1));
 * ```
 */
export function standardize(
  offsets: Uint32Array,
  values: Float64Array,
  how: Standardize,
): Float64Array {
  if (how === "none") return values.slice();
  if (how === "row") return divideRows(offsets, values, rowSum);
  const scaled = how === "variance" ? divideRows(offsets, values, rowLength) : values;
  const total = compensatedSum(scaled);
  const filled = countFilledRows(offsets);
  return scaled.map((value) => value * filled / total);
}

type RowMeasure = (values: Float64Array, from: number, to: number) => number;

function divideRows(offsets: Uint32Array, values: Float64Array, measure: RowMeasure): Float64Array {
  const divided = new Float64Array(values.length);
  for (let i = 0; i + 1 < offsets.length; i++) {
    const divisor = measure(values, offsets[i], offsets[i + 1]);
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      divided[link] = values[link] / divisor;
    }
  }
  return divided;
}

function rowSum(values: Float64Array, from: number, to: number): number {
  let sum = 0;
  for (let link = from; link < to; link++) sum += values[link];
  return sum;
}

function rowLength(values: Float64Array, from: number, to: number): number {
  let squares = 0;
  for (let link = from; link < to; link++) squares += values[link] * values[link];
  return Math.sqrt(squares);
}

function countFilledRows(offsets: Uint32Array): number {
  let filled = 0;
  for (let i = 0; i + 1 < offsets.length; i++) if (offsets[i + 1] > offsets[i]) filled++;
  return filled;
}
