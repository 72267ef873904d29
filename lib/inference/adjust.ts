/**
 * p-values adjusted for the number of areas tested.
 *
 * @module
 */
import { lowerBound, upperBound } from "./sorted.ts";

/** Ways to adjust; `bh` and `by` bound the false-discovery rate, `bonferroni` and `holm` any false alarm. */
export const ADJUSTMENTS = ["none", "bonferroni", "holm", "bh", "by"] as const;
/** See {@link ADJUSTMENTS}. */
export type Adjustment = typeof ADJUSTMENTS[number];

/**
 * Adjusted p-values in the order given: reject where the result is at most the level.
 *
 * `bonferroni` (Dunn 1961), `holm` (Holm 1979), `bh` (Benjamini & Hochberg 1995; independent or positively
 * dependent tests), `by` (Benjamini & Yekutieli 2001; any dependence), `none`. NaN marks an area
 * without a p: it stays NaN and is not counted as a test. The input is not changed. Cost: one sort.
 *
 * @throws RangeError for a p outside [0, 1].
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const p = Float64Array.of(0.01, NaN, 0.04);
 * assert.deepEqual([...adjustP(p, "bonferroni")], [0.02, NaN, 0.08]);
 * assert.deepEqual([...adjustP(p, "bh")], [0.02, NaN, 0.04]);
 * ```
 */
export function adjustP(p: Float64Array, method: Adjustment): Float64Array {
  for (let i = 0; i < p.length; i++) {
    if (p[i] < 0 || p[i] > 1) {
      throw new RangeError(`Cannot adjust ${p[i]} as a p lies between 0 and 1`);
    }
  }
  if (method === "none") return p.slice();
  const ascending = p.filter((value) => !Number.isNaN(value)).sort();
  const count = ascending.length;
  if (method === "bonferroni") return p.map((value) => Math.min(1, value * count));
  if (method === "holm") {
    const adjusted = stepDown(ascending);
    return p.map((value) => Number.isNaN(value) ? NaN : adjusted[lowerBound(ascending, value)]);
  }
  const adjusted = stepUp(ascending, method === "by" ? harmonicSum(count) : 1);
  return p.map((value) => Number.isNaN(value) ? NaN : adjusted[upperBound(ascending, value) - 1]);
}

/** Holm: the smallest of m counts m times, the next m - 1 times, and none less than the one before. */
function stepDown(ascending: Float64Array): Float64Array {
  let largest = 0;
  return ascending.map((p, rank) => {
    largest = Math.max(largest, Math.min(1, (ascending.length - rank) * p));
    return largest;
  });
}

/** Benjamini and coauthors: from the largest p down, m / rank times p, and none more than the one after. */
function stepUp(ascending: Float64Array, dependence: number): Float64Array {
  const adjusted = new Float64Array(ascending.length);
  let smallest = 1;
  for (let rank = ascending.length; rank >= 1; rank--) {
    smallest = Math.min(smallest, dependence * ascending.length / rank * ascending[rank - 1]);
    adjusted[rank - 1] = smallest;
  }
  return adjusted;
}

/** 1 + 1/2 + … + 1/count. */
function harmonicSum(count: number): number {
  let sum = 0;
  for (let k = 1; k <= count; k++) sum += 1 / k;
  return sum;
}
