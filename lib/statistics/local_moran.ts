/**
 * Local Moran's I of every area, with its moments when the area keeps its own value.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { conditionalLag } from "./conditional_lag.ts";
import { type Quadrant, quadrantOf } from "./quadrant.ts";
import { standardize } from "./standardize.ts";

/** One entry for each area, in the order of the values; NaN and null where the area is alone. */
export interface LocalMoran {
  /** Standard score of the own value; also for areas that are alone. */
  readonly z: Float64Array;
  /** Weighted sum of the neighbors' standard scores, with the weights as they are. */
  readonly lag: Float64Array;
  /** z times lag; the values sum to S0 times the global I. */
  readonly i: Float64Array;
  /** Mean of `i` when the other n - 1 values are permuted. */
  readonly expected: Float64Array;
  /** Variance of `i` when the other n - 1 values are permuted. */
  readonly variance: Float64Array;
  /** Corner of the Moran scatterplot, whatever the p. */
  readonly quad: readonly (Quadrant | null)[];
}

/**
 * Local Moran's I (Anselin 1995, eq. 12, scaled by the population variance): how much each area is like
 * its neighbors. Positive: alike (high among high, or low among low); negative: unlike.
 *
 * The moments hold the own value and permute the others: with N = n - 1 other values of mean m and
 * variance S² (divisor N - 1), the lag has mean W·m and variance (Σw² - W²/N)·S², W the row's weight sum.
 * `values` has one finite number for each area. Cost: one pass over the links.
 *
 * @throws UnfitDataError for fewer than 3 areas and for values all equal or not finite.
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
 * const { i, quad } = localMoran(Float64Array.of(4, 4, 1), pairAndOne);
 * assert.ok(Math.abs(i[0] - 0.5) < 1e-15); // z = sqrt(1/2) for both
 * assert.deepEqual(quad, ["HH", "HH", null]);
 * assert.ok(Number.isNaN(i[2]));
 * ```
 */
export function localMoran(values: Float64Array, weights: Weights): LocalMoran {
  checkLengths(values, weights);
  const { z } = standardize(values);
  const { lag, total, expected, variance } = conditionalLag(z, weights);
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
