import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { leeL } from "../../lib/statistics/lee.ts";
import { momentsOf, ordersOf } from "../support/all_orders.ts";
import { assertClose } from "../support/close.ts";
import { chainWeights, gridWeights, normalNumbers, unequalWeights } from "../support/maps.ts";
import { ncVariables } from "../support/nc_variables.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { rowStandardized } from "../support/reference.ts";

Deno.test("leeL() has the values worked by hand when four areas stand in a row", () => {
  // zx 1 1 -1 -1 with lag 1 0 0 -1; zy 1 -1 1 -1 with lag -1 2 -2 1; row sums 1 2 2 1, squares 10.
  const x = Float64Array.of(3, 3, 1, 1), y = Float64Array.of(9, 5, 9, 5);
  const plain = leeL(x, y, chainWeights(4));
  assertClose(plain.value, (-1 + 0 + 0 - 1) / 10, 1e-14);
  // b = lag of (1 0 0 -1) = 0 1 -1 0: Σb² · 4 / 3 / 10² = 8 / 300.
  assertClose(plain.variance, 8 / 300, 1e-14);
  // With itself, rows divided by 2 3 3 2: means of x are 1 1/3 -1/3 -1, of y 0 1/3 -1/3 0, rows sum to 1.
  assertClose(leeL(x, y, chainWeights(4), { selfWeight: 1 }).value, (2 / 9) / 4, 1e-14);
});

// Computed with numpy 2.4.6 dense matrices: SIDS rate 1974-78 against non-white share.
Deno.test("leeL() has the values and variances of dense matrices when the areas are counties", () => {
  const { rate74, nw74 } = ncVariables("74");
  const queen = ncWeights("queen_unscaled");
  const found = [
    leeL(rate74, nw74, ncWeights("queen_row")),
    leeL(rate74, nw74, queen),
    leeL(rate74, nw74, queen, { selfWeight: 1 }),
  ];
  const wanted = [
    [0.33586477493250877, 0.002361545105633537],
    [0.30899648033445704, 0.0017511853407878443],
    [0.35727258963313263, 0.002415030680452609],
  ];
  wanted.forEach(([value, variance], at) => {
    assertClose(found[at].value, value, 1e-9);
    assertClose(found[at].variance, variance, 1e-9);
    assertClose(found[at].z, value / Math.sqrt(variance), 1e-9);
  });
});

Deno.test("leeL() has the exact moments when all orders of y are counted", () => {
  const x = Float64Array.of(3, 1, 4, 1, 5, 9), y = [2, 7, 1, 8, 2, 8];
  const weights = unequalWeights(gridWeights(2, 3), "lee");
  for (const options of [{}, { selfWeight: 0.5 }]) {
    const found = leeL(x, Float64Array.from(y), weights, options);
    const slow = momentsOf(
      ordersOf(y).map((order) => leeL(x, Float64Array.from(order), weights, options).value),
    );
    assert.ok(Math.abs(slow.mean - found.expected) < 1e-12);
    assertClose(found.variance, slow.variance, 1e-10);
  }
});

Deno.test("leeL() is symmetric, and between -1 and 1 when rows with a self-weight sum to one", () => {
  const x = normalNumbers(20, "x"), y = normalNumbers(20, "y");
  const weights = unequalWeights(gridWeights(4, 5), "lee");
  const row = rowStandardized(weights);
  assertClose(leeL(x, y, row).value, leeL(y, x, row).value, 1e-12);
  const itself = leeL(x, x, weights, { selfWeight: 1 }).value;
  assert.ok(itself > 0 && itself < 1);
  assertClose(
    leeL(x, x.map((value) => 2 - value), weights, { selfWeight: 1 }).value,
    -itself,
    1e-12,
  );
});

Deno.test("leeL() takes the Pearson correlation when every area looks at itself alone", () => {
  // A self-weight so large that the neighbors vanish leaves r; here Σ zx zy = 2 · √2, r = 1/√2.
  const x = Float64Array.of(1, 1, -1, -1), y = Float64Array.of(2, 0, -2, 0);
  assertClose(leeL(x, y, chainWeights(4), { selfWeight: 1e14 }).value, 1 / Math.sqrt(2), 1e-10);
});

Deno.test("leeL() refuses a constant field, maps without links and a self-weight that is not above 0", () => {
  const x = Float64Array.of(1, 2, 4), chain = chainWeights(3);
  assert.throws(() => leeL(x, Float64Array.of(1, 1, 1), chain), UnfitDataError);
  const none = { ...chainWeights(1), offsets: new Uint32Array(4) }; // one area has no links at all
  assert.throws(() => leeL(x, x, none), /Lee's L as no area has a neighbor/);
  assert.throws(() => leeL(x, x, chain, { selfWeight: 0 }), RangeError);
  assert.throws(() => leeL(x, Float64Array.of(1, 2), chain), RangeError);
});
