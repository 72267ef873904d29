import assert from "node:assert/strict";
import { standardize } from "../../lib/statistics/standardize.ts";
import { normalNumbers } from "../support/maps.ts";

Deno.test("standardize() gives scores with mean 0 and population variance 1 when values are large and close", () => {
  const values = normalNumbers(10_000, "far").map((value) => 1e9 + value);
  const { z, sd } = standardize(values);
  assert.ok(Math.abs(z.reduce((sum, value) => sum + value, 0)) < 1e-9);
  assert.ok(Math.abs(z.reduce((sum, value) => sum + value * value, 0) / z.length - 1) < 1e-12);
  assert.ok(Math.abs(sd - 1) < 0.02);
});

Deno.test("standardize() leaves its input as it was", () => {
  const values = Float64Array.of(3, 1, 2);
  standardize(values);
  assert.deepEqual(values, Float64Array.of(3, 1, 2));
});
