import assert from "node:assert/strict";
import { reverseLag } from "../../lib/statistics/reverse_lag.ts";
import { spatialLag } from "../../lib/weights/lag.ts";
import { gridWeights, normalNumbers, unequalWeights } from "../support/maps.ts";

Deno.test("reverseLag() is the transpose of spatialLag()", () => {
  const weights = unequalWeights(gridWeights(3, 4), "turn");
  const x = normalNumbers(12, "x"), y = normalNumbers(12, "y");
  const product = (a: Float64Array, b: Float64Array) =>
    a.reduce((sum, each, i) => sum + each * b[i], 0);
  const forward = product(y, spatialLag(weights, x)), backward = product(reverseLag(weights, y), x);
  assert.ok(Math.abs(forward - backward) < 1e-12);
});
