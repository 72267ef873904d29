/**
 * Standard scores: the scale on which every statistic and every permutation works.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { compensatedSum } from "../weights/compensated_sum.ts";

/** Two standardized numbers that differ by at most this count as equal. */
export const TIE = 1e-10;

/** Values on the scale of their own spread. */
export interface Standardized {
  /** (x - mean) / sd of each value, length n; they sum to 0 and their squares to n. */
  readonly z: Float64Array;
  readonly mean: number;
  /** Population standard deviation (divisor n), above 0. */
  readonly sd: number;
}

/**
 * Standard scores of `values` with the population standard deviation (divisor n).
 *
 * Cost: a few passes with compensated sums.
 *
 * @throws UnfitDataError for fewer than 3 values, for a value that is not finite, and for values that
 * are all equal up to rounding.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.deepEqual(standardize(Float64Array.of(1, 1, 3, 3)).z, Float64Array.of(-1, -1, 1, 1));
 * ```
 */
export function standardize(values: Float64Array): Standardized {
  const n = values.length;
  checkValues(values);
  const mean = compensatedSum(values) / n;
  const deviations = values.map((value) => value - mean);
  // The mean of values around a billion is itself rounded; what is left of it would tilt every score.
  const rest = compensatedSum(deviations) / n;
  const centered = deviations.map((deviation) => deviation - rest);
  const sd = Math.sqrt(compensatedSum(centered.map((deviation) => deviation ** 2)) / n);
  return { z: centered.map((deviation) => deviation / sd), mean, sd };
}

function checkValues(values: Float64Array): void {
  if (values.length < 3) {
    throw new UnfitDataError(
      `Cannot measure clustering of ${values.length} usable areas as it takes at least 3`,
    );
  }
  let low = Infinity, high = -Infinity;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (!Number.isFinite(value)) {
      throw new UnfitDataError(
        `Cannot measure clustering as the value of area ${i} is ${value}; leave such areas out first`,
      );
    }
    if (value < low) low = value;
    if (value > high) high = value;
  }
  const rounding = 4 * Number.EPSILON * Math.max(Math.abs(low), Math.abs(high));
  if (high - low <= rounding) {
    throw new UnfitDataError(
      `Cannot measure clustering as all ${values.length} values are equal to ${low}; choose a field that varies`,
    );
  }
}
