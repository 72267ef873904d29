/**
 * Exact local counts: every case instead of a sample.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { arrangementsOf, countArrangements } from "./arrangement_counts.ts";
import { scaleRows } from "./local_rows.ts";
import type { PermuteOptions } from "./options.ts";
import { createPace } from "./pace.ts";
import { type PairTerm, pairTerm } from "./pair_term.ts";
import type { Seed } from "./seed.ts";
import { openSubsetCounter, smallerSide, subsetsOf } from "./subset_counts.ts";
import type { Ledger } from "./sum_counts.ts";

/** Some areas to be counted in one way. */
export interface CountingTask {
  /** Standard scores of all areas. */
  readonly z: Float64Array;
  readonly weights: Weights;
  readonly term: PairTerm;
  readonly seed: Seed;
  /** The areas to count, ascending; at least one, none of them alone. */
  readonly areas: Uint32Array;
  readonly options: PermuteOptions & { readonly permutations: number };
}

/** Enters the counts over all subsets of neighbors, for rows of equal weights. Cost: see `openSubsetCounter`. */
export async function enumerateSubsets(ledger: Ledger, task: CountingTask): Promise<void> {
  const { z, weights, areas } = task;
  const pace = createPace(task.options);
  const { offsets, observed } = scaleRows(weights, areas, task);
  const neighbors = areas.map((_, a) => offsets[a + 1] - offsets[a]);
  const largest = neighbors.reduce((max, k) => Math.max(max, smallerSide(z.length, k)), 0);
  const opening = openSubsetCounter(z, largest);
  let opened = opening.next();
  for (; !opened.done; opened = opening.next()) await pace(0);
  for (const [a, area] of areas.entries()) {
    ledger.enter(area, {
      ...opened.value.count(area, neighbors[a], observed[a]),
      permutations: subsetsOf(z.length - 1, neighbors[a]),
      enumerated: true,
    });
    await pace(a / areas.length);
  }
}

/** Enters the counts over all ordered ways to give other areas to the weights of a row. Cost: all of them. */
export async function enumerateArrangements(ledger: Ledger, task: CountingTask): Promise<void> {
  const { z, weights, term, areas } = task;
  const pace = createPace(task.options);
  const rows = scaleRows(weights, areas, task);
  for (const [a, area] of areas.entries()) {
    const row = rows.weights.subarray(rows.offsets[a], rows.offsets[a + 1]);
    const terms = z.map((score) => pairTerm(term, z[area], score));
    ledger.enter(area, {
      ...countArrangements(terms, { area, weights: row, observed: rows.observed[a] }),
      permutations: arrangementsOf(z.length - 1, row.length),
      enumerated: true,
    });
    await pace(a / areas.length);
  }
}
