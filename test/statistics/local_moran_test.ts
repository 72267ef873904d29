import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { localMoran } from "../../lib/statistics/local_moran.ts";
import { moranI } from "../../lib/statistics/moran.ts";
import { weightSums } from "../../lib/weights/sums.ts";
import { assertClose } from "../support/close.ts";
import {
  chainWeights,
  completeWeights,
  gridWeights,
  normalNumbers,
  unequalWeights,
} from "../support/maps.ts";
import { ncWeights } from "../support/nc_weights.ts";
import {
  numberColumn,
  referenceCase,
  rowStandardized,
  textColumn,
  weightsOfListFile,
  weightsOfMatrix,
} from "../support/reference.ts";

// deno-lint-ignore no-explicit-any
function assertLocal(found: ReturnType<typeof localMoran>, expected: any): void {
  expected.local_I.forEach((value: number | null, i: number) => {
    if (value === null || expected.quadrant[i] === "none") {
      assert.ok(
        Number.isNaN(found.i[i]) && Number.isNaN(found.variance[i]) && Number.isNaN(found.lag[i]),
      );
      assert.equal(found.quad[i], null);
      return;
    }
    assertClose(found.i[i], value, 1e-9, `I of ${i}`);
    assertClose(found.expected[i], expected.local_I_cond_mean[i], 1e-9, `mean of ${i}`);
    assertClose(found.variance[i], expected.local_I_cond_var[i], 1e-9, `variance of ${i}`);
    assert.equal(found.quad[i], expected.quadrant[i]);
  });
}

// Source: nc-local-queen_row.json, computed with numpy dense matrices.
Deno.test("localMoran() has the values, moments and quadrants of dense matrices when rows sum to one", () => {
  const share = numberColumn("nc.csv", "NWBIR74"), births = numberColumn("nc.csv", "BIR74");
  const found = localMoran(share.map((value, i) => value / births[i]), ncWeights("queen_row"));
  assertLocal(found, referenceCase("nc-local-queen_row").expected);
});

// Source: nc-local-cressie_chan_unscaled.json, computed with numpy dense matrices.
Deno.test("localMoran() has the values, moments and quadrants of dense matrices when two areas are alone", () => {
  const deaths = numberColumn("nc.csv", "SID74"), births = numberColumn("nc.csv", "BIR74");
  const found = localMoran(
    deaths.map((value, i) => 1000 * value / births[i]),
    ncWeights("cressie_chan_unscaled"),
  );
  assertLocal(found, referenceCase("nc-local-cressie_chan_unscaled").expected);
  assert.equal(found.quad.filter((quad) => quad === null).length, 2);
});

// Source: eire-local-open.json, computed with numpy dense matrices.
Deno.test("localMoran() has the values, moments and quadrants of dense matrices when the areas are Irish counties", () => {
  const list = weightsOfListFile(
    "eire_neighbours_cliff_ord.json",
    textColumn("eire_table.csv", "county"),
  );
  const found = localMoran(numberColumn("eire_table.csv", "OWNCONS"), rowStandardized(list));
  assertLocal(found, referenceCase("eire-local-open").expected);
});

// Source: enum-*.json, all orders of the other values counted one by one.
Deno.test("localMoran() has the exact conditional moments when all orders are counted", () => {
  for (const map of ["grid3x3_rook", "invdist6", "island7", "knn7_asym", "path6"]) {
    const { inputs, expected } = referenceCase(`enum-${map}`);
    const found = localMoran(Float64Array.from(inputs.x), weightsOfMatrix(inputs.W));
    for (const area of expected.local_moran_conditional) {
      if (Number.isNaN(found.i[area.i])) continue;
      assert.ok(Math.abs(found.i[area.i] - area.local_I) < 1e-10);
      assert.ok(Math.abs(found.expected[area.i] - area.cond_mean) < 1e-10);
      assert.ok(Math.abs(found.variance[area.i] - area.cond_var) < 1e-10);
    }
  }
});

// Source: invariances-eire.json; anselin-1995-africa.json says Egypt and Sudan stand out.
Deno.test("localMoran() adds up to S0 times the global I", () => {
  const weights = unequalWeights(gridWeights(5, 6), "sum");
  const values = normalNumbers(30, "sum");
  const sum = localMoran(values, weights).i.reduce((total, value) => total + value, 0);
  assertClose(sum, weightSums(weights).s0 * moranI(values, weights).value, 1e-12);

  const { inputs, expected } = referenceCase("invariances-eire");
  const binary = weightsOfListFile("eire_neighbours_cliff_ord.json");
  const total = localMoran(Float64Array.from(inputs.x), binary).i.reduce((a, b) => a + b, 0);
  assertClose(total, expected.sum_local_I_binary);

  const codes = textColumn("africa_conflict.csv", "name");
  const list = weightsOfListFile(
    "africa_conflict_neighbours_paper.json",
    textColumn("africa_conflict.csv", "code"),
  );
  const { i } = localMoran(numberColumn("africa_conflict.csv", "totcon"), rowStandardized(list));
  const largest = [...i.keys()].sort((a, b) => i[b] - i[a]).slice(0, 2).map((at) => codes[at]);
  assert.deepEqual(largest.sort(), ["EGYPT", "SUDAN"]);
});

Deno.test("localMoran() has no quadrant and no spread when the own value is the mean", () => {
  // 1 2 3 4 0 in a row: the mean is 2, so area 1 has z = 0.
  const { i, variance, expected, quad } = localMoran(
    Float64Array.of(1, 2, 3, 4, 0),
    chainWeights(5),
  );
  assert.equal(i[1], 0);
  assert.equal(Math.abs(expected[1]), 0);
  assert.equal(variance[1], 0);
  assert.equal(quad[1], null);
});

Deno.test("localMoran() has no quadrant when the neighbors' mean is the map's mean", () => {
  // 1 0 -1 in a row: the neighbors of the middle cancel.
  assert.deepEqual(localMoran(Float64Array.of(2, 0.5, -2, -0.5), chainWeights(4)).quad, [
    "HH",
    null,
    null,
    "LL",
  ]);
});

Deno.test("localMoran() has a variance of exactly 0 when everybody is everybody's neighbor", () => {
  const { variance } = localMoran(normalNumbers(9, "complete"), completeWeights(9));
  assert.deepEqual([...variance], new Array(9).fill(0));
});

Deno.test("localMoran() takes the sign of the standardized lag when a row of weights sums below zero", () => {
  const weights = { ...chainWeights(3), values: Float64Array.of(-1, 1, 1, 1) };
  const { quad } = localMoran(Float64Array.of(3, 2, 0), weights);
  // z of area 1 is above 0 and so is the mean of its single neighbor: high among high, whatever the weight's sign.
  assert.equal(quad[0], "HH");
});

Deno.test("localMoran() refuses constant values and wrong lengths", () => {
  assert.throws(() => localMoran(Float64Array.of(1, 1, 1), chainWeights(3)), UnfitDataError);
  assert.throws(
    () => localMoran(Float64Array.of(1, 2), chainWeights(3)),
    /2 values to weights of 3 areas/,
  );
});
