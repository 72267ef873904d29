/**
 * Bivariate local Moran's I: each area's own value against its neighbors' values of another field.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { conditionalLag } from "./conditional_lag.ts";
import { type Quadrant, quadrantOf } from "./quadrant.ts";
import { standardize } from "./standardize.ts";

/** One entry for each area, in the order of the values; NaN and null where the area is alone. */
export interface LocalBivariateMoran {
  /** Standard score of the own x; also for areas that are alone. */
  readonly z: Float64Array;
  /** Weighted sum of the neighbors' standard scores of y, with the weights as they are. */
  readonly lag: Float64Array;
  /** z times lag; the values sum to S0 times the global bivariate I. */
  readonly i: Float64Array;
  /** Mean of `i` when y is permuted over the other n - 1 areas. */
  readonly expected: Float64Array;
  /** Variance of `i` when y is permuted over the other n - 1 areas. */
  readonly variance: Float64Array;
  /** Own x against the mean of x, then the neighbors' y against the mean of y. */
  readonly quad: readonly (Quadrant | null)[];
}

/**
 * Bivariate local Moran's I: zx_i Σ_j w_ij zy_j, the local form (Anselin 1995) of {@link bivariateMoranI}.
 * Positive: high x among high y, or low among low; negative: the two differ.
 *
 * The moments hold x_i and permute y over the other areas; the area's own y stays out of it, as it does
 * of the lag. Both fields have one finite number for each area. Cost: one pass over the links.
 *
 * @throws UnfitDataError for fewer than 3 areas and a field all equal or not finite.
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const pairAndOne = {
 *   offsets: Uint32Array.of(0, 1, 2, 2),
 *   indices: Uint32Array.of(1, 0),
 *   values: Float64Array.of(1, 1),
 *   equalInRows: true,
 * };
 * // zx is h h -2h with h = sqrt(1/2); zy is 2h -h -h.
 * const { i, quad } = localBivariateMoran(Float64Array.of(4, 4, 1), Float64Array.of(9, 3, 3), pairAndOne);
 * assert.ok(Math.abs(i[0] + 0.5) < 1e-15 && Math.abs(i[1] - 1) < 1e-15);
 * assert.deepEqual(quad, ["HL", "HH", null]);
 * ```
 */
export function localBivariateMoran(
  x: Float64Array,
  y: Float64Array,
  weights: Weights,
): LocalBivariateMoran {
  checkLengths(x, weights);
  checkLengths(y, weights);
  const { z } = standardize(x);
  const { lag, total, expected, variance } = conditionalLag(standardize(y).z, weights);
  const meanLag = (area: number) => total[area] === 0 ? NaN : lag[area] / total[area];
  return {
    z,
    lag,
    i: lag.map((sum, area) => z[area] * sum),
    expected: expected.map((mean, area) => z[area] * mean),
    variance: variance.map((spread, area) => z[area] ** 2 * spread),
    quad: Array.from(z, (own, area) => quadrantOf(own, meanLag(area))),
  };
}
