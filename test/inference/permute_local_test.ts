import assert from "node:assert/strict";
import { permuteLocalMoran } from "../../lib/inference/permute_local.ts";
import { twoSidedP } from "../../lib/inference/p_value.ts";
import { countsOf } from "../../lib/inference/sum_counts.ts";
import { TAIL_HITS } from "../../lib/inference/weighed_job.ts";
import { UnfitDataError, UsageError } from "../../lib/layer/errors.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { kolmogorovSmirnov } from "../support/kolmogorov.ts";
import {
  chainWeights,
  completeWeights,
  gridWeights,
  normalNumbers,
  unequalWeights,
} from "../support/maps.ts";
import { ncWeights } from "../support/nc_weights.ts";
import {
  numberColumn,
  referenceCase,
  rowStandardized,
  textColumn,
  weightsOfListFile,
  weightsOfMatrix,
} from "../support/reference.ts";

// Source: enum-*.json, all orders of the other values counted one by one.
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
  Deno.test(`permuteLocalMoran() counts every case when the map is ${map}`, async () => {
    const { inputs, expected } = referenceCase(`enum-${map}`);
    const found = await permuteLocalMoran(Float64Array.from(inputs.x), weightsOfMatrix(inputs.W));
    for (const { i, count_ge, count_le, total } of expected.local_moran_conditional) {
      if (found.permutations[i] === 0) {
        assert.ok(inputs.W[i].every((weight: number) => weight === 0));
        continue;
      }
      // The case counts orders of all the others, here subsets of neighbors: the same share.
      const each = total / found.permutations[i];
      assert.equal(found.enumerated[i], 1);
      assert.deepEqual(
        [found.atLeast[i] * each, found.atMost[i] * each],
        [count_ge, count_le],
        `area ${i}`,
      );
    }
  });
}

// Source: exact-local-*.json, integer subset-sum counting.
const ireland = () =>
  weightsOfListFile("eire_neighbours_cliff_ord.json", textColumn("eire_table.csv", "county"));
const EXACT: [string, () => Float64Array, () => Weights][] = [
  ["exact-local-eire-A", () => numberColumn("eire_table.csv", "A"), ireland],
  [
    "exact-local-eire-OWNCONS",
    () => numberColumn("eire_table.csv", "OWNCONS"),
    () => rowStandardized(ireland()),
  ],
  [
    "exact-local-nc-SID74-counts",
    () => numberColumn("nc.csv", "SID74"),
    () => ncWeights("queen_row"),
  ],
];
for (const [id, values, weights] of EXACT) {
  Deno.test(`permuteLocalMoran() is exact where enumerated and within 4 standard errors elsewhere on ${id}`, async () => {
    const { rows } = referenceCase(id).expected;
    const map = weights();
    const found = await permuteLocalMoran(values(), map, { permutations: 99_999 });
    let enumerated = 0;
    for (let i = 0; i < rows.length; i++) {
      const p = rows[i].p_local_I_upper, m = found.permutations[i];
      const allowed = found.enumerated[i] ? 1e-12 : 4 * Math.sqrt(p * (1 - p) / m) + 1e-12;
      assert.ok(Math.abs(found.atLeast[i] / m - p) <= allowed, rows[i].id);
      assert.equal(found.enumerated[i], Number(rows[i].subsets) < 99_999 ? 1 : 0, rows[i].id);
      if (!found.enumerated[i]) continue;
      enumerated++;
      assert.equal(m, Number(rows[i].subsets));
      assert.ok(
        Math.abs(twoSidedP(countsOf(found, i)) - rows[i].p_two_sided_doubled) < 1e-12,
        rows[i].id,
      );
    }
    assert.ok(enumerated > 5 && enumerated < rows.length);
  });
}

