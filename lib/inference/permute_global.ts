/**
 * The permutation distribution of Moran's I under many definitions of "neighbor" at once.
 *
 * @module
 */
import { checkLengths } from "../statistics/check_lengths.ts";
import { checkWeightSum } from "../statistics/moran.ts";
import { standardize, TIE } from "../statistics/standardize.ts";
import { weightSums } from "../weights/sums.ts";
import type { Weights } from "../weights/weights.ts";
import { visitOrders } from "./all_orders.ts";
import { checkPermutations, checkWorkers, type PermuteOptions } from "./options.ts";
import type { TailCounts } from "./p_value.ts";
import { nearPlaces } from "./near_places.ts";
import { type PairLinks, pairLinks, quadraticForm } from "./pair_links.ts";
import { runJob } from "./run_job.ts";
import { seedFromText } from "./seed.ts";
import { shuffleJob, SHUFFLES_PER_UNIT } from "./shuffle_job.ts";

/** Moran's I of one definition and what it was on the permuted maps. */
export interface GlobalReference extends TailCounts {
  readonly observed: number;
  /**
   * I of each permuted map. Entry p is the same permuted map in every definition of one call. When
   * enumerated, these are all n! orders, the observed one first.
   */
  readonly drawn: Float64Array;
}

/** Up to this many areas all n! orders are counted instead of sampled. */
export const MOST_AREAS_ENUMERATED = 8;

/**
 * Permutes the values over the areas and recomputes Moran's I under each definition.
 *
 * `values` has one finite number for each area; `definitions` are weights of the same areas. With at most
 * 8 areas every order is enumerated and `permutations` is n!. `atLeast` and `atMost` count ties (within
 * 1e-10) in both. Cost: for each permutation one shuffle of n values and one pass over the pairs of each
 * definition.
 *
 * @throws UnfitDataError for fewer than 3 areas, values all equal or not finite, and weights whose sum is not
 * above 0.
 * @throws UsageError for a number of permutations that is not whole, below 99 or above 9,999,999.
 * @throws RangeError when lengths differ or a weight is not finite. Rejects with the signal's reason when aborted.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * const [reference] = await permuteMoran(Float64Array.of(1, 2, 3, 4), [chain]);
 * assert.equal(reference.permutations, 24); // all orders
 * assert.equal(reference.atLeast, 2); // only 1 2 3 4 and 4 3 2 1 are as smooth
 * ```
 */
export async function permuteMoran(
  values: Float64Array,
  definitions: readonly Weights[],
  options: PermuteOptions = {},
): Promise<GlobalReference[]> {
  const permutations = checkPermutations(options.permutations ?? 999);
  if (options.workers !== undefined) checkWorkers(options.workers);
  const { z } = standardize(values);
  const s0 = definitions.map((weights) => totalWeight(values, weights));
  const pairs = definitions.map((weights) => pairLinks(weights, nearPlaces(weights)));
  if (z.length <= MOST_AREAS_ENUMERATED) {
    return pairs.map((each, d) => enumerateOrders(z, each, s0[d]));
  }
  const drawn = definitions.map(() => new Float64Array(permutations));
  const seed = seedFromText(options.seed ?? "nearkin");
  const job = shuffleJob({ z, seed, permutations, definitions: pairs, totals: s0 });
  const parts = await runJob(job, options);
  for (const { unit, sums } of parts.flat()) {
    sums.forEach((each, d) =>
      drawn[d].set(each.map((sum) => sum / s0[d]), unit * SHUFFLES_PER_UNIT)
    );
  }
  return drawn.map((each, d) => compareWithDrawn(job.observed[d] / s0[d], each, false));
}

/**
 * Sum of the weights, checked to go with the values.
 *
 * @throws UnfitDataError for a sum that is not above 0.
 * @throws RangeError when lengths differ or a weight is not finite.
 */
export function totalWeight(values: Float64Array, weights: Weights): number {
  checkLengths(values, weights);
  const { s0 } = weightSums(weights);
  if (!Number.isFinite(s0)) {
    throw new RangeError(`Cannot use weights that sum to ${s0}; each weight is a finite number`);
  }
  checkWeightSum(s0);
  return s0;
}

function enumerateOrders(z: Float64Array, pairs: PairLinks, s0: number): GlobalReference {
  const drawn: number[] = [];
  visitOrders(z, (order) => drawn.push(quadraticForm(pairs, order) / s0));
  return compareWithDrawn(drawn[0], Float64Array.from(drawn), true);
}

/** Counts the drawn values at least and at most the observed one, ties in both. */
export function compareWithDrawn(
  observed: number,
  drawn: Float64Array,
  enumerated: boolean,
): GlobalReference {
  let atLeast = 0, atMost = 0;
  for (let p = 0; p < drawn.length; p++) {
    if (drawn[p] >= observed - TIE) atLeast++;
    if (drawn[p] <= observed + TIE) atMost++;
  }
  return { observed, drawn, atLeast, atMost, permutations: drawn.length, enumerated };
}
