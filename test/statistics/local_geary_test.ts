import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { gearyC } from "../../lib/statistics/geary.ts";
import { localGeary } from "../../lib/statistics/local_geary.ts";
import { weightSums } from "../../lib/weights/sums.ts";
import { momentsOf, ordersOf } from "../support/all_orders.ts";
import { assertClose } from "../support/close.ts";
import { chainWeights, completeWeights, normalNumbers, unequalWeights } from "../support/maps.ts";
import { ncVariables } from "../support/nc_variables.ts";
import { ncWeights } from "../support/nc_weights.ts";
import {
  numberColumn,
  referenceCase,
  rowStandardized,
  textColumn,
  weightsOfListFile,
  weightsOfMatrix,
} from "../support/reference.ts";

Deno.test("localGeary() has the values and moments worked by hand when four areas stand in a row", () => {
  // Values 1 2 4 5: m2 = 10 / 4. Area 1 differs by 1 and by 2 from its neighbors: c = 5 / 2.5.
  const { c, expected, variance } = localGeary(Float64Array.of(1, 2, 4, 5), chainWeights(4));
  assertClose(c[1], 2, 1e-14);
  // From area 1 the others are 1, 4 and 9 away, squared. Two of them: 5, 10 or 13, in units of 2.5: 2, 4, 5.2.
  assertClose(expected[1], 11.2 / 3, 1e-14);
  assertClose(variance[1], (4 + 16 + 27.04) / 3 - (11.2 / 3) ** 2, 1e-13);
});

function assertC(found: Float64Array, expected: readonly number[], isAlone: readonly boolean[]) {
  expected.forEach((c, i) => {
    if (isAlone[i]) assert.ok(Number.isNaN(found[i]));
    else assertClose(found[i], c, 1e-9, `c of ${i}`);
  });
}

// Source: nc-local-*.json and eire-local-open.json, computed with numpy dense matrices.
Deno.test("localGeary() has the values of dense matrices when areas are counties", () => {
  const { rate74, nw74 } = ncVariables("74");
  const byQueen = referenceCase("nc-local-queen_row").expected;
  assertC(localGeary(nw74, ncWeights("queen_row")).c, byQueen.local_c, []);
  const byList = referenceCase("nc-local-cressie_chan_unscaled").expected;
  const alone = byList.quadrant.map((quadrant: string) => quadrant === "none");
  assertC(localGeary(rate74, ncWeights("cressie_chan_unscaled")).c, byList.local_c, alone);
  const eire = rowStandardized(
    weightsOfListFile("eire_neighbours_cliff_ord.json", textColumn("eire_table.csv", "county")),
  );
  const { local_c } = referenceCase("eire-local-open").expected;
  assertC(localGeary(numberColumn("eire_table.csv", "OWNCONS"), eire).c, local_c, []);
});

// Computed with numpy 2.4.6 from the other 99 values one by one: SIDS rate 1974-78, rows summing to one.
Deno.test("localGeary() has the conditional variance of dense matrices when areas are counties", () => {
  const { variance } = localGeary(ncVariables("74").rate74, ncWeights("queen_row"));
  assertClose(variance[0], 4.117906878449564, 1e-9);
  assertClose(variance[1], 6.813265413362419, 1e-9);
  assertClose(variance[50], 0.5795555209150713, 1e-9);
});

// Source: enum-*.json, all orders of the other values counted one by one.
Deno.test("localGeary() has the exact conditional mean when all orders are counted", () => {
  for (const map of ["grid3x3_rook", "invdist6", "island7", "knn7_asym", "path6"]) {
    const { inputs, expected } = referenceCase(`enum-${map}`);
    const found = localGeary(Float64Array.from(inputs.x), weightsOfMatrix(inputs.W));
    for (const area of expected.local_moran_conditional) {
      if (Number.isNaN(found.c[area.i])) continue;
      assert.ok(Math.abs(found.c[area.i] - area.local_c) < 1e-10);
      assert.ok(Math.abs(found.expected[area.i] - area.local_c_cond_mean) < 1e-10);
    }
  }
});

Deno.test("localGeary() has the exact conditional variance when all orders are counted", () => {
  const values = [3, 1, 4, 1, 5, 9], area = 4;
  const weights = unequalWeights(completeWeights(6), "local c");
  const found = localGeary(Float64Array.from(values), weights);
  const others = values.filter((_, i) => i !== area);
  const slow = momentsOf(
    ordersOf(others).map((order) => {
      const map = [...order.slice(0, area), values[area], ...order.slice(area)];
      return localGeary(Float64Array.from(map), weights).c[area];
    }),
  );
  assertClose(found.expected[area], slow.mean, 1e-10);
  assertClose(found.variance[area], slow.variance, 1e-10);
});

// Source: invariances-eire.json, algebraic identity.
Deno.test("localGeary() adds up to 2 S0 n / (n - 1) times the global c", () => {
  const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0);
  const { inputs, expected } = referenceCase("invariances-eire");
  const binary = weightsOfListFile("eire_neighbours_cliff_ord.json");
  assertClose(sum(localGeary(Float64Array.from(inputs.x), binary).c), expected.sum_local_c_binary);
  const values = normalNumbers(15, "sum"), weights = unequalWeights(chainWeights(15), "sum");
  const whole = 2 * weightSums(weights).s0 * 15 / 14 * gearyC(values, weights).value;
  assertClose(sum(localGeary(values, weights).c), whole, 1e-12);
});

Deno.test("localGeary() has a variance of exactly 0 when nothing can vary", () => {
  const { variance } = localGeary(normalNumbers(9, "complete"), completeWeights(9));
  assert.deepEqual([...variance], new Array(9).fill(0));
  // Area 1 is 2 away from whatever stands next to it: 0 and 4 are equally far from 2.
  assert.equal(localGeary(Float64Array.of(0, 2, 4, 0, 4), chainWeights(5)).variance[1], 0);
});

Deno.test("localGeary() refuses constant values and wrong lengths", () => {
  assert.throws(() => localGeary(Float64Array.of(1, 1, 1), chainWeights(3)), UnfitDataError);
  assert.throws(() => localGeary(Float64Array.of(1, 2), chainWeights(3)), RangeError);
});
