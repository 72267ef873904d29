/**
 * Lee's L: how far two fields agree after both are smoothed over the neighbors.
 *
 * @module
 */
import { spatialLag } from "../weights/lag.ts";
import type { Weights } from "../weights/weights.ts";
import { varianceOfOrders } from "./bivariate_moran.ts";
import { checkLengths } from "./check_lengths.ts";
import { dot } from "./dot.ts";
import { checkWeightSum } from "./moran.ts";
import { reverseLag } from "./reverse_lag.ts";
import { standardize } from "./standardize.ts";

/** Options of {@link leeL}. */
export interface LeeOptions {
  /**
   * Weight of each area in its own neighborhood. With it, `weights` are taken as they are before rows are
   * scaled; the self-weight is added to every row, and every row is then divided by its sum.
   * @default no self-weight, weights used as they are
   */
  readonly selfWeight?: number;
}

/** L with what is needed to judge it. */
export interface LeeL {
  /** L of the two fields. */
  readonly value: number;
  /** Mean over all orders of y against a fixed x: 0. */
  readonly expected: number;
  /** Variance over all orders of y against a fixed x. */
  readonly variance: number;
  /** value / sqrt(variance); NaN where the variance is 0. */
  readonly z: number;
}

/**
 * Lee's L (Lee 2001, Journal of Geographical Systems 3:369-385): the cross-product of two smoothed
 * fields, which is high only where the fields go together and both are clustered. It separates "alike
 * in each place" (r) from "alike as maps".
 *
 * L = n / Σ_i (Σ_j w_ij)² · Σ_i (Σ_j w_ij zx_j)(Σ_j w_ij zy_j) / sqrt(Σ zx² Σ zy²). Positive: the smoothed
 * maps agree; negative: they mirror each other. Symmetric in x and y. Mostly between -1 and 1 where
 * rows sum to 1. Both fields have one finite number for each area; L is the same for a + b·x, b above 0.
 * Areas without a neighbor add nothing, unless they have a self-weight.
 *
 * Null: all orders of y against a fixed x, with mean 0 and exact variance, as for
 * {@link bivariateMoranI}, and with the same caution. Cost: three passes over the links.
 *
 * @throws UnfitDataError for fewer than 3 areas, a field all equal or not finite, and weights that are
 * all 0.
 * @throws RangeError when lengths differ, and for a self-weight that is not above 0.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * // zx is 1 1 -1 -1 with lag 1 0 0 -1, row sums 1 2 2 1: L of x with itself = (1 + 1) / 10.
 * const x = Float64Array.of(3, 3, 1, 1);
 * assert.equal(leeL(x, x, chain).value, 0.2);
 * ```
 */
export function leeL(
  x: Float64Array,
  y: Float64Array,
  weights: Weights,
  options: LeeOptions = {},
): LeeL {
  checkLengths(x, weights);
  checkLengths(y, weights);
  const zx = standardize(x).z, zy = standardize(y).z;
  const { smooth, gather } = smoother(weights, options.selfWeight);
  const rows = smooth(new Float64Array(zx.length).fill(1));
  const scale = dot(rows, rows);
  checkWeightSum(scale, "Lee's L");
  const smoothX = smooth(zx);
  const value = dot(smoothX, smooth(zy)) / scale;
  const variance = varianceOfOrders(gather(smoothX)) / (scale * scale);
  return { value, expected: 0, variance, z: variance > 0 ? value / Math.sqrt(variance) : NaN };
}

/** The weighted sum over each neighborhood, and its transpose. */
interface Smoother {
  readonly smooth: (values: Float64Array) => Float64Array;
  readonly gather: (values: Float64Array) => Float64Array;
}

function smoother(weights: Weights, self: number | undefined): Smoother {
  if (self === undefined) {
    return {
      smooth: (values) => spatialLag(weights, values),
      gather: (values) => reverseLag(weights, values),
    };
  }
  if (!(self > 0 && self < Infinity)) {
    throw new RangeError(
      `Cannot weigh each area with ${self} in its own neighborhood; give more than 0`,
    );
  }
  const sums = spatialLag(weights, new Float64Array(weights.offsets.length - 1).fill(1));
  const shares = sums.map((sum) => 1 / (sum + self));
  return {
    smooth: (values) =>
      spatialLag(weights, values).map((lag, i) => (lag + self * values[i]) * shares[i]),
    gather: (values) => {
      const shared = values.map((value, i) => value * shares[i]);
      return reverseLag(weights, shared).map((sum, j) => sum + self * shared[j]);
    },
  };
}