Deno.test("permuteLocalMoran() samples the same p for equal weights whether shared draws are ranked or weighed", async () => {
  const values = normalNumbers(100, "two routes"), equal = gridWeights(10, 10, { corners: true });
  // Weights a ten-billionth apart are weighed, though they ask the same question.
  const nearly = {
    ...equal,
    values: equal.values.map((_, e) => 1 + e % 7 * 1e-12),
    equalInRows: false,
  };
  const ranked = await permuteLocalMoran(values, equal, { permutations: 9_999 });
  const weighed = await permuteLocalMoran(values, nearly, { permutations: 9_999 });
  for (let i = 0; i < 100; i++) {
    if (ranked.enumerated[i]) continue;
    const [a, b] = [ranked.atLeast[i] / 9_999, weighed.atLeast[i] / 9_999];
    assert.ok(Math.abs(a - b) < 4 * Math.sqrt(2 * 0.25 / 9_999), `area ${i}: ${a} ${b}`);
  }
});

Deno.test("permuteLocalMoran() lets areas of unequal weights stop once both tails have enough", async () => {
  const values = normalNumbers(64, "stop");
  for (let i = 0; i < 64; i++) values[i] += i % 8 < 2 ? 3 : 0; // two high columns
  const weights = unequalWeights(gridWeights(8, 8, { corners: true }), "stop");
  const found = await permuteLocalMoran(values, weights, { permutations: 99_999 });
  let stopped = 0, capped = 0;
  for (let i = 0; i < 64; i++) {
    const rarer = Math.min(found.atLeast[i], found.atMost[i]);
    if (found.stopped[i]) {
      stopped++;
      assert.equal(rarer, TAIL_HITS);
      assert.ok(found.permutations[i] > 10_240);
    } else if (found.permutations[i] === 99_999) {
      capped++;
      assert.ok(rarer < TAIL_HITS);
    } else {
      assert.equal(found.permutations[i], 10_240);
      assert.ok(rarer >= TAIL_HITS);
    }
    assert.ok(found.atLeast[i] + found.atMost[i] >= found.permutations[i]);
  }
  assert.ok(stopped > 0 && capped > 0, `${stopped} stopped, ${capped} capped`);
});

Deno.test("permuteLocalMoran() has only ties when the own value is the mean or the neighbors are everybody", async () => {
  const values = Float64Array.from({ length: 21 }, (_, i) => i - 10);
  const weights = gridWeights(3, 7, { corners: true });
  const found = await permuteLocalMoran(values, weights, { permutations: 99 });
  assert.equal(found.atLeast[10], found.permutations[10]);
  assert.equal(found.atMost[10], found.permutations[10]);
  assert.equal(twoSidedP(countsOf(found, 10)), 1);

  const all = await permuteLocalMoran(normalNumbers(10, "all"), completeWeights(10));
  assert.deepEqual([...all.permutations], new Array(10).fill(1));
  assert.deepEqual([...all.atLeast], new Array(10).fill(1));
});

Deno.test("permuteLocalMoran() gives an area that is alone no permutations and no p", async () => {
  const weights = { ...chainWeights(4), offsets: Uint32Array.of(0, 1, 3, 5, 6, 6) };
  const found = await permuteLocalMoran(Float64Array.of(1, 2, 3, 4, 9), weights);
  assert.equal(found.permutations[4], 0);
  assert.ok(Number.isNaN(twoSidedP(countsOf(found, 4))));
});

Deno.test("permuteLocalMoran() turns the tails around when a row of equal weights is negative", async () => {
  const values = normalNumbers(30, "negative"), weights = gridWeights(5, 6);
  const negative = { ...weights, values: weights.values.map((value) => -value) };
  const plus = await permuteLocalMoran(values, weights, { permutations: 999 });
  const minus = await permuteLocalMoran(values, negative, { permutations: 999 });
  const corner = 0; // two neighbors: enumerated both as subsets and as arrangements of two
  assert.equal(minus.permutations[corner], 2 * plus.permutations[corner]);
  assert.equal(minus.atLeast[corner], 2 * plus.atMost[corner]);
});

Deno.test("permuteLocalMoran() gives the same counts for chosen areas as for all", async () => {
  const values = normalNumbers(100, "chosen"),
    weights = unequalWeights(gridWeights(10, 10), "chosen");
  const all = await permuteLocalMoran(values, weights, { permutations: 999 });
  const some = await permuteLocalMoran(values, weights, {
    permutations: 999,
    areas: Uint32Array.of(3, 44),
  });
  assert.deepEqual(countsOf(some, 44), countsOf(all, 44));
  assert.equal(some.permutations[45], 0);
});

