import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { bivariateMoranI } from "../../lib/statistics/bivariate_moran.ts";
import { moranI } from "../../lib/statistics/moran.ts";
import { assertClose } from "../support/close.ts";
import { chainWeights, gridWeights, normalNumbers, unequalWeights } from "../support/maps.ts";
import { ncVariables } from "../support/nc_variables.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { referenceCase, weightsOfMatrix } from "../support/reference.ts";

Deno.test("bivariateMoranI() has the value and moments worked by hand when four areas stand in a row", () => {
  // zx 1 1 -1 -1; zy 1 -1 1 -1 with lag -1 2 -2 1: Σ zx lag = -1 + 2 + 2 - 1 = 2; I = 2 / 6.
  const x = Float64Array.of(3, 3, 1, 1), y = Float64Array.of(9, 5, 9, 5);
  const found = bivariateMoranI(x, y, chainWeights(4));
  assertClose(found.value, 1 / 3, 1e-14);
  assert.equal(found.expected, 0);
  // a = lag of zx = 1 0 0 -1: Σ(a - 0)² · 4 / 3 / 6² = 8 / 108.
  assertClose(found.variance, 8 / 108, 1e-14);
  assertClose(found.z, 1 / 3 / Math.sqrt(8 / 108), 1e-14);
  assert.equal(found.correlation, 0);
});

// Source: nc-bivariate-open.json, computed with numpy dense matrices; definition of Wartenberg 1985.
Deno.test("bivariateMoranI() has the values of dense matrices in both directions when the areas are counties", () => {
  const { rate74, nw74 } = ncVariables("74"), weights = ncWeights("queen_row");
  const { expected } = referenceCase("nc-bivariate-open");
  const there = bivariateMoranI(rate74, nw74, weights);
  assertClose(there.value, expected.I_xy, 1e-9);
  assertClose(bivariateMoranI(nw74, rate74, weights).value, expected.I_yx, 1e-9);
  assertClose(there.correlation, expected.pearson_r, 1e-9);
  assertClose(-there.correlation / 99, expected.E_under_random_pairing, 1e-9);
  assertClose(there.variance, 0.004021228177503474, 1e-9); // numpy 2.4.6: linear in the permuted y
});

// Source: enum-bivariate-open.json, all 720 orders counted one by one.
Deno.test("bivariateMoranI() has the exact moments when all orders of y are counted", () => {
  const { inputs, expected } = referenceCase("enum-bivariate-open");
  const found = bivariateMoranI(
    Float64Array.from(inputs.x),
    Float64Array.from(inputs.y),
    weightsOfMatrix(inputs.W),
  );
  assertClose(found.value, expected.observed, 1e-10);
  assertClose(found.correlation, expected.pearson_r, 1e-10);
  assert.ok(Math.abs(found.expected - expected.permute_y.mean) < 1e-10);
  assertClose(found.variance, expected.permute_y.variance, 1e-10);
});

Deno.test("bivariateMoranI() is Moran's I when both fields are the same", () => {
  const values = normalNumbers(20, "same"), weights = unequalWeights(gridWeights(4, 5), "same");
  assertClose(bivariateMoranI(values, values, weights).value, moranI(values, weights).value, 1e-12);
});

Deno.test("bivariateMoranI() has no z when every area receives the same", () => {
  // On a ring of four, the two neighbors of every area cancel: one has 1, the other -1.
  const ring = weightsOfMatrix([[0, 1, 0, 1], [1, 0, 1, 0], [0, 1, 0, 1], [1, 0, 1, 0]]);
  const found = bivariateMoranI(Float64Array.of(1, 1, -1, -1), Float64Array.of(4, 1, 2, 8), ring);
  assert.equal(found.variance, 0);
  assert.ok(Number.isNaN(found.z));
});

Deno.test("bivariateMoranI() refuses a constant field and wrong lengths", () => {
  const x = Float64Array.of(1, 2, 3), flat = Float64Array.of(1, 1, 1);
  assert.throws(() => bivariateMoranI(flat, x, chainWeights(3)), UnfitDataError);
  assert.throws(() => bivariateMoranI(x, flat, chainWeights(3)), UnfitDataError);
  assert.throws(() => bivariateMoranI(x, Float64Array.of(1, 2), chainWeights(3)), RangeError);
});
