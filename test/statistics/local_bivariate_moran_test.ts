import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { bivariateMoranI } from "../../lib/statistics/bivariate_moran.ts";
import { localBivariateMoran } from "../../lib/statistics/local_bivariate_moran.ts";
import { localMoran } from "../../lib/statistics/local_moran.ts";
import { weightSums } from "../../lib/weights/sums.ts";
import { momentsOf, ordersOf } from "../support/all_orders.ts";
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

Deno.test("localBivariateMoran() has the values worked by hand when four areas stand in a row", () => {
  // zx 1 1 -1 -1; zy 1 -1 1 -1 with lag -1 2 -2 1.
  const x = Float64Array.of(3, 3, 1, 1), y = Float64Array.of(9, 5, 9, 5);
  const { lag, i, expected, variance, quad } = localBivariateMoran(x, y, chainWeights(4));
  assert.deepEqual([...lag], [-1, 2, -2, 1]);
  assert.deepEqual([...i], [-1, 2, 2, -1]);
  assert.deepEqual(quad, ["HL", "HH", "LL", "LH"]);
  // The one neighbor of area 0 has -1, 1 or -1 of the other y: mean -1/3, variance 1 - 1/9.
  assertClose(expected[0], -1 / 3, 1e-14);
  assertClose(variance[0], 8 / 9, 1e-14);
});

// Computed with numpy 2.4.6 from the other 99 areas: SIDS rate 1974-78 against non-white share, rows summing to one.
Deno.test("localBivariateMoran() has the values and moments of dense matrices when areas are counties", () => {
  const { rate74, nw74 } = ncVariables("74");
  const found = localBivariateMoran(rate74, nw74, ncWeights("queen_row"));
  const wanted: readonly (readonly [number, number, number, number])[] = [
    [0, 0.9735333567198595, -0.010646284051600306, 0.16785291493746582],
    [1, 1.6778053712684784, -0.018566621392553665, 0.5519249830187664],
    [50, 0.405903663937737, -0.004409270629282908, 0.027037323952272374],
  ];
  for (const [area, i, expected, variance] of wanted) {
    assertClose(found.i[area], i, 1e-9);
    assertClose(found.expected[area], expected, 1e-9);
    assertClose(found.variance[area], variance, 1e-9);
  }
});

Deno.test("localBivariateMoran() has the exact moments when all orders of the other areas are counted", () => {
  const x = Float64Array.of(2, 7, 1, 8, 2, 8), y = [3, 1, 4, 1, 5, 9], area = 1;
  const weights = unequalWeights(completeWeights(6), "bivariate");
  const found = localBivariateMoran(x, Float64Array.from(y), weights);
  const slow = momentsOf(
    ordersOf(y.filter((_, i) => i !== area)).map((order) => {
      const map = [...order.slice(0, area), y[area], ...order.slice(area)];
      return localBivariateMoran(x, Float64Array.from(map), weights).i[area];
    }),
  );
  assertClose(found.expected[area], slow.mean, 1e-10);
  assertClose(found.variance[area], slow.variance, 1e-10);
});

Deno.test("localBivariateMoran() adds up to S0 times the global I, and is local Moran of one field with itself", () => {
  const x = normalNumbers(20, "x"), y = normalNumbers(20, "y");
  const weights = unequalWeights(gridWeights(4, 5), "sum");
  const sum = localBivariateMoran(x, y, weights).i.reduce((total, each) => total + each, 0);
  assertClose(sum, weightSums(weights).s0 * bivariateMoranI(x, y, weights).value, 1e-12);
  assert.deepEqual(localBivariateMoran(x, x, weights), localMoran(x, weights));
});

Deno.test("localBivariateMoran() has nothing for an area that is alone and refuses a constant field", () => {
  const islandAndPair = {
    offsets: Uint32Array.of(0, 0, 1, 2),
    indices: Uint32Array.of(2, 1),
    values: Float64Array.of(1, 1),
    equalInRows: true,
  };
  const x = Float64Array.of(1, 2, 4);
  const { i, lag, expected, variance, quad } = localBivariateMoran(x, x, islandAndPair);
  for (const column of [i, lag, expected, variance]) assert.ok(Number.isNaN(column[0]));
  assert.equal(quad[0], null);
  const flat = Float64Array.of(1, 1, 1);
  assert.throws(() => localBivariateMoran(x, flat, islandAndPair), UnfitDataError);
  assert.throws(() => localBivariateMoran(x, Float64Array.of(1), islandAndPair), RangeError);
});
