import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { leastSquares } from "../../lib/statistics/least_squares.ts";
import { assertClose } from "../support/close.ts";
import { normalNumbers } from "../support/maps.ts";
import { ncVariables } from "../support/nc_variables.ts";
import { numberColumn } from "../support/reference.ts";

const field = (name: string, ...values: number[]) => ({ name, values: Float64Array.from(values) });

Deno.test("leastSquares() has the line worked by hand when one field explains four values", () => {
  // x 0 1 2 3, y 1 3 2 4: slope 4 / 5, constant 2.5 - 0.8 · 1.5 = 1.3; residuals -0.3 0.9 -0.9 0.3.
  const fit = leastSquares(Float64Array.of(1, 3, 2, 4), [field("x", 0, 1, 2, 3)]);
  [-0.3, 0.9, -0.9, 0.3].forEach((e, i) => assertClose(fit.residuals[i], e, 1e-13));
  [1.3, 2.1, 2.9, 3.7].forEach((f, i) => assertClose(fit.fitted[i], f, 1e-13));
  // Σe² = 1.8 on 2 degrees of freedom; errors sqrt(0.9 / 5) and sqrt(0.9 (1/4 + 1.5² / 5)).
  assertClose(fit.residualVariance, 0.9, 1e-13);
  assertClose(fit.coefficients[1].error, Math.sqrt(0.18), 1e-13);
  assertClose(fit.coefficients[0].error, Math.sqrt(0.63), 1e-13);
  assert.deepEqual(fit.coefficients.map(({ name }) => name), [null, "x"]);
});

// Computed with numpy 2.4.6 (numpy.linalg.qr): SIDS rate 1974-78 by non-white share, births and easting.
Deno.test("leastSquares() has the coefficients and errors of numpy when the areas are counties", () => {
  const { rate74, nw74 } = ncVariables("74");
  const fit = leastSquares(rate74, [
    { name: "nw74", values: nw74 },
    { name: "births", values: numberColumn("nc.csv", "BIR74") },
    { name: "east", values: numberColumn("nc.csv", "east") },
  ]);
  const wanted = [
    [1.3938762686635495, 0.33092224738788534],
    [6.0862498184500575, 0.8139242825533559],
    [-1.4319459497409184e-05, 3.2417207144624375e-05],
    [-0.004434102863781527, 0.001438697457371443],
  ];
  wanted.forEach(([value, error], at) => {
    assertClose(fit.coefficients[at].value, value, 1e-9);
    assertClose(fit.coefficients[at].error, error, 1e-9);
  });
  assertClose(fit.residualVariance, 1.5382826795037732, 1e-9);
  assertClose(fit.rSquared, 0.397402918582193, 1e-9);
});

// NIST Statistical Reference Datasets, "Longley" (J. W. Longley 1967, JASA 62:819-841; public domain), nearly collinear;
// data and certified values from memory, agreeing to all digits with exact fractions.
Deno.test("leastSquares() keeps nine digits when fields are nearly collinear", () => {
  // deno-fmt-ignore
  const employed = [60323, 61122, 60171, 61187, 63221, 63639, 64989, 63761, 66019, 67857, 68169, 66513, 68655, 69564, 69331, 70551];
  // deno-fmt-ignore
  const fields = [
    field("deflator", 83.0, 88.5, 88.2, 89.5, 96.2, 98.1, 99.0, 100.0, 101.2, 104.6, 108.4, 110.8, 112.6, 114.2, 115.7, 116.9),
    field("product", 234289, 259426, 258054, 284599, 328975, 346999, 365385, 363112, 397469, 419180, 442769, 444546, 482704, 502601, 518173, 554894),
    field("unemployed", 2356, 2325, 3682, 3351, 2099, 1932, 1870, 3578, 2904, 2822, 2936, 4681, 3813, 3931, 4806, 4007),
    field("forces", 1590, 1456, 1616, 1650, 3099, 3594, 3547, 3350, 3048, 2857, 2798, 2637, 2552, 2514, 2572, 2827),
    field("population", 107608, 108632, 109773, 110929, 112075, 113270, 115094, 116219, 117388, 118734, 120445, 121950, 123366, 125368, 127852, 130081),
    field("year", ...Array.from({ length: 16 }, (_, i) => 1947 + i)),
  ];
  const fit = leastSquares(Float64Array.from(employed), fields);
  const certified = [
    [-3482258.63459582, 890420.383607373],
    [15.0618722713733, 84.9149257747669],
    [-0.0358191792925910, 0.0334910077722432],
    [-2.02022980381683, 0.488399681651699],
    [-1.03322686717359, 0.214274163161675],
    [-0.0511041056535807, 0.226073200069370],
    [1829.15146461355, 455.478499142212],
  ];
  certified.forEach(([value, error], at) => {
    assertClose(fit.coefficients[at].value, value, 1e-9);
    assertClose(fit.coefficients[at].error, error, 1e-9);
  });
  assertClose(fit.residualVariance, 92936.0061673238, 1e-9);
  assertClose(fit.rSquared, 0.995479004577296, 1e-9);
});

