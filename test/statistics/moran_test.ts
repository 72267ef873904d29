import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { moranI } from "../../lib/statistics/moran.ts";
import { spatialLag } from "../../lib/weights/lag.ts";
import { weightSums } from "../../lib/weights/sums.ts";
import { assertClose } from "../support/close.ts";
import {
  chainWeights,
  completeWeights,
  gridWeights,
  normalNumbers,
  unequalWeights,
} from "../support/maps.ts";
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

function assertMoments(
  values: Float64Array,
  weights: Parameters<typeof moranI>[1],
  // deno-lint-ignore no-explicit-any
  expected: any,
): void {
  const found = moranI(values, weights);
  assertClose(found.value, expected.I, 1e-9, "I");
  assertClose(found.expected, expected.I_E, 1e-12, "expectation");
  assertClose(found.varianceNormality, expected.I_var_normality, 1e-9, "variance under normality");
  assertClose(
    found.varianceRandomization,
    expected.I_var_randomisation,
    1e-9,
    "variance over orders",
  );
  if (expected.I_z_normality !== undefined) {
    assertClose(found.zNormality, expected.I_z_normality, 1e-9, "z");
  }
  if (expected.I_z_randomisation !== undefined) {
    assertClose(found.zRandomization, expected.I_z_randomisation, 1e-9, "z over orders");
  }
  assertClose(found.b2, expected.b2, 1e-9, "kurtosis");
}

// Source: nc-global-*.json and nc79-global-queen_unscaled.json, computed with numpy dense matrices.
for (const name of NC_WEIGHTS) {
  Deno.test(`moranI() has the value and moments of dense matrices when North Carolina is weighted ${name}`, () => {
    const { expected } = referenceCase(`nc-global-${name}`);
    const weights = ncWeights(name), variables = ncVariables("74");
    for (const variable of Object.keys(expected)) {
      assertMoments(variables[variable], weights, expected[variable]);
    }
  });
}

Deno.test("moranI() has the value and moments of dense matrices when the years are 1979 to 1984", () => {
  const { expected } = referenceCase("nc79-global-queen_unscaled");
  const variables = ncVariables("79");
  let checked = 0;
  for (const [variable, moments] of Object.entries(expected)) {
    if (!(variable in variables)) continue;
    assertMoments(variables[variable], ncWeights("queen_unscaled"), moments);
    checked++;
  }
  assert.ok(checked > 0);
});

// Source: eire-global-open.json, computed with numpy dense matrices; data of Cliff & Ord 1973.
Deno.test("moranI() has the value and moments of dense matrices when the areas are Irish counties", () => {
  const { expected } = referenceCase("eire-global-open");
  const binary = weightsOfListFile(
    "eire_neighbours_cliff_ord.json",
    textColumn("eire_table.csv", "county"),
  );
  for (const [variable, byWeights] of Object.entries<Record<string, unknown>>(expected)) {
    const values = numberColumn("eire_table.csv", variable);
    assertMoments(values, binary, byWeights.B);
    assertMoments(values, rowStandardized(binary), byWeights.R);
  }
});

// Source: anselin-1995-africa.json; Anselin 1995 prints 0.417.
Deno.test("moranI() rounds to the published 0.417 when the values are African conflict 1966-78", () => {
  const { expected } = referenceCase("anselin-1995-africa");
  const list = weightsOfListFile(
    "africa_conflict_neighbours_paper.json",
    textColumn("africa_conflict.csv", "code"),
  );
  const values = numberColumn("africa_conflict.csv", "totcon");
  assertMoments(values, rowStandardized(list), expected);
  assert.equal(moranI(values, rowStandardized(list)).value.toFixed(3), "0.417");
});

// Source: enum-*.json, all orders counted one by one with numpy.
for (
  const map of [
    "grid2x3_rook",
    "grid2x4_queen_rowstd",
    "grid3x3_rook",
    "invdist6",
    "island7",
    "knn7_asym",
    "path6",
  ]
) {
  Deno.test(`moranI() has the exact variance over all orders when the map is ${map}`, () => {
    const { inputs, expected } = referenceCase(`enum-${map}`);
    const found = moranI(Float64Array.from(inputs.x), weightsOfMatrix(inputs.W));
    assertClose(found.value, expected.moran_I.observed, 1e-10);
    assertClose(found.expected, expected.moran_I.exact_mean, 1e-10);
    assertClose(found.varianceRandomization, expected.moran_I.exact_variance, 1e-10);
    assertClose(found.varianceNormality, expected.moran_I.normality_formula_variance, 1e-10);
  });
}

