import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { gi, giStar } from "../../lib/statistics/gi.ts";
import type { Weights } from "../../lib/weights/weights.ts";
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

Deno.test("gi() and giStar() have the values worked by hand when four areas stand in a row", () => {
  // Values 6 2 0 0. Area 1 has the neighbors 6 and 0, sum 6. The others 6 0 0: mean 2, variance with divisor 3
  // (36 + 0 + 0) / 3 - 4 = 8. Standard deviation of the sum: sqrt(8 · (3 · 2 - 4) / 2) = sqrt(8).
  const values = Float64Array.of(6, 2, 0, 0);
  assertClose(gi(values, chainWeights(4))[1], (6 - 4) / Math.sqrt(8), 1e-14);
  // With itself 8. All four: mean 2, variance 40 / 4 - 4 = 6; sqrt(6 · (4 · 3 - 9) / 3) = sqrt(6).
  assertClose(giStar(values, chainWeights(4))[1], (8 - 6) / Math.sqrt(6), 1e-14);
});

/** Compares where the case has a number and the area has a neighbor; a lone area has none here. */
function assertZ(found: Float64Array, expected: readonly (number | null)[], links: Weights): void {
  expected.forEach((z, i) => {
    const isAlone = links.offsets[i] === links.offsets[i + 1];
    if (z === null || isAlone) assert.ok(Number.isNaN(found[i]), `z of ${i} is ${found[i]}`);
    else if (Math.abs(z) < 1e-12) assert.ok(Math.abs(found[i]) < 1e-12);
    else assertClose(found[i], z, 1e-9, `z of ${i}`);
  });
}

// Source: nc-local-*.json, computed with numpy dense matrices.
Deno.test("gi() and giStar() have the values of dense matrices when the areas are the counties of North Carolina", () => {
  const { rate74, nw74 } = ncVariables("74");
  const queen = ncWeights("queen_unscaled"), list = ncWeights("cressie_chan_unscaled");
  const byQueen = referenceCase("nc-local-queen_row").expected;
  assertZ(gi(nw74, ncWeights("queen_row")), byQueen.gi_z, queen);
  assertZ(gi(nw74, queen), byQueen.gi_z, queen);
  assertZ(giStar(nw74, queen), byQueen.gi_star_z, queen);
  const byList = referenceCase("nc-local-cressie_chan_unscaled").expected;
  assertZ(gi(rate74, list), byList.gi_z, list);
  assertZ(giStar(rate74, list), byList.gi_star_z, list);
});

// Source: eire-local-open.json, computed with numpy dense matrices; data of Cliff & Ord 1973.
Deno.test("gi() and giStar() have the values of dense matrices when the areas are Irish counties", () => {
  const list = weightsOfListFile(
    "eire_neighbours_cliff_ord.json",
    textColumn("eire_table.csv", "county"),
  );
  const values = numberColumn("eire_table.csv", "OWNCONS");
  const { gi_z, gi_star_z } = referenceCase("eire-local-open").expected;
  assertZ(gi(values, rowStandardized(list)), gi_z, list);
  assertZ(giStar(values, list), gi_star_z, list);
});

// Source: getis-ord-1996-grid.json; data of Getis & Ord 1996, cells of 30 m from the bottom left.
Deno.test("giStar() has the values of dense matrices when bands widen on a remote-sensing grid", () => {
  const x = numberColumn("getis_ord_1996_grid.csv", "x");
  const y = numberColumn("getis_ord_1996_grid.csv", "y");
  const values = numberColumn("getis_ord_1996_grid.csv", "val");
  const { gi_star_z } = referenceCase("getis-ord-1996-grid").expected;
  for (const [band, expected] of Object.entries<number[]>(gi_star_z)) {
    const within = (i: number, j: number) => Math.hypot(x[i] - x[j], y[i] - y[j]) <= Number(band);
    const links = weightsOfMatrix(
      Array.from(x, (_, i) => Array.from(x, (_, j) => i !== j && within(i, j) ? 1 : 0)),
    );
    assertZ(giStar(values, links), expected, links);
  }
});

// Source: enum-*.json and invariances-eire.json, numpy and algebra.
Deno.test("gi() and giStar() have the values of the definition when maps are small", () => {
  for (const map of ["grid2x3_rook", "grid3x3_rook", "knn7_asym", "path6", "island7"]) {
    const { inputs, expected } = referenceCase(`enum-${map}`);
    const links = weightsOfMatrix(inputs.W), values = Float64Array.from(inputs.x);
    if (expected.gi_z) assertZ(gi(values, links), expected.gi_z, links);
    assertZ(giStar(values, links), expected.gi_star_z, links);
  }
  const { inputs, expected } = referenceCase("invariances-eire");
  const links = weightsOfListFile("eire_neighbours_cliff_ord.json");
  assertZ(giStar(Float64Array.from(inputs.x), links), expected.gi_star_z, links);
});

Deno.test("gi() counts standard deviations over all orders of the other values when weights differ", () => {
  const values = [3, 1, 4, 1, 5, 9], area = 2;
  const weights = unequalWeights(completeWeights(6), "orders");
  const row = weights.values.subarray(weights.offsets[area], weights.offsets[area + 1]);
  const lag = (others: readonly number[]) => others.reduce((sum, x, e) => sum + x * row[e], 0);
  const others = values.filter((_, i) => i !== area);
  const slow = momentsOf(ordersOf(others).map(lag));
  const z = (lag(others) - slow.mean) / Math.sqrt(slow.variance);
  assertClose(gi(Float64Array.from(values), weights)[area], z, 1e-10);
});

Deno.test("gi() and giStar() do not change when rows are scaled or values scaled and shifted", () => {
  const values = normalNumbers(12, "gi"), weights = unequalWeights(chainWeights(12), "gi");
  const moved = values.map((value) => 40 + 3 * value);
  const [before, after] = [gi(values, weights), gi(moved, rowStandardized(weights))];
  before.forEach((z, i) => assertClose(after[i], z, 1e-10));
  const fivefold = { ...weights, values: weights.values.map((weight) => 5 * weight) };
  const [once, five] = [giStar(values, weights), giStar(moved, fivefold, { selfWeight: 5 })];
  once.forEach((z, i) => assertClose(five[i], z, 1e-10));
});

Deno.test("gi() and giStar() have no value when nothing can vary", () => {
  const values = normalNumbers(6, "all");
  assert.ok(gi(values, completeWeights(6)).every(Number.isNaN));
  assert.ok(giStar(values, completeWeights(6)).every(Number.isNaN));
  assert.throws(() => gi(Float64Array.of(1, 1, 1), chainWeights(3)), UnfitDataError);
  assert.throws(() => giStar(Float64Array.of(1, 2), chainWeights(3)), RangeError);
});

Deno.test("gi() has no value when all other values are equal", () => {
  // Without the 9 every value is 1: whoever stands next to area 0 has a 1.
  assert.ok(Number.isNaN(gi(Float64Array.of(9, 1, 1, 1, 1), chainWeights(5))[0]));
});
