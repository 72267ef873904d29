import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { joinCounts } from "../../lib/statistics/join_counts.ts";
import { localJoinCount } from "../../lib/statistics/local_join_count.ts";
import { assertClose } from "../support/close.ts";
import { chainWeights, gridWeights } from "../support/maps.ts";
import { ncVariables } from "../support/nc_variables.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { referenceCase, textColumn } from "../support/reference.ts";

Deno.test("localJoinCount() has the counts and chances worked by hand when five areas stand in a row", () => {
  // 1 1 0 1 0: area 1 has one neighbor of the class of two. Among the other four places two hold the class:
  // both neighbors without it in 1 of 6 ways, so at least one in 5 of 6.
  const { count, p } = localJoinCount(Uint8Array.of(1, 1, 0, 1, 0), chainWeights(5));
  assert.deepEqual([...count], [1, 1, NaN, 0, NaN]);
  assertClose(p[1], 5 / 6, 1e-14);
  assert.equal(p[3], 1); // at least none
  assert.ok(Number.isNaN(p[2]));
});

// Source: local-join-hypergeom-nc.json, scipy.stats.hypergeom 1.17.1; SIDS rates of 2.5 per 1000 and more.
Deno.test("localJoinCount() has the chances of scipy when the areas are the counties of North Carolina", () => {
  const { expected } = referenceCase("local-join-hypergeom-nc");
  const isOfClass = Uint8Array.from(ncVariables("74").rate74, (rate) => rate >= 2.5 ? 1 : 0);
  const links = ncWeights("queen_unscaled");
  const { count, p } = localJoinCount(isOfClass, links);
  const names = textColumn("nc.csv", "NAME");
  const found = names.flatMap((id, i) =>
    isOfClass[i] ? [{ id, black_neighbours: count[i], p_ge: p[i] }] : []
  );
  assert.equal(found.length, expected.n_black);
  for (const { id, black_neighbours, p_ge } of expected.rows) {
    const row = found.find((each) => each.id === id)!;
    assert.equal(row.black_neighbours, black_neighbours);
    assert.ok(Math.abs(row.p_ge - p_ge) < 1e-12, `p of ${id} is ${row.p_ge}`);
  }
  const sum = found.reduce((total, row) => total + row.black_neighbours, 0);
  assert.equal(sum, 2 * expected.global_BB);
});

Deno.test("localJoinCount() adds up to twice the joins within the class", () => {
  const isOfClass = Uint8Array.from({ length: 30 }, (_, i) => i * i % 7 < 3 ? 1 : 0);
  const links = gridWeights(5, 6, { corners: true });
  const { count } = localJoinCount(isOfClass, links);
  const sum = count.reduce((total, each) => total + (each || 0), 0);
  const classes = Array.from(isOfClass, (member) => member ? "in" : "out");
  assert.equal(sum, 2 * joinCounts(classes, links).pairs[0].joins);
});

Deno.test("localJoinCount() has no answer for an area that is alone and p 1 for a class of one member", () => {
  const islandAndChain = {
    offsets: Uint32Array.of(0, 1, 3, 4, 4),
    indices: Uint32Array.of(1, 0, 2, 1),
  };
  const alone = localJoinCount(Uint8Array.of(0, 1, 0, 1), islandAndChain);
  assert.ok(Number.isNaN(alone.count[3]) && Number.isNaN(alone.p[3]));
  const lone = localJoinCount(Uint8Array.of(0, 1, 0, 0), islandAndChain);
  assert.deepEqual([lone.count[1], lone.p[1]], [0, 1]);
});

Deno.test("localJoinCount() refuses a class that none or all have", () => {
  assert.throws(() => localJoinCount(Uint8Array.of(0, 0, 0), chainWeights(3)), UnfitDataError);
  assert.throws(() => localJoinCount(Uint8Array.of(1, 1, 1), chainWeights(3)), /3 of 3 areas have/);
  assert.throws(() => localJoinCount(Uint8Array.of(1, 0), chainWeights(2)), UnfitDataError);
  assert.throws(() => localJoinCount(Uint8Array.of(1, 0), chainWeights(3)), RangeError);
});
