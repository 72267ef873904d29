import assert from "node:assert/strict";
import { adjustP } from "../../lib/inference/adjust.ts";
import { testLocalMoran } from "../../lib/inference/test_local.ts";
import { UsageError } from "../../lib/layer/errors.ts";
import { gridWeights, normalNumbers } from "../support/maps.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { numberColumn, referenceCase } from "../support/reference.ts";

/** A map of noise with a very high block away from its borders. */
function plantedMap(side: number): Float64Array {
  const values = normalNumbers(side * side, "planted");
  for (let r = 0; r < 4; r++) {
    for (let c = 0; c < 4; c++) values[(r + 10) % side * side + (c + 10) % side] += 8;
  }
  return values;
}

// Source: exact-local-nc-SID74-counts.json: after false-discovery control nothing is left.
Deno.test("testLocalMoran() finds what exact counting finds on North Carolina's counts", async () => {
  const { rows, bh_adjusted, significant_005 } =
    referenceCase("exact-local-nc-SID74-counts").expected;
  const counts = numberColumn("nc.csv", "SID74"), weights = ncWeights("queen_row");
  const plain = await testLocalMoran(counts, weights, { adjust: "none" });
  const names = rows.filter((_: unknown, i: number) => plain.sig[i]).map((row: { id: string }) =>
    row.id
  );
  assert.deepEqual(names.sort(), [...significant_005].sort());
  const adjusted = await testLocalMoran(counts, weights);
  assert.equal(adjusted.sig.filter((sig) => sig === 1).length, 0);
  adjusted.q.forEach((q, i) => assert.ok(Math.abs(q - bh_adjusted[i]) < 0.01, rows[i].id));
  assert.equal(adjusted.tested, 100);
});

Deno.test("testLocalMoran() draws areas at the floor again when the floor decides, and only then", async () => {
  const values = plantedMap(30), weights = gridWeights(30, 30, { corners: true });
  // 900 areas: at 999 permutations p is at least 0.002, and Bonferroni asks for 0.05 / 900.
  const first = await testLocalMoran(values, weights, {
    permutations: 999,
    adjust: "bonferroni",
    redraw: false,
  });
  assert.ok(first.floorDecides);
  assert.equal(first.redrawn, 0);
  assert.equal(first.floor, 0.002);
  assert.equal(first.sig.filter((sig) => sig === 1).length, 0);

  const again = await testLocalMoran(values, weights, { permutations: 999, adjust: "bonferroni" });
  assert.ok(again.redrawn > 0 && again.redrawn < 100);
  assert.ok(!again.floorDecides);
  assert.ok(again.sig.filter((sig) => sig === 1).length >= 9); // at least most of the block
  const redrawn = again.reference.permutations.filter((m) => m === 9_999_999).length;
  assert.equal(redrawn, again.redrawn);

  const unadjusted = await testLocalMoran(values, weights, { permutations: 999, adjust: "none" });
  assert.equal(unadjusted.redrawn, 0);
  assert.ok(!unadjusted.floorDecides);
});

Deno.test("testLocalMoran() adjusts over the areas that have a p and leaves areas alone out", async () => {
  const grid = gridWeights(5, 5);
  const weights = { ...grid, offsets: Uint32Array.of(...grid.offsets, grid.offsets[25]) };
  const found = await testLocalMoran(normalNumbers(26, "alone"), weights, {
    permutations: 999,
    adjust: "holm",
  });
  assert.equal(found.tested, 25);
  assert.ok(Number.isNaN(found.p[25]) && Number.isNaN(found.q[25]));
  assert.equal(found.sig[25], 0);
  assert.deepEqual(found.q, adjustP(found.p, "holm"));
});

Deno.test("testLocalMoran() refuses a level outside 0 and 1", async () => {
  for (const level of [0, 1, NaN, 5]) {
    await assert.rejects(testLocalMoran(plantedMap(5), gridWeights(5, 5), { level }), UsageError);
  }
});
