import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { gearyC } from "../../lib/statistics/geary.ts";
import type { Weights } from "../../lib/weights/weights.ts";
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

Deno.test("gearyC() has the value and moments worked by hand when four areas stand in a row", () => {
  // Values 1 2 4 5: mean 3, Σ(x - 3)² = 4 + 1 + 1 + 4 = 10, b2 = 4 · (16 + 1 + 1 + 16) / 10² = 1.36.
  // Differences between neighbors 1 2 1, each pair both ways: Σ w (x_i - x_j)² = 2 (1 + 4 + 1) = 12.
  // c = 3 / (2 · 6) · 12 / 10 = 0.3.
  const found = gearyC(Float64Array.of(1, 2, 4, 5), chainWeights(4));
  assertClose(found.value, 0.3, 1e-14);
  assert.equal(found.expected, 1);
  // S0 = 6, S1 = 12, S2 = 2² + 4² + 4² + 2² = 40.
  // Normality: ((2 · 12 + 40) · 3 - 4 · 36) / (2 · 5 · 36) = 48 / 360.
  assertClose(found.varianceNormality, 48 / 360, 1e-14);
  // Over all orders: 3 · 12 (16 - 12 + 3 - 3 · 1.36) = 105.12; 3 · 40 / 4 · (16 + 12 - 6 - 14 · 1.36) = 88.8;
  // 36 (16 - 3 - 9 · 1.36) = 27.36; (105.12 - 88.8 + 27.36) / (4 · 2 · 1 · 36) = 43.68 / 288.
  assertClose(found.varianceRandomization, 43.68 / 288, 1e-13);
  assertClose(found.zRandomization, 0.7 / Math.sqrt(43.68 / 288), 1e-13);
});

// deno-lint-ignore no-explicit-any
function assertGeary(values: Float64Array, weights: Weights, expected: any): void {
  const found = gearyC(values, weights);
  assertClose(found.value, expected.c, 1e-9, "c");
  assertClose(found.varianceNormality, expected.c_var_normality, 1e-9, "variance under normality");
  assertClose(found.varianceRandomization, expected.c_var_randomisation, 1e-9, "over all orders");
  assertClose(found.zNormality, expected.c_z_normality, 1e-9, "z");
  assertClose(found.zRandomization, expected.c_z_randomisation, 1e-9, "z over all orders");
}

// Source: nc-global-*.json and nc79-global-queen_unscaled.json, computed with numpy dense matrices.
Deno.test("gearyC() has the value and moments of dense matrices when North Carolina is weighted in many ways", () => {
  const variables = ncVariables("74");
  for (const name of NC_WEIGHTS) {
    const weights = ncWeights(name);
    const { expected } = referenceCase(`nc-global-${name}`);
    for (const variable of Object.keys(expected)) {
      assertGeary(variables[variable], weights, expected[variable]);
    }
  }
  const later = referenceCase("nc79-global-queen_unscaled").expected;
  assertGeary(ncVariables("79").rate79, ncWeights("queen_unscaled"), later.rate79);
  assertGeary(ncVariables("79").nw79, ncWeights("queen_unscaled"), later.nw79);
});

// Source: eire-global-open.json, computed with numpy dense matrices; data of Cliff & Ord 1973.
Deno.test("gearyC() has the value and moments of dense matrices when the areas are Irish counties", () => {
  const binary = weightsOfListFile(
    "eire_neighbours_cliff_ord.json",
    textColumn("eire_table.csv", "county"),
  );
  // deno-lint-ignore no-explicit-any
  for (const [variable, by] of Object.entries<any>(referenceCase("eire-global-open").expected)) {
    assertGeary(numberColumn("eire_table.csv", variable), binary, by.B);
    assertGeary(numberColumn("eire_table.csv", variable), rowStandardized(binary), by.R);
  }
});

// Source: getis-ord-1996-grid.json; data of Getis & Ord 1996, cells from the bottom left.
Deno.test("gearyC() has the value and moments of dense matrices when the map is a remote-sensing grid", () => {
  const values = numberColumn("getis_ord_1996_grid.csv", "val");
  assertGeary(
    values,
    gridWeights(16, 16),
    referenceCase("getis-ord-1996-grid").expected.moments_rook,
  );
});

