/**
 * How each area's neighbors' sum will be judged, before anything is drawn.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { arrangementsOf } from "./arrangement_counts.ts";
import { subsetsOf } from "./subset_counts.ts";

/** Areas by the way they are counted, each list ascending. Areas that are alone are in none. */
export interface LocalRows {
  /** Equal weights and few enough subsets: all are counted. */
  readonly subsets: Uint32Array;
  /** Unequal weights and few enough arrangements: all are counted. */
  readonly arrangements: Uint32Array;
  /** Equal weights: sampled and ranked. */
  readonly ranked: Uint32Array;
  /** Unequal weights: sampled and weighed. */
  readonly weighed: Uint32Array;
}

/** Arrangements up to which an area of unequal weights is enumerated. */
const MOST_ARRANGEMENTS = 20_000;

/**
 * Sorts the given areas (all by default) by the way they are counted: exactly where that takes fewer cases
 * than `permutations`, else by sampling. Cost: one pass over the links.
 */
export function sortRows(
  weights: Weights,
  { permutations, areas }: { permutations: number; areas?: Uint32Array },
): LocalRows {
  const n = weights.offsets.length - 1;
  const rows = { subsets: [], arrangements: [], ranked: [], weighed: [] } as Record<
    keyof LocalRows,
    number[]
  >;
  for (const area of areas ?? Uint32Array.from({ length: n }, (_, i) => i)) {
    const row = rowOf(weights, area);
    if (row.length === 0) continue;
    const equal = row[0] > 0 && row.every((weight) => weight === row[0]);
    if (equal) {
      rows[subsetsOf(n - 1, row.length) < permutations ? "subsets" : "ranked"].push(area);
    } else {
      const few = Math.min(permutations - 1, MOST_ARRANGEMENTS);
      rows[arrangementsOf(n - 1, row.length) <= few ? "arrangements" : "weighed"].push(area);
    }
  }
  return {
    subsets: Uint32Array.from(rows.subsets),
    arrangements: Uint32Array.from(rows.arrangements),
    ranked: Uint32Array.from(rows.ranked),
    weighed: Uint32Array.from(rows.weighed),
  };
}

/** Weights of an area's row scaled so that the largest in size is 1; on this scale ties are judged. */
export function scaledRow(weights: Weights, area: number): Float64Array {
  const row = rowOf(weights, area);
  const largest = row.reduce((max, weight) => Math.max(max, Math.abs(weight)), 0);
  return row.map((weight) => weight / largest);
}

/** Sum of the neighbors' scores under scaled weights. */
export function scaledSum(weights: Weights, area: number, z: Float64Array): number {
  const first = weights.offsets[area];
  return scaledRow(weights, area).reduce(
    (sum, weight, m) => sum + weight * z[weights.indices[first + m]],
    0,
  );
}

function rowOf({ offsets, values }: Weights, area: number): Float64Array {
  return values.subarray(offsets[area], offsets[area + 1]);
}
