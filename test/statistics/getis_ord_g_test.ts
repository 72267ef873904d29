import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { getisOrdG } from "../../lib/statistics/getis_ord_g.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { momentsOf, ordersOf } from "../support/all_orders.ts";
import { assertClose } from "../support/close.ts";
import { chainWeights, completeWeights, gridWeights } from "../support/maps.ts";
import { NC_WEIGHTS, ncVariables } from "../support/nc_variables.ts";
import { ncWeights } from "../support/nc_weights.ts";
import {
  numberColumn,
  referenceCase,
  rowStandardized,
  textColumn,
  weightsOfListFile,
  weightsOfMatrix,
} from "../support/reference.ts";

Deno.test("getisOrdG() has the value and moments worked by hand when four areas stand in a row", () => {
  // Values 0 0 1 1: the only product above 0 is that of the two ones, 2 of 2 both ways, and they touch: G = 1.
  const found = getisOrdG(Float64Array.of(0, 0, 1, 1), chainWeights(4));
  assertClose(found.value, 1, 1e-14);
  // Two ones touch in 3 of the 6 ways to place them, so G is 1 or 0 at even odds.
  assertClose(found.expected, 1 / 2, 1e-14);
  assertClose(found.variance, 1 / 4, 1e-14);
  assertClose(found.z, 1, 1e-14);
});

// deno-lint-ignore no-explicit-any
function assertG(values: Float64Array, weights: Weights, expected: any): void {
  const found = getisOrdG(values, weights);
  assertClose(found.value, expected.G, 1e-9, "G");
  assertClose(found.expected, expected.G_E, 1e-9, "expectation");
  assertClose(found.variance, expected.G_var, 1e-9, "variance");
  assertClose(found.z, expected.G_z, 1e-9, "z");
}

// Source: nc-global-*.json and nc79-global-queen_unscaled.json, computed with numpy dense matrices.
Deno.test("getisOrdG() has the value and moments of dense matrices when North Carolina is weighted in many ways", () => {
  const variables = ncVariables("74");
  for (const name of NC_WEIGHTS) {
    const weights = ncWeights(name);
    const { expected } = referenceCase(`nc-global-${name}`);
    for (const variable of Object.keys(expected)) {
      assertG(variables[variable], weights, expected[variable]);
    }
  }
  const later = referenceCase("nc79-global-queen_unscaled").expected;
  assertG(ncVariables("79").rate79, ncWeights("queen_unscaled"), later.rate79);
  assertG(ncVariables("79").nw79, ncWeights("queen_unscaled"), later.nw79);
});

// Source: eire-global-open.json, computed with numpy dense matrices; data of Cliff & Ord 1973.
Deno.test("getisOrdG() has the value and moments of dense matrices when the areas are Irish counties", () => {
  const binary = weightsOfListFile(
    "eire_neighbours_cliff_ord.json",
    textColumn("eire_table.csv", "county"),
  );
  // deno-lint-ignore no-explicit-any
  for (const [variable, by] of Object.entries<any>(referenceCase("eire-global-open").expected)) {
    const values = numberColumn("eire_table.csv", variable);
    assertG(values, binary, by.B);
    assertG(values, rowStandardized(binary), by.R);
  }
});

// Source: getis-ord-1996-grid.json; data of Getis & Ord 1996, cells from the bottom left.
Deno.test("getisOrdG() has the value and moments of dense matrices when the map is a remote-sensing grid", () => {
  const { moments_rook } = referenceCase("getis-ord-1996-grid").expected;
  assertG(numberColumn("getis_ord_1996_grid.csv", "val"), gridWeights(16, 16), moments_rook);
});

// Source: enum-*.json, all orders counted one by one with numpy.
Deno.test("getisOrdG() has the exact moments when all orders are counted", () => {
  const maps = ["grid2x3_rook", "grid2x4_queen_rowstd", "grid3x3_rook", "invdist6", "island7"];
  for (const map of [...maps, "knn7_asym", "path6"]) {
    const { inputs, expected } = referenceCase(`enum-${map}`);
    const found = getisOrdG(Float64Array.from(inputs.x), weightsOfMatrix(inputs.W));
    assertClose(found.value, expected.getis_ord_G.observed, 1e-10);
    assertClose(found.expected, expected.getis_ord_G.exact_mean, 1e-10);
    assertClose(found.variance, expected.getis_ord_G.exact_variance, 1e-10);
  }
});

Deno.test("getisOrdG() keeps the digits of its variance when values hardly differ", () => {
  const values = [1000.1, 1000.2, 1000.25, 1000.4, 1000.3, 1000.7];
  const weights = chainWeights(6);
  const slow = momentsOf(
    ordersOf(values).map((order) => getisOrdG(Float64Array.from(order), weights).value - 1 / 3),
  );
  assertClose(getisOrdG(Float64Array.from(values), weights).variance, slow.variance, 1e-6);
});

// Source: invariances-eire.json, algebraic identities.
Deno.test("getisOrdG() does not change when values are multiplied", () => {
  const { inputs, expected } = referenceCase("invariances-eire");
  const x = Float64Array.from(inputs.x),
    binary = weightsOfListFile("eire_neighbours_cliff_ord.json");
  assertClose(getisOrdG(x, binary).value, expected.G, 1e-9);
  assertClose(getisOrdG(x.map((each) => 250 * each), binary).value, expected.G_scaled, 1e-9);
});

// Source: complete-graph.json: G is 1 whatever the values.
Deno.test("getisOrdG() is 1 without a z when everybody is everybody's neighbor", () => {
  for (const { x, G } of referenceCase("complete-graph").expected) {
    const found = getisOrdG(Float64Array.from(x, Math.abs), completeWeights(x.length));
    assertClose(found.value, G, 1e-10);
    assert.equal(found.variance, 0);
    assert.ok(Number.isNaN(found.z));
  }
});

Deno.test("getisOrdG() refuses negative values, a single value above 0 and maps without links", () => {
  const chain = chainWeights(4);
  const unfit = (message: RegExp) => (error: unknown) =>
    error instanceof UnfitDataError && message.test(error.message);
  assert.throws(
    () => getisOrdG(Float64Array.of(1, 2, -0.5, 4), chain),
    unfit(/the value of area 2 is -0.5/),
  );
  assert.throws(() => getisOrdG(Float64Array.of(0, 0, 7, 0), chain), unfit(/fewer than 2 values/));
  const none = { ...chainWeights(1), offsets: new Uint32Array(5) }; // one area has no links at all
  assert.throws(
    () => getisOrdG(Float64Array.of(1, 2, 3, 4), none),
    unfit(/Getis-Ord G as no area has a neighbor/),
  );
});