// Source: enum-*.json, all orders counted one by one with numpy.
Deno.test("gearyC() has the exact moments when all orders are counted", () => {
  const maps = ["grid2x3_rook", "grid2x4_queen_rowstd", "grid3x3_rook", "invdist6", "island7"];
  for (const map of [...maps, "knn7_asym", "path6"]) {
    const { inputs, expected } = referenceCase(`enum-${map}`);
    const found = gearyC(Float64Array.from(inputs.x), weightsOfMatrix(inputs.W));
    assertClose(found.value, expected.geary_c.observed, 1e-10);
    assertClose(found.varianceRandomization, expected.geary_c.exact_variance, 1e-10);
    assertClose(found.varianceNormality, expected.geary_c.normality_formula_variance, 1e-10);
  }
});

// Source: checkerboard.json, half-and-half-torus.json, gradient-on-path.json: closed forms.
Deno.test("gearyC() has the closed form when the map is a checkerboard, half and half, or a gradient", () => {
  for (const { rows, cols, contiguity, torus, c } of referenceCase("checkerboard").expected) {
    const values = Float64Array.from(
      { length: rows * cols },
      (_, i) => (Math.floor(i / cols) + i % cols) % 2,
    );
    const corners = contiguity !== "shared edge";
    assertClose(gearyC(values, gridWeights(rows, cols, { torus, corners })).value, c, 1e-10);
  }
  for (const { m, c } of referenceCase("half-and-half-torus").expected) {
    const values = Float64Array.from({ length: m * m }, (_, i) => i % m < m / 2 ? 1 : 0);
    assertClose(gearyC(values, gridWeights(m, m, { torus: true })).value, c, 1e-10);
  }
  for (const { n, c } of referenceCase("gradient-on-path").expected) {
    const values = Float64Array.from({ length: n }, (_, i) => i + 1);
    assertClose(gearyC(values, chainWeights(n)).value, c, 1e-10);
  }
});

// Source: invariances-eire.json, algebraic identities.
Deno.test("gearyC() does not change when values are scaled and shifted", () => {
  const { inputs, expected } = referenceCase("invariances-eire");
  const x = Float64Array.from(inputs.x),
    binary = weightsOfListFile("eire_neighbours_cliff_ord.json");
  assertClose(gearyC(x, binary).value, expected.c, 1e-9);
  assertClose(gearyC(x.map((each) => -3 * each + 7), binary).value, expected.c_affine, 1e-9);
});

// Source: complete-graph.json: c is 1 whatever the values.
Deno.test("gearyC() is 1 without a z when everybody is everybody's neighbor", () => {
  for (const { x, c } of referenceCase("complete-graph").expected) {
    const found = gearyC(Float64Array.from(x), completeWeights(x.length));
    assertClose(found.value, c, 1e-10);
    assert.equal(found.varianceNormality, 0);
    assert.equal(found.varianceRandomization, 0);
    assert.ok(Number.isNaN(found.zNormality) && Number.isNaN(found.zRandomization));
  }
});

Deno.test("gearyC() has no variance over all orders when there are three areas", () => {
  const found = gearyC(Float64Array.of(1, 2, 4), chainWeights(3));
  assert.ok(Number.isNaN(found.varianceRandomization) && found.varianceNormality > 0);
});

Deno.test("gearyC() refuses constant values, maps without links and wrong lengths", () => {
  const none = { ...chainWeights(1), offsets: new Uint32Array(5) }; // one area has no links at all
  assert.throws(() => gearyC(Float64Array.of(5, 5, 5, 5), chainWeights(4)), UnfitDataError);
  assert.throws(
    () => gearyC(Float64Array.of(1, 2, 3, 4), none),
    /Cannot compute Geary's c as no area has a neighbor/,
  );
  assert.throws(() => gearyC(Float64Array.of(1, 2), chainWeights(3)), RangeError);
});
