import assert from "node:assert/strict";
import { permuteLocalBivariateMoran } from "../../lib/inference/permute_local_bivariate.ts";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { localBivariateMoran } from "../../lib/statistics/local_bivariate_moran.ts";
import { countHeldOrders } from "../support/held_orders.ts";
import { gridWeights, normalNumbers, unequalWeights } from "../support/maps.ts";
import { referenceCase, weightsOfMatrix } from "../support/reference.ts";

// Map of enum-bivariate-open.json; every order of the other areas' y is counted here, one by one.
Deno.test("permuteLocalBivariateMoran() counts what all orders of y give when x and the own y are held", async () => {
  const { inputs } = referenceCase("enum-bivariate-open");
  const x = Float64Array.from(inputs.x), y = Float64Array.from(inputs.y);
  const equal = weightsOfMatrix(inputs.W);
  for (const weights of [equal, unequalWeights(equal, "bivariate")]) {
    const found = await permuteLocalBivariateMoran(x, y, weights);
    for (let area = 0; area < x.length; area++) {
      const { atLeast, atMost, orders } = countHeldOrders(
        y,
        area,
        (order) => localBivariateMoran(x, order, weights).i[area],
      );
      const each = orders / found.permutations[area];
      assert.equal(found.enumerated[area], 1);
      assert.deepEqual(
        [found.atLeast[area] * each, found.atMost[area] * each],
        [atLeast, atMost],
        `area ${area}`,
      );
    }
  }
});

Deno.test("permuteLocalBivariateMoran() has only ties where the own x is the mean", async () => {
  const x = Float64Array.from({ length: 21 }, (_, i) => i - 10);
  const weights = gridWeights(3, 7);
  const found = await permuteLocalBivariateMoran(x, normalNumbers(21, "y"), weights, {
    permutations: 999,
  });
  assert.equal(found.atLeast[10], found.permutations[10]);
  assert.equal(found.atMost[10], found.permutations[10]);
});

Deno.test("permuteLocalBivariateMoran() refuses a field without spread and fields of different length", async () => {
  const weights = gridWeights(3, 3), x = normalNumbers(9, "x"), flat = new Float64Array(9);
  await assert.rejects(permuteLocalBivariateMoran(flat, x, weights), UnfitDataError);
  await assert.rejects(permuteLocalBivariateMoran(x, flat, weights), UnfitDataError);
  await assert.rejects(permuteLocalBivariateMoran(x, x.slice(1), weights), RangeError);
});
