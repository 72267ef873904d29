import assert from "node:assert/strict";
import { permuteGi } from "../../lib/inference/permute_gi.ts";
import { permuteLocalMoran } from "../../lib/inference/permute_local.ts";
import { gi, giStar } from "../../lib/statistics/gi.ts";
import { countHeldOrders } from "../support/held_orders.ts";
import { gridWeights, normalNumbers } from "../support/maps.ts";
import { referenceCase, weightsOfMatrix } from "../support/reference.ts";

// Maps of the enum-*.json cases; every order of the other values is counted here, one by one.
for (const map of ["grid2x3_rook", "invdist6", "island7", "knn7_asym", "path6"]) {
  Deno.test(`permuteGi() counts what all orders give of Gi and of Gi* when the map is ${map}`, async () => {
    const { inputs } = referenceCase(`enum-${map}`);
    const values = Float64Array.from(inputs.x), weights = weightsOfMatrix(inputs.W);
    const found = await permuteGi(values, weights);
    for (let area = 0; area < values.length; area++) {
      if (found.permutations[area] === 0) {
        assert.equal(weights.offsets[area], weights.offsets[area + 1]);
        continue;
      }
      for (const statistic of [gi, giStar]) {
        const { atLeast, atMost, orders } = countHeldOrders(
          values,
          area,
          (order) => statistic(order, weights)[area],
        );
        const each = orders / found.permutations[area];
        assert.deepEqual(
          [found.atLeast[area] * each, found.atMost[area] * each],
          [atLeast, atMost],
          `${statistic.name} of area ${area}`,
        );
      }
    }
  });
}

Deno.test("permuteGi() counts as local Moran's I does where the own value is above the mean, and the other way below", async () => {
  const values = normalNumbers(100, "gi"), weights = gridWeights(10, 10);
  const options = { permutations: 9_999 };
  const found = await permuteGi(values, weights, options);
  const moran = await permuteLocalMoran(values, weights, options);
  const mean = values.reduce((sum, value) => sum + value, 0) / 100;
  values.forEach((value, area) =>
    assert.equal(found.atLeast[area], value > mean ? moran.atLeast[area] : moran.atMost[area])
  );
});