Deno.test("permuteLocalMoran() has a uniform one-sided p under the null for one area of 300 simulated maps", async () => {
  const grid = gridWeights(9, 9, { corners: true });
  for (
    const [name, weights] of [["equal", grid], ["unequal", unequalWeights(grid, "ks")]] as const
  ) {
    const p: number[] = [];
    for (let map = 0; map < 300; map++) {
      const found = await permuteLocalMoran(normalNumbers(81, `local ${map}`), weights, {
        permutations: 199,
        seed: `${map}`,
        areas: Uint32Array.of(40),
      });
      p.push((found.atLeast[40] + 1) / 200);
    }
    // 1.63 / sqrt(300) is the 1 % point of the Kolmogorov-Smirnov distance; p steps by 1/200.
    assert.ok(kolmogorovSmirnov(p) < 1.63 / Math.sqrt(300) + 1 / 200, name);
  }
});

Deno.test("permuteLocalMoran() refuses numbers of permutations and of workers that nobody can draw", async () => {
  const values = Float64Array.of(1, 2, 3, 5), weights = chainWeights(4);
  for (const permutations of [0, -1, 98, 99.5, 10_000_000, NaN, Infinity]) {
    await assert.rejects(permuteLocalMoran(values, weights, { permutations }), (error) => {
      return error instanceof UsageError && error.message.includes(`${permutations} permutations`);
    });
  }
  for (const workers of [0, 1.5, NaN]) {
    await assert.rejects(permuteLocalMoran(values, weights, { workers }), UsageError);
  }
});

Deno.test("permuteLocalMoran() refuses values without an answer", async () => {
  const weights = chainWeights(4);
  await assert.rejects(permuteLocalMoran(Float64Array.of(2, 2, 2, 2), weights), UnfitDataError);
  for (const value of [NaN, Infinity, -Infinity]) {
    await assert.rejects(permuteLocalMoran(Float64Array.of(1, 2, value, 4), weights), (error) => {
      return error instanceof UnfitDataError && error.message.includes(`area 2 is ${value}`);
    });
  }
  await assert.rejects(permuteLocalMoran(Float64Array.of(1, 2), chainWeights(2)), /at least 3/);
  await assert.rejects(permuteLocalMoran(Float64Array.of(1, 2, 3), weights), RangeError);
});

Deno.test("permuteLocalMoran() refuses more neighbors than there are other areas and weights that are not finite", async () => {
  const values = Float64Array.of(1, 2, 3, 5), chain = chainWeights(4);
  const crowded = {
    offsets: Uint32Array.of(0, 4, 5, 6, 7),
    indices: Uint32Array.of(1, 2, 3, 3, 0, 0, 0),
    values: new Float64Array(7).fill(1),
    equalInRows: true,
  };
  await assert.rejects(
    permuteLocalMoran(values, crowded),
    /4 different neighbors for area 0 as there are only 3/,
  );
  for (const weight of [NaN, Infinity]) {
    const odd = { ...chain, values: chain.values.with(2, weight) };
    await assert.rejects(permuteLocalMoran(values, odd), new RegExp(`weight 2 is ${weight}`));
  }
});

Deno.test("permuteLocalMoran() takes an area whose weights are all 0 for one that is alone", async () => {
  const chain = chainWeights(4), values = Float64Array.of(1, 2, 3, 5);
  const found = await permuteLocalMoran(values, { ...chain, values: chain.values.with(0, 0) });
  assert.equal(found.permutations[0], 0);
  assert.ok(Number.isNaN(twoSidedP(countsOf(found, 0))));
  assert.ok(found.permutations[1] > 0);
});

Deno.test("permuteLocalMoran() rejects when its signal is aborted already", async () => {
  const run = permuteLocalMoran(normalNumbers(100, "abort"), gridWeights(10, 10), {
    signal: AbortSignal.abort(),
  });
  await assert.rejects(run, { name: "AbortError" });
});
