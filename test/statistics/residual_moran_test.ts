import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { type LeastSquares, leastSquares } from "../../lib/statistics/least_squares.ts";
import { moranI } from "../../lib/statistics/moran.ts";
import { residualMoranI } from "../../lib/statistics/residual_moran.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { momentsOf } from "../support/all_orders.ts";
import { assertClose } from "../support/close.ts";
import {
  chainWeights,
  completeWeights,
  gridWeights,
  normalNumbers,
  unequalWeights,
} from "../support/maps.ts";
import { ncVariables } from "../support/nc_variables.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { numberColumn } from "../support/reference.ts";

Deno.test("residualMoranI() has the value and moments worked by hand when a trend is taken out of three areas", () => {
  // One degree of freedom: whatever the values, residuals are a multiple of 1 -2 1, so I cannot vary.
  // Σ w e e = 2 (-2 - 2) = -8, Σe² = 6: I = 3 / 4 · -8 / 6 = -1.
  const trend = { name: "trend", values: Float64Array.of(0, 1, 2) };
  const found = residualMoranI(leastSquares(Float64Array.of(1, 5, 2), [trend]), chainWeights(3));
  assertClose(found.value, -1, 1e-13);
  assertClose(found.expected, -1, 1e-13);
  assert.equal(found.variance, 0);
  assert.ok(Number.isNaN(found.z));
});

// Computed with numpy 2.4.6, traces of n x n matrices: SIDS rate 1974-78 by non-white share, births and easting.
Deno.test("residualMoranI() has the value and moments of dense matrices when the areas are counties", () => {
  const { rate74, nw74 } = ncVariables("74");
  const fit = leastSquares(rate74, [
    { name: "nw74", values: nw74 },
    { name: "births", values: numberColumn("nc.csv", "BIR74") },
    { name: "east", values: numberColumn("nc.csv", "east") },
  ]);
  const byRow = residualMoranI(fit, ncWeights("queen_row"));
  assertClose(byRow.value, -0.014676746675029974, 1e-9);
  assertClose(byRow.expected, -0.026647246756252366, 1e-9);
  assertClose(byRow.variance, 0.0040319704098969525, 1e-9);
  assertClose(byRow.z, 0.18851834820427144, 1e-9);
  const plain = residualMoranI(fit, ncWeights("queen_unscaled"));
  assertClose(plain.value, -0.02363849400991374, 1e-9);
  assertClose(plain.expected, -0.02388546261523677, 1e-9);
  assertClose(plain.variance, 0.0036501847204561556, 1e-9);
});

Deno.test("residualMoranI() is Moran's I with its moments under normality when no field explains", () => {
  const values = normalNumbers(20, "plain"), weights = unequalWeights(gridWeights(4, 5), "plain");
  const found = residualMoranI(leastSquares(values, []), weights);
  const raw = moranI(values, weights);
  assertClose(found.value, raw.value, 1e-12);
  assertClose(found.expected, raw.expected, 1e-12);
  assertClose(found.variance, raw.varianceNormality, 1e-12);
});

/**
 * Points on a sphere over which every polynomial up to degree 4 averages as over the whole sphere (spherical designs;
 * Delsarte, Goethals & Seidel 1977): hexagon, icosahedron, 24-cell. Normal errors leave residuals in a direction that is
 * uniform on the sphere, and I is a quadratic form in it, so mean and variance over these few points are exact.
 */
function sphericalDesign(dimension: 2 | 3 | 4): number[][] {
  const signs = [1, -1];
  if (dimension === 2) {
    return [0, 1, 2, 3, 4, 5].map((k) => [Math.cos(k * Math.PI / 3), Math.sin(k * Math.PI / 3)]);
  }
  const pairs = signs.flatMap((a) => signs.map((b) => [a, b]));
  if (dimension === 3) {
    const golden = (1 + Math.sqrt(5)) / 2;
    return pairs.flatMap(([a, b]) => [
      [0, a, b * golden],
      [a, b * golden, 0],
      [b * golden, 0, a],
    ]);
  }
  const places = [[0, 1], [0, 2], [0, 3], [1, 2], [1, 3], [2, 3]];
  return places.flatMap(([first, second]) =>
    pairs.map(([a, b]) => [0, 1, 2, 3].map((at) => at === first ? a : at === second ? b : 0))
  );
}

/** Columns at right angles that fill up what the basis of a fit leaves (Gram and Schmidt). */
function complement({ basis, residuals }: LeastSquares): Float64Array[] {
  const n = residuals.length, columns = [...basis];
  for (let start = 0; start < n; start++) {
    let column = Float64Array.from({ length: n }, (_, i) => i === start ? 1 : 0);
    for (const other of [...columns, ...columns]) {
      const share = column.reduce((sum, each, i) => sum + each * other[i], 0);
      column = column.map((each, i) => each - share * other[i]);
    }
    const length = Math.hypot(...column);
    if (length > 1e-6) columns.push(column.map((each) => each / length));
  }
  return columns.slice(basis.length);
}

function assertExactMoments(fit: LeastSquares, weights: Weights): void {
  const directions = complement(fit);
  const found = residualMoranI(fit, weights);
  const slow = momentsOf(
    sphericalDesign(directions.length as 2 | 3 | 4).map((point) => {
      const residuals = fit.residuals.map((_, i) =>
        point.reduce((sum, share, k) => sum + share * directions[k][i], 0)
      );
      return residualMoranI({ ...fit, residuals }, weights).value;
    }),
  );
  assertClose(found.expected, slow.mean, 1e-10);
  assertClose(found.variance, slow.variance, 1e-10);
}

Deno.test("residualMoranI() has the exact moments when all residuals of a small regression are counted", () => {
  for (const [count, n] of [[0, 5], [1, 4], [1, 6], [2, 6], [2, 7], [3, 6]]) {
    const predictors = Array.from({ length: count }, (_, k) => ({
      name: `x${k}`,
      values: normalNumbers(n, `x${k}`),
    }));
    const fit = leastSquares(normalNumbers(n, "y"), predictors);
    assertExactMoments(fit, chainWeights(n));
    assertExactMoments(fit, unequalWeights(completeWeights(n), "residuals"));
  }
});

Deno.test("residualMoranI() refuses a perfect fit, maps without links and wrong lengths", () => {
  const north = { name: "north", values: Float64Array.of(1, 2, 3, 5) };
  const exact = leastSquares(north.values.map((value) => 7 - 3 * value), [north]);
  assert.throws(() => residualMoranI(exact, chainWeights(4)), UnfitDataError);
  const fit = leastSquares(Float64Array.of(1, 4, 2, 2), [north]);
  const none = { ...chainWeights(1), offsets: new Uint32Array(5) }; // one area has no links at all
  assert.throws(() => residualMoranI(fit, none), /residuals as no area has a neighbor/);
  assert.throws(() => residualMoranI(fit, chainWeights(3)), RangeError);
});