// Source: gradient-on-path.json, closed form (n - 3) / (n - 1).
Deno.test("moranI() is (n - 3) / (n - 1) when values rise by one along a row of areas", () => {
  for (const { n, I } of referenceCase("gradient-on-path").expected) {
    assertClose(
      moranI(Float64Array.from({ length: n }, (_, i) => i + 1), chainWeights(n)).value,
      I,
      1e-10,
    );
  }
});

// Source: complete-graph.json, closed form -1 / (n - 1) without variance.
Deno.test("moranI() gives no z when everybody is everybody's neighbor", () => {
  for (const { x, I } of referenceCase("complete-graph").expected) {
    const found = moranI(Float64Array.from(x), completeWeights(x.length));
    assertClose(found.value, I, 1e-10);
    assert.equal(found.varianceRandomization, 0);
    assert.ok(Number.isNaN(found.zRandomization) && Number.isNaN(found.zNormality));
  }
});

// Source: checkerboard.json and half-and-half-torus.json, closed forms.
Deno.test("moranI() has the closed form when the map is a checkerboard or half and half", () => {
  for (const { rows, cols, contiguity, torus, I } of referenceCase("checkerboard").expected) {
    const values = Float64Array.from(
      { length: rows * cols },
      (_, i) => (Math.floor(i / cols) + i % cols) % 2,
    );
    const weights = gridWeights(rows, cols, { torus, corners: contiguity !== "shared edge" });
    assert.ok(Math.abs(moranI(values, weights).value - I) < 1e-10);
  }
  for (const { m, I } of referenceCase("half-and-half-torus").expected) {
    const values = Float64Array.from({ length: m * m }, (_, i) => i % m < m / 2 ? 1 : 0);
    assertClose(moranI(values, gridWeights(m, m, { torus: true })).value, I, 1e-10);
  }
});

// Source: bounds-of-I-open.json, extreme eigenvalues (de Jong, Sprenger & van Veen 1984).
Deno.test("moranI() stays within the eigenvalue bounds when values are anything", () => {
  const { expected } = referenceCase("bounds-of-I-open");
  const maps = {
    "3x3 grid shared edge": gridWeights(3, 3),
    "26 Irish counties": weightsOfListFile("eire_neighbours_cliff_ord.json"),
  };
  for (const [name, weights] of Object.entries(maps)) {
    const { min_I, max_I } = expected[name];
    for (let draw = 0; draw < 200; draw++) {
      const values = normalNumbers(weights.offsets.length - 1, `bounds ${draw}`);
      const { value } = moranI(values, weights);
      assert.ok(value >= min_I - 1e-8 && value <= max_I + 1e-8);
      // Smoothing again and again turns the values into the eigenvector of the upper bound.
      if (draw === 0) assertClose(smoothest(values, weights), max_I, 1e-6);
    }
  }
});

function smoothest(values: Float64Array, weights: Parameters<typeof moranI>[1]): number {
  let x = values;
  for (let round = 0; round < 2000; round++) {
    const mean = x.reduce((sum, value) => sum + value, 0) / x.length;
    const centered = x.map((value) => value - mean);
    const smoothed = spatialLag(weights, centered).map((lag, i) => lag + 6 * centered[i]);
    const size = Math.hypot(...smoothed);
    x = smoothed.map((value) => value / size);
  }
  return moranI(x, weights).value;
}

// Source: invariances-eire.json, algebraic identities.
Deno.test("moranI() does not change when values are scaled, shifted or turned, or weights multiplied or transposed", () => {
  const { inputs, expected } = referenceCase("invariances-eire");
  const x = Float64Array.from(inputs.x);
  const binary = weightsOfListFile("eire_neighbours_cliff_ord.json");
  const row = rowStandardized(binary);
  const matrix = Array.from({ length: 26 }, () => new Array<number>(26).fill(0));
  for (let i = 0; i < 26; i++) {
    for (let e = row.offsets[i]; e < row.offsets[i + 1]; e++) {
      matrix[i][row.indices[e]] = row.values[e];
    }
  }
  const turned = weightsOfMatrix(matrix[0].map((_, j) => matrix.map((each) => each[j])));
  const close = (actual: number, wanted: number) => assert.ok(Math.abs(actual - wanted) < 1e-9);
  close(moranI(x, binary).value, expected.I);
  close(moranI(x.map((value) => -3 * value + 7), binary).value, expected.I_affine);
  close(
    moranI(x, { ...binary, values: binary.values.map(() => 5) }).value,
    expected.I_weights_scaled,
  );
  close(moranI(x, row).value, expected.I_row_std);
  close(moranI(x, turned).value, expected.I_transpose);
});

