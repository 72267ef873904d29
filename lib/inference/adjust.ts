/**
 * p-values adjusted for the number of areas tested.
 *
 * @module
 */

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
 * assert.deepEqual(adjustP(p, "bonferroni"), Float64Array.of(0.02, NaN, 0.08));
 * assert.deepEqual(adjustP(p, "bh"), Float64Array.of(0.02, NaN, 0.04));
 * ```
 */
export function adjustP(p: Float64Array, method: Adjustment): Float64Array {
  for (let i = 0; i < p.length; i++) {
    if (p[i] < 0 || p[i] > 1) {
      throw new RangeError(`Cannot adjust ${p[i]} as a p lies between 0 and 1`);
    }
  }
  if (method === "none") return p.slice();
  const tested = ascendingOrder(p);
  if (method === "bonferroni") return p.map((value) => Math.min(1, value * tested.length));
  return method === "holm" ? stepDown(p, tested) : stepUp(p, tested, method);
}

/** Positions of all p that are not NaN, smallest p first. */
function ascendingOrder(p: Float64Array): Uint32Array {
  return Uint32Array.from(p.keys()).filter((i) => !Number.isNaN(p[i])).sort((a, b) => p[a] - p[b]);
}

/** Holm: the smallest of m counts m times, the next m - 1 times, and none less than the one before. */
function stepDown(p: Float64Array, ascending: Uint32Array): Float64Array {
  const adjusted = new Float64Array(p.length).fill(NaN);
  let largest = 0;
  ascending.forEach((position, rank) => {
    largest = Math.max(largest, Math.min(1, (ascending.length - rank) * p[position]));
    adjusted[position] = largest;
  });
  return adjusted;
}

/** Benjamini and coauthors: from the largest p down, m / rank times p, and none more than the one after. */
function stepUp(p: Float64Array, ascending: Uint32Array, method: "bh" | "by"): Float64Array {
  const adjusted = new Float64Array(p.length).fill(NaN);
  const count = ascending.length;
  let dependence = 1;
  if (method === "by") { for (let k = 2; k <= count; k++) dependence += 1 / k; }
  let smallest = 1;
  for (let rank = count; rank >= 1; rank--) {
    const position = ascending[rank - 1];
    smallest = Math.min(smallest, dependence * count / rank * p[position]);
    adjusted[position] = smallest;
  }
  return adjusted;
}
