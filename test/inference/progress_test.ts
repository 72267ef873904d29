import assert from "node:assert/strict";
import { permuteMoran } from "../../lib/inference/permute_global.ts";
import { permuteLocalMoran } from "../../lib/inference/permute_local.ts";
import { permuteLocalGeary } from "../../lib/inference/permute_local_geary.ts";
import { testLocalMoran } from "../../lib/inference/test_local.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { gridWeights, normalNumbers, unequalWeights } from "../support/maps.ts";

const grid = gridWeights(60, 60, { corners: true });
const values = normalNumbers(3600, "progress");
for (let i = 0; i < 3600; i++) if (i % 60 < 6) values[i] += 4;

/** Rows of equal weights, of unequal ones, and a corner that is enumerated. */
const mixed: Weights = {
  ...unequalWeights(grid, "progress"),
  values: unequalWeights(grid, "progress").values.map((weight, e) =>
    e < grid.indices.length / 2 ? 1 : weight
  ),
};

type Run = (onProgress: (share: number) => void, workers: number) => Promise<unknown>;
const RUNS: Record<string, Run> = {
  "permuteLocalMoran() with ranked, weighed and escalated areas": (onProgress, workers) =>
    permuteLocalMoran(values, mixed, { permutations: 499_999, workers, onProgress }),
  "permuteLocalGeary()": (onProgress, workers) =>
    permuteLocalGeary(values, mixed, { permutations: 999_999, workers, onProgress }),
  "testLocalMoran() with a second draw": (onProgress, workers) =>
    testLocalMoran(values, grid, {
      permutations: 9_999,
      adjust: "bonferroni",
      workers,
      onProgress,
    }),
  "permuteMoran() of two definitions": (onProgress, workers) =>
    permuteMoran(values, [grid, mixed], { permutations: 9_999, workers, onProgress }),
};

for (const [name, run] of Object.entries(RUNS)) {
  for (const workers of [1, 2]) {
    Deno.test(`${name} tells progress every 100 ms, never falling, when there are ${workers} workers`, async () => {
      const shares: number[] = [], gaps: number[] = [];
      let last = performance.now();
      await run((share) => {
        shares.push(share);
        gaps.push(performance.now() - last);
        last = performance.now();
      }, workers);
      assert.ok(shares.length >= 2, `${shares.length} reports`);
      shares.forEach((share, i) => {
        assert.ok(share >= 0 && share <= 1, String(share));
        if (i > 0) assert.ok(share >= shares[i - 1], `${shares[i - 1]} to ${share}`);
      });
      // A busy machine may hold up a report or two; most come in time.
      const late = gaps.filter((gap) => gap > 100).length;
      assert.ok(late <= 3 + gaps.length / 2, `${late} of ${gaps.length} reports are late`);
    });
  }
}

Deno.test("permuteLocalMoran() can be aborted while it enumerates", async () => {
  // 250 areas of 3 neighbors or so: C(249, 3) is 2.5 million subsets, fewer than the permutations asked for.
  const controller = new AbortController();
  const run = permuteLocalMoran(normalNumbers(240, "enumerate"), gridWeights(2, 120), {
    permutations: 9_999_999,
    signal: controller.signal,
    onProgress: () => controller.abort(new Error("no longer needed")),
  });
  await assert.rejects(run, /no longer needed/);
});
