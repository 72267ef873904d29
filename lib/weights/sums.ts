/**
 * The three sums of the weights that the moments of Moran's I and Geary's c are made of.
 *
 * @module
 */
import { compensatedSum } from "./compensated_sum.ts";
import type { Weights } from "./weights.ts";

/** Sums of weights, all 0 or more. */
export interface WeightSums {
  /** Σ w_ij, islands adding nothing. */
  readonly s0: number;
  /** ½ Σ_ij (w_ij + w_ji)². */
  readonly s1: number;
  /** Σ_i (Σ_j w_ij + Σ_j w_ji)². */
  readonly s2: number;
}

/**
 * S0, S1 and S2 of Cliff & Ord 1981 (p. 19). Works for one-way links and unequal pairs too. Sums
 * over areas are compensated. Cost: two passes over the links, three numbers an area.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // Two areas that are each other's neighbor with weight 1.
 * const pair = {
 *   offsets: Uint32Array.of(0, 1, 2),
 *   indices: Uint32Array.of(1, 0),
 *   values: Float64Array.of(1, 1),
 *   equalInRows: true,
 * };
 * assert.deepEqual(weightSums(pair), { s0: 2, s1: 4, s2: 8 });
 * ```
 */
export function weightSums(weights: Weights): WeightSums {
  const { offsets, indices, values } = weights;
  const n = offsets.length - 1;
  const rows = new Float64Array(n), columns = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      rows[i] += values[link];
      columns[indices[link]] += values[link];
    }
  }
  const squares = rows.map((row, i) => (row + columns[i]) * (row + columns[i]));
  return { s0: compensatedSum(rows), s1: sumSquaredPairs(weights), s2: compensatedSum(squares) };
}

/**
 * S1 written as Σ_ij w_ij (w_ij + w_ji). Rows are taken in ascending order, so the place of row i
 * in row j only ever moves ahead: one cursor for each row finds every w_ji without searching.
 */
function sumSquaredPairs({ offsets, indices, values }: Weights): number {
  const n = offsets.length - 1;
  const cursors = offsets.slice(0, n);
  const terms = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      const j = indices[link];
      const end = offsets[j + 1];
      while (cursors[j] < end && indices[cursors[j]] < i) cursors[j]++;
      const isMutual = cursors[j] < end && indices[cursors[j]] === i;
      const reverse = isMutual ? values[cursors[j]] : 0;
      terms[i] += values[link] * (values[link] + reverse);
    }
  }
  return compensatedSum(terms);
}
