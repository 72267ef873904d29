/**
 * Moran's I of regression residuals: is what the fields leave unexplained still clustered?
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { spatialLag } from "../weights/lag.ts";
import { weightSums } from "../weights/sums.ts";
import type { Weights } from "../weights/weights.ts";
import { checkLengths } from "./check_lengths.ts";
import { dot } from "./dot.ts";
import type { LeastSquares } from "./least_squares.ts";
import { checkWeightSum } from "./moran.ts";
import { reverseLag } from "./reverse_lag.ts";

/** Moran's I of residuals with what is needed to judge it. */
export interface ResidualMoranI {
  /** I of the residuals. */
  readonly value: number;
  /** Mean for independent normal errors; below -1 / (n - 1) where the fields themselves are clustered. */
  readonly expected: number;
  /** Variance for independent normal errors. */
  readonly variance: number;
  /** (value - expected) / sqrt(variance); NaN where the variance is 0. */
  readonly z: number;
}

/**
 * Moran's I of the residuals of an ordinary least-squares fit, I = n/S0 · e'We / e'e, with the moments that
 * residuals have (Cliff & Ord 1981, Spatial Processes, p. 203), which are not those of raw values:
 * fitting makes residuals alike less often than chance would. Positive z: neighbors have residuals of the
 * same sign, so something clustered is missing from the fields.
 *
 * With M = 1 - BB' (B an orthonormal basis of the constant and the fields), V = (W + W')/2, k columns in B:
 * mean = n/S0 · tr(MV) / (n - k), second moment = (n/S0)² (tr(MV)² + 2 tr(MVMV)) / ((n - k)(n - k + 2)).
 * The traces come from B and VB alone, so no n × n matrix is formed. With the constant only, they are the
 * moments of Moran's I under normality. Cost: 2 k passes over the links.
 *
 * @throws UnfitDataError where nothing is left unexplained, and for weights whose sum is not above 0.
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * import { leastSquares } from "./least_squares.ts";
 * const chain = {
 *   offsets: Uint32Array.of(0, 1, 3, 5, 6),
 *   indices: Uint32Array.of(1, 0, 2, 1, 3, 2),
 *   values: new Float64Array(6).fill(1),
 *   equalInRows: true,
 * };
 * const trend = { name: "north", values: Float64Array.of(0, 1, 2, 3) };
 * // Residuals 1 -1 -1 1 of a flat fit: two of three pairs differ, I = (-1 + 1 - 1) / 3.
 * const fit = leastSquares(Float64Array.of(8, 6, 6, 8), [trend]);
 * assert.ok(Math.abs(residualMoranI(fit, chain).value + 1 / 3) < 1e-14);
 * ```
 */
export function residualMoranI(fit: LeastSquares, weights: Weights): ResidualMoranI {
  const { residuals, basis } = fit;
  checkLengths(residuals, weights);
  checkSomethingLeft(fit);
  const { s0, s1 } = weightSums(weights);
  checkWeightSum(s0, "Moran's I of the residuals");
  const n = residuals.length, freedom = n - basis.length;
  const scale = n / s0;
  const value = scale * dot(residuals, spatialLag(weights, residuals)) / dot(residuals, residuals);
  const { first, second } = traces(basis, weights, s1);
  const mean = first / freedom;
  const spread = (first * first + 2 * second) / (freedom * (freedom + 2)) - mean * mean;
  const variance = spread > 1e-12 * mean * mean ? scale * scale * spread : 0;
  const expected = scale * mean;
  return {
    value,
    expected,
    variance,
    z: variance > 0 ? (value - expected) / Math.sqrt(variance) : NaN,
  };
}

function checkSomethingLeft({ residuals, fitted, residualVariance }: LeastSquares): void {
  const largest = fitted.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  if (Math.sqrt(residualVariance) > 1e-12 * largest) return;
  throw new UnfitDataError(
    `Cannot test residuals as the fields explain all ${residuals.length} values exactly; leave out fields`,
  );
}

/** tr(MV) and tr(MVMV), from A = B'VB: -tr(A), and tr(VV) - 2 tr(B'VVB) + tr(AA). */
function traces(
  basis: readonly Float64Array[],
  weights: Weights,
  s1: number,
): { first: number; second: number } {
  const turned = basis.map((column) => {
    const received = reverseLag(weights, column);
    return spatialLag(weights, column).map((lag, i) => (lag + received[i]) / 2);
  });
  let first = 0, second = s1 / 2;
  for (let a = 0; a < basis.length; a++) {
    first -= dot(basis[a], turned[a]);
    second -= 2 * dot(turned[a], turned[a]);
    for (let b = 0; b < basis.length; b++) second += dot(basis[a], turned[b]) ** 2;
  }
  return { first, second };
}
