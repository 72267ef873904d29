import assert from "node:assert/strict";
import { permuteLocalGeary } from "../../lib/inference/permute_local_geary.ts";
import { UnfitDataError, UsageError } from "../../lib/layer/errors.ts";
import { localGeary } from "../../lib/statistics/local_geary.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { countHeldOrders } from "../support/held_orders.ts";
import { kolmogorovSmirnov } from "../support/kolmogorov.ts";
import { gridWeights, normalNumbers, unequalWeights } from "../support/maps.ts";
import { referenceCase, weightsOfMatrix } from "../support/reference.ts";

// Maps of the enum-*.json cases; every order of the other values is counted here, one by one.
for (const map of ["grid2x3_rook", "invdist6", "island7", "knn7_asym", "path6"]) {
  Deno.test(`permuteLocalGeary() counts what all orders give when the map is ${map}`, async () => {
    const { inputs } = referenceCase(`enum-${map}`);
    const values = Float64Array.from(inputs.x), weights = weightsOfMatrix(inputs.W);
    const found = await permuteLocalGeary(values, weights);
    for (let area = 0; area < values.length; area++) {
      if (weights.offsets[area] === weights.offsets[area + 1]) {
        assert.equal(found.permutations[area], 0);
        continue;
      }
      const { atLeast, atMost, orders } = countHeldOrders(
        values,
        area,
        (order) => localGeary(order, weights).c[area],
      );
      const each = orders / found.permutations[area];
      assert.equal(found.enumerated[area], 1);
      assert.deepEqual(
        [found.atLeast[area] * each, found.atMost[area] * each],
        [atLeast, atMost],
        `area ${area}`,
      );
    }
  });
}

/** 3 × 3 areas; the area in the middle has 40,320 cases, too many to enumerate. */
const grid = gridWeights(3, 3, { corners: true });
const SAMPLED: [string, Weights][] = [
  ["equal", grid],
  ["unequal", unequalWeights(grid, "geary")],
];
for (const [name, weights] of SAMPLED) {
  Deno.test(`permuteLocalGeary() samples within 4 standard errors of all orders when weights are ${name}`, async () => {
    const values = Float64Array.of(1, 4, 1, 9, 6, 2, 7, 7, 3), permutations = 9_999;
    const found = await permuteLocalGeary(values, weights, { permutations });
    let sampled = 0;
    for (const area of [1, 4, 8]) {
      const { atLeast, atMost, orders } = countHeldOrders(
        values,
        area,
        (order) => localGeary(order, weights).c[area],
      );
      const m = found.permutations[area];
      if (!found.enumerated[area]) sampled++;
      for (
        const [count, truth] of [[found.atLeast[area], atLeast], [found.atMost[area], atMost]]
      ) {
        const p = truth / orders;
        const allowed = found.enumerated[area] ? 1e-12 : 4 * Math.sqrt(p * (1 - p) / m) + 1e-12;
        assert.ok(Math.abs(count / m - p) <= allowed, `area ${area}: ${count / m} ${p}`);
      }
    }
    assert.equal(sampled, 1);
  });
}

Deno.test("permuteLocalGeary() finds areas like their neighbors also where the own value is the mean", async () => {
  const values = normalNumbers(100, "plateau");
  for (const area of [33, 34, 35, 43, 44, 45, 53, 54, 55]) values[area] = 0.001 * area;
  const found = await permuteLocalGeary(values, gridWeights(10, 10, { corners: true }), {
    permutations: 9_999,
  });
  assert.ok(found.atMost[44] < 5, `${found.atMost[44]} permutations as even`);
  assert.ok(found.atLeast[44] > 9_990);
});

Deno.test("permuteLocalGeary() has a uniform one-sided p under the null for one area of 300 simulated maps", async () => {
  const weights = gridWeights(9, 9, { corners: true }), areas = Uint32Array.of(40);
  const p: number[] = [];
  for (let map = 0; map < 300; map++) {
    const found = await permuteLocalGeary(normalNumbers(81, `geary ${map}`), weights, {
      permutations: 199,
      seed: `${map}`,
      areas,
    });
    p.push((found.atMost[40] + 1) / 200);
  }
  // 1.63 / sqrt(300) is the 1 % point of the Kolmogorov-Smirnov distance; p steps by 1/200.
  assert.ok(kolmogorovSmirnov(p) < 1.63 / Math.sqrt(300) + 1 / 200);
});

Deno.test("permuteLocalGeary() refuses what no permutation test can answer", async () => {
  await assert.rejects(
    permuteLocalGeary(normalNumbers(9, "few"), grid, { permutations: 98 }),
    UsageError,
  );
  await assert.rejects(permuteLocalGeary(new Float64Array(9).fill(3), grid), UnfitDataError);
});
