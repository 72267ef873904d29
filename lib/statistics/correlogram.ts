/**
 * The correlogram: Moran's I at one distance after another.
 *
 * @module
 */
import { mutual } from "../neighbors/combine.ts";
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { type MoranI, moranI } from "./moran.ts";
import { standardize } from "./standardize.ts";

/** One step of a correlogram. */
export interface CorrelogramStep {
  /** Pairs of areas at this distance or order, a pair linked both ways counted once. */
  readonly pairs: number;
  /** Moran's I over these pairs with its moments; null where no areas are this far apart. */
  readonly moranI: MoranI | null;
}

/**
 * Spatial correlogram (Sokal & Oden 1978, Biological Journal of the Linnean Society 10:199-228):
 * Moran's I of the same values for each of several weights, one for every band of distance, order of
 * contiguity or number of neighbors. One wants it to see how far likeness reaches: I falls with
 * distance and meets its expectation where it ends.
 *
 * `bands` are exclusive (a pair is in one of them) where steps should be read as distances; nothing here
 * depends on it. `values` has one finite number for each area, and all bands are of these areas. The
 * steps are not independent, so their z are for reading, and envelopes need permutations.
 * Cost: two passes over the links of every band.
 *
 * @returns One step for each band, in their order.
 * @throws UnfitDataError for fewer than 3 areas and for values all equal or not finite.
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const near = {
 *   offsets: Uint32Array.of(0, 1, 3, 4),
 *   indices: Uint32Array.of(1, 0, 2, 1),
 *   values: new Float64Array(4).fill(1),
 *   equalInRows: true,
 * };
 * const far = {
 *   offsets: Uint32Array.of(0, 1, 1, 2),
 *   indices: Uint32Array.of(2, 0),
 *   values: new Float64Array(2).fill(1),
 *   equalInRows: true,
 * };
 * // Values 1 2 3 in a row: the ends are opposites, and the middle is the mean.
 * const steps = correlogram(Float64Array.of(1, 2, 3), [near, far]);
 * assert.deepEqual(steps.map(({ pairs }) => pairs), [2, 1]);
 * assert.ok(Math.abs(steps[1].moranI!.value + 1.5) < 1e-15);
 * ```
 */
export function correlogram(
  values: Float64Array,
  bands: readonly Weights[],
): readonly CorrelogramStep[] {
  standardize(values); // refuses unfit values even where every band is empty
  return bands.map((band) => {
    checkLengths(values, band);
    const pairs = countPairs(band);
    return { pairs, moranI: pairs === 0 ? null : moranI(values, band) };
  });
}

function countPairs(band: Weights): number {
  return band.indices.length - mutual(band).indices.length / 2;
}
