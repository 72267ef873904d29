import assert from "node:assert/strict";
import { permuteLocalJoinCount } from "../../lib/inference/permute_local_join_count.ts";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { localJoinCount } from "../../lib/statistics/local_join_count.ts";
import { gridWeights } from "../support/maps.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { numberColumn, referenceCase, textColumn } from "../support/reference.ts";

// Source: local-join-hypergeom-nc.json, the exact hypergeometric tail.
Deno.test("permuteLocalJoinCount() is exact where enumerated and within 4 standard errors elsewhere on North Carolina", async () => {
  const { rows } = referenceCase("local-join-hypergeom-nc").expected;
  const deaths = numberColumn("nc.csv", "SID74"), births = numberColumn("nc.csv", "BIR74");
  const names = textColumn("nc.csv", "NAME");
  const isOfClass = Uint8Array.from(deaths, (count, i) => 1000 * count / births[i] >= 2.5 ? 1 : 0);
  const found = await permuteLocalJoinCount(isOfClass, ncWeights("queen_unscaled"), {
    permutations: 199_999,
  });
  let enumerated = 0;
  for (const { id, p_ge } of rows) {
    const area = names.indexOf(id), m = found.permutations[area];
    enumerated += found.enumerated[area];
    const allowed = found.enumerated[area] ? 1e-12 : 4 * Math.sqrt(p_ge * (1 - p_ge) / m) + 1e-12;
    assert.ok(Math.abs(found.atLeast[area] / m - p_ge) <= allowed, id);
  }
  assert.equal(enumerated, 2); // the two with 3 neighbors: 156,849 subsets
  assert.ok(found.permutations.every((m, area) => isOfClass[area] === 1 || m === 0));
});

Deno.test("permuteLocalJoinCount() gives the exact chance on a small map, only for the areas asked for", async () => {
  const isOfClass = Uint8Array.of(1, 1, 0, 1, 0, 0, 0, 1, 1), weights = gridWeights(3, 3);
  const { p } = localJoinCount(isOfClass, weights);
  const found = await permuteLocalJoinCount(isOfClass, weights, {
    areas: Uint32Array.of(0, 1, 2, 3),
  });
  for (const area of [0, 1, 3]) {
    assert.ok(Math.abs(found.atLeast[area] / found.permutations[area] - p[area]) < 1e-14);
  }
  for (const area of [2, 7, 8]) assert.equal(found.permutations[area], 0);
});

Deno.test("permuteLocalJoinCount() refuses a class that all areas have or none", async () => {
  for (const member of [0, 1]) {
    const isOfClass = new Uint8Array(9).fill(member);
    await assert.rejects(permuteLocalJoinCount(isOfClass, gridWeights(3, 3)), UnfitDataError);
  }
});
