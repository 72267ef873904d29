/**
 * The distribution of Moran's I under any null that can be simulated, not only shuffled values.
 *
 * @module
 */
import { standardize } from "../statistics/standardize.ts";
import type { Weights } from "../weights/weights.ts";
import { type NullModel, visitNullMaps } from "./null_maps.ts";
import { checkPermutations, type PermuteOptions } from "./options.ts";
import { compareWithDrawn, type GlobalReference, totalWeight } from "./permute_global.ts";
import { pairLinks, quadraticForm } from "./pair_links.ts";

/**
 * Compares Moran's I of `values` under each definition with that of maps simulated under a null.
 *
 * The null is a strategy: `shuffledMaps`, or maps of constant risk, or of an autoregressive process. Each map is
 * standardized anew, so a null may change mean and variance: cases drawn from populations at constant risk, say,
 * turned into the same rates as the values. Map p is the same in every definition. Cost: for each map, making it and
 * one pass over the pairs of each definition, in this thread.
 *
 * @throws UnfitDataError for values or simulated maps that are all equal or not finite, and for weights whose sum is
 * not above 0.
 * @throws UsageError for a number of maps (`permutations`) that is not whole, below 99 or above 9,999,999.
 * @throws RangeError when lengths differ or a weight is not finite. Rejects with the signal's reason when aborted.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * import { shuffledMaps } from "./null_maps.ts";
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * const values = Float64Array.of(1, 2, 3, 4);
 * const [reference] = await simulateMoran(values, [chain], shuffledMaps(values));
 * assert.equal(reference.permutations, 999);
 * assert.ok(Math.abs(reference.atLeast / 999 - 2 / 24) < 0.04); // as enumerated: 2 of 24 orders
 * ```
 */
export async function simulateMoran(
  values: Float64Array,
  definitions: readonly Weights[],
  model: NullModel<Float64Array>,
  options: PermuteOptions = {},
): Promise<GlobalReference[]> {
  const maps = checkPermutations(options.permutations ?? 999);
  const statistics = definitions.map((weights) => statisticUnder(values, weights));
  const { z } = standardize(values);
  const drawn = definitions.map(() => new Float64Array(maps));
  await visitNullMaps(model, (map, p) => {
    const simulated = standardize(map).z;
    statistics.forEach((statistic, d) => drawn[d][p] = statistic(simulated));
  }, options);
  return statistics.map((statistic, d) => compareWithDrawn(statistic(z), drawn[d], false));
}

/** Moran's I of standard scores under one definition, its weights checked and folded once. */
function statisticUnder(values: Float64Array, weights: Weights): (z: Float64Array) => number {
  const s0 = totalWeight(values, weights);
  const pairs = pairLinks(weights);
  return (z) => {
    if (z.length !== values.length) {
      throw new RangeError(
        `Cannot compare ${values.length} values with ${z.length} simulated ones`,
      );
    }
    return quadraticForm(pairs, z) / s0;
  };
}