// Source: moran-scatter-slope.json and moran-scatter-slope-islands.json, scipy.stats.linregress.
Deno.test("moranI() is n/S0 times the slope of the lag on the value, with and without islands", () => {
  const cases = [["moran-scatter-slope", "nw74", "queen_row"], [
    "moran-scatter-slope-islands",
    "rate74",
    "cressie_chan_row",
  ]];
  for (const [id, variable, name] of cases) {
    const { expected } = referenceCase(id);
    const values = ncVariables("74")[variable], weights = ncWeights(name);
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    const z = values.map((value) => value - mean);
    const lag = spatialLag(weights, z);
    const slope = lag.reduce((sum, value, i) => sum + value * z[i], 0) /
      z.reduce((sum, value) => sum + value ** 2, 0);
    assertClose(slope, expected.slope_dev ?? expected.slope);
    assertClose(moranI(values, weights).value, expected.I);
    assertClose(moranI(values, weights).value, values.length / weightSums(weights).s0 * slope);
  }
});

Deno.test("moranI() does not change when the areas are listed in another order", () => {
  const weights = unequalWeights(gridWeights(4, 5), "order");
  const values = normalNumbers(20, "order");
  const matrix = Array.from({ length: 20 }, () => new Array<number>(20).fill(0));
  const place = (i: number) => i * 7 % 20; // 7 and 20 have no common factor, so this is an order
  for (let i = 0; i < 20; i++) {
    for (let e = weights.offsets[i]; e < weights.offsets[i + 1]; e++) {
      matrix[place(i)][place(weights.indices[e])] = weights.values[e];
    }
  }
  const moved = new Float64Array(20);
  values.forEach((value, i) => moved[place(i)] = value);
  assertClose(moranI(moved, weightsOfMatrix(matrix)).value, moranI(values, weights).value, 1e-12);
});

// Source: degenerate-open.json, common practice for refusals.
Deno.test("moranI() refuses what has no answer and names the reason", () => {
  const cases = new Map<string, { x: (number | null)[]; edges: number[][] }>(
    referenceCase("degenerate-open").inputs.cases.map((each: { id: string }) => [each.id, each]),
  );
  const moranOf = (id: string) => {
    const { x, edges } = cases.get(id)!;
    const matrix = x.map(() => new Array<number>(x.length).fill(0));
    for (const [i, j] of edges) matrix[i][j] = matrix[j][i] = 1;
    return moranI(Float64Array.from(x, (value) => value ?? NaN), weightsOfMatrix(matrix));
  };
  const unfit = (message: RegExp) => (error: unknown) =>
    error instanceof UnfitDataError && message.test(error.message);
  assert.throws(() => moranOf("constant"), unfit(/all 4 values are equal to 5/));
  assert.throws(() => moranOf("no_links"), unfit(/no area has a neighbor/));
  assert.throws(() => moranOf("n1"), unfit(/1 usable areas as it takes at least 3/));
  assert.throws(() => moranOf("nan"), unfit(/the value of area 1 is NaN/));
  const { expected } = referenceCase("degenerate-open");
  assertClose(moranOf("n3").value, expected.n3.I, 1e-10);
  assertClose(moranOf("n3").expected, expected.n3.E, 1e-10);
  assert.ok(
    Number.isNaN(moranOf("n3").varianceRandomization) && Number.isNaN(moranOf("n3").zRandomization),
  );
});

Deno.test("moranI() refuses values equal up to rounding, infinite values, negative sums and wrong lengths", () => {
  const weights = chainWeights(4);
  assert.throws(() => moranI(Float64Array.of(0.1 + 0.2, 0.3, 0.3, 0.3), weights), UnfitDataError);
  assert.throws(() => moranI(Float64Array.of(1, 2, Infinity, 4), weights), /Infinity/);
  const negative = { ...weights, values: weights.values.map(() => -1) };
  assert.throws(() => moranI(Float64Array.of(1, 2, 3, 4), negative), /the weights sum to -6/);
  assert.throws(() => moranI(Float64Array.of(1, 2, 3), weights), RangeError);
});