Deno.test("leastSquares() has a basis of right angles that the residuals stand upright on", () => {
  const names = ["a", "b", "c"];
  const predictors = names.map((name) => ({ name, values: normalNumbers(12, name) }));
  const { basis, residuals } = leastSquares(normalNumbers(12, "y"), predictors);
  const product = (a: Float64Array, b: Float64Array) =>
    a.reduce((sum, each, i) => sum + each * b[i], 0);
  assert.equal(basis.length, 4);
  basis.forEach((a, at) => {
    assert.ok(Math.abs(product(a, residuals)) < 1e-12);
    basis.forEach((b, other) => {
      assert.ok(Math.abs(product(a, b) - (at === other ? 1 : 0)) < 1e-12);
    });
  });
});

Deno.test("leastSquares() is the mean when no field explains", () => {
  const fit = leastSquares(Float64Array.of(1, 2, 6), []);
  assert.deepEqual(fit.coefficients.map(({ value }) => value), [3]);
  assertClose(fit.coefficients[0].error, Math.sqrt(7 / 3), 1e-14); // variance 14 / 2, over 3
  assert.equal(fit.rSquared, 0);
});

Deno.test("leastSquares() names the fields when they are constant, collinear, not finite or too many", () => {
  const values = Float64Array.of(1, 3, 2, 4, 9, 3);
  const a = field("a", 1, 2, 3, 4, 5, 7), b = field("b", 2, 1, 4, 3, 6, 5);
  const unfit = (message: RegExp) => (error: unknown) =>
    error instanceof UnfitDataError && message.test(error.message);
  assert.throws(
    () => leastSquares(values, [a, field("flat", ...new Array(6).fill(0.1))]),
    unfit(/"flat" is 0.1 in all 6 areas/),
  );
  const sum = { name: "sum", values: a.values.map((each, i) => 100 - each - 2 * b.values[i]) };
  const other = field("other", 5, 3, 8, 1, 1, 0);
  assert.throws(
    () => leastSquares(values, [a, other, b, sum]),
    unfit(/as "a", "b", "sum" follow exactly from one another/),
  );
  assert.throws(
    () => leastSquares(values, [a, { ...a, name: "copy" }, b]),
    unfit(/"a", "copy" follow/),
  );
  assert.throws(
    () => leastSquares(values, [field("c", 1, NaN, 3, 4, 5, 6)]),
    unfit(/"c" is NaN in area 1/),
  );
  assert.throws(
    () => leastSquares(new Float64Array(6).fill(2), [a]),
    unfit(/the value is 2 in all/),
  );
  assert.throws(
    () => leastSquares(Float64Array.of(1, 2, 4), [field("x", 1, 2, 9), field("y", 3, 1, 1)]),
    unfit(/3 values by 2 fields as it takes at least 4/),
  );
  assert.throws(() => leastSquares(values, [field("short", 1, 2)]), RangeError);
});
