import assert from "node:assert/strict";
import { gather } from "../../lib/inference/gather.ts";
import type { Counter } from "../../lib/inference/job.ts";
import { compileKernel } from "../../lib/inference/load_kernel.ts";
import { scaleRows } from "../../lib/inference/local_rows.ts";
import { orderAreas } from "../../lib/inference/order_areas.ts";
import { pairLinks, quadraticForm } from "../../lib/inference/pair_links.ts";
import type { PairTerm } from "../../lib/inference/pair_term.ts";
import {
  openRankedCounter,
  type RankedJob,
  rankedWorkload,
} from "../../lib/inference/ranked_job.ts";
import { openRankedKernel } from "../../lib/inference/ranked_kernel.ts";
import { seedFromText } from "../../lib/inference/seed.ts";
import {
  openShuffleCounter,
  type ShuffleJob,
  shuffleJob,
  shuffleWorkload,
} from "../../lib/inference/shuffle_job.ts";
import { openShuffleKernel } from "../../lib/inference/shuffle_kernel.ts";
import { openShuffleSingles } from "../../lib/inference/shuffle_singles.ts";
import {
  openWeighedCounter,
  type WeighedJob,
  weighedWorkload,
} from "../../lib/inference/weighed_job.ts";
import { openWeighedKernel } from "../../lib/inference/weighed_kernel.ts";
import { standardize } from "../../lib/statistics/standardize.ts";
import { weightSums } from "../../lib/weights/sums.ts";
import { spatialLag } from "../../lib/weights/lag.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import {
  awkwardValues,
  gridWeights,
  normalNumbers,
  randomNumbers,
  unequalWeights,
} from "../support/maps.ts";
import { weightsOfMatrix } from "../support/reference.ts";

const kernel = compileKernel()!;

function finish<Part>(counter: Counter<Part>, units: number): Part {
  for (let unit = 0; unit < units; unit++) for (const _ of counter.run(unit));
  return counter.finish();
}

function rankedJob(values: Float64Array, weights: Weights, permutations: number): RankedJob {
  const { z } = standardize(values);
  const observed = spatialLag(weights, z);
  const { places, degrees, starts } = orderAreas(
    Uint32Array.from(z, (_, area) => weights.offsets[area + 1] - weights.offsets[area]),
    observed,
  );
  return {
    kind: "ranked",
    seed: seedFromText("twins"),
    permutations,
    z: gather(z, places),
    observed: gather(observed, places),
    degrees,
    starts,
  };
}

/** A map in which the number of neighbors runs from 1 to 60, so that draws are many and distinct counts too. */
function manyDegrees(n: number): Weights {
  const uniform = randomNumbers(n * n, "many degrees");
  return weightsOfMatrix(Array.from({ length: n }, (_, i) => {
    const row = new Array<number>(n).fill(0);
    const others = [...row.keys()].filter((j) => j !== i).sort((a, b) =>
      uniform[i * n + a] - uniform[i * n + b]
    );
    for (const j of others.slice(0, 1 + i % 60)) row[j] = 1;
    return row;
  }));
}

Deno.test("compileKernel() finds WebAssembly with vectors where the tests run", () => {
  assert.ok(kernel instanceof WebAssembly.Module);
});

for (const [kind, values] of Object.entries(awkwardValues(400))) {
  Deno.test(`openRankedKernel() counts what plain TypeScript counts when values are ${kind}`, () => {
    const job = rankedJob(values, gridWeights(20, 20, { corners: true }), 140_000);
    const { units } = rankedWorkload(job);
    assert.equal(units, 3);
    assert.deepEqual(
      finish(openRankedKernel(job, kernel), units),
      finish(openRankedCounter(job), units),
    );
  });

  Deno.test(`openRankedKernel() counts what plain TypeScript counts on 60 neighbor counts when values are ${kind}`, () => {
    const job = rankedJob(values.slice(0, 120), manyDegrees(120), 5_000);
    assert.equal(job.degrees.length, 60);
    const { units } = rankedWorkload(job);
    assert.deepEqual(
      finish(openRankedKernel(job, kernel), units),
      finish(openRankedCounter(job), units),
    );
  });

  for (const term of ["score", "squaredDifference"] as const) {
    Deno.test(`openWeighedKernel() counts what plain TypeScript counts of each ${term} when values are ${kind}`, () => {
      for (const stopping of [false, true]) {
        const job = weighedJob(values, term, stopping);
        const { units } = weighedWorkload(job);
        const plain = finish(openWeighedCounter(job), units);
        assert.deepEqual(finish(openWeighedKernel(job, kernel), units), plain);
        if (stopping) assert.ok(plain[0].stopped.includes(1));
      }
    });
  }

  Deno.test(`openShuffleKernel() sums what plain TypeScript sums when values are ${kind}`, () => {
    const job = globalJob(values, 75);
    const { units } = shuffleWorkload(job);
    const singles = finish(openShuffleSingles(job), units);
    assert.deepEqual(finish(openShuffleKernel(job, kernel), units), singles);
    const doubles = finish(openShuffleCounter(job), units);
    singles.forEach(({ sums }, unit) =>
      sums.forEach((each, d) =>
        each.forEach((sum, p) =>
          assert.ok(Math.abs(sum - doubles[unit].sums[d][p]) <= job.doubt[d])
        )
      )
    );
  });
}

function weighedJob(values: Float64Array, term: PairTerm, stopping: boolean): WeighedJob {
  const { z } = standardize(values);
  const weights = unequalWeights(gridWeights(20, 20, { corners: true }), "twins");
  const areas = Uint32Array.from(z.keys());
  return {
    kind: "weighed",
    seed: seedFromText("twins"),
    from: stopping ? 2048 : 0,
    to: stopping ? 8_000 : 3_000,
    stopping,
    z,
    term,
    areas,
    ...scaleRows(weights, areas, { z, term }),
    atLeast: new Uint32Array(z.length).fill(stopping ? 3 : 0),
    atMost: new Uint32Array(z.length).fill(stopping ? 20 : 0),
  };
}

function globalJob(values: Float64Array, permutations: number): ShuffleJob {
  const { z } = standardize(values);
  const grid = gridWeights(20, 20, { corners: true });
  const definitions = [grid, unequalWeights(grid, "global")];
  return shuffleJob({
    z,
    seed: seedFromText("twins"),
    permutations,
    definitions: definitions.map((weights) => pairLinks(weights)),
    totals: definitions.map((weights) => weightSums(weights).s0),
  });
}

Deno.test("openShuffleKernel() sums what plain TypeScript sums when some areas lie in other places", () => {
  const grid = gridWeights(20, 20, { corners: true });
  const places = Uint32Array.from({ length: 400 }, (_, i) => 7 * i % 400);
  const { z } = standardize(normalNumbers(400, "moved"));
  const job = shuffleJob({
    z,
    seed: seedFromText("moved"),
    permutations: 75,
    definitions: [pairLinks(grid), pairLinks(grid, places)],
    totals: [weightSums(grid).s0, weightSums(grid).s0],
  });
  const { units } = shuffleWorkload(job);
  const singles = finish(openShuffleSingles(job), units);
  assert.deepEqual(finish(openShuffleKernel(job, kernel), units), singles);
  for (const { sums: [still, moved] } of singles) {
    still.forEach((sum, p) => assert.ok(Math.abs(sum - moved[p]) < 1e-3 * Math.sqrt(400)));
  }
});

Deno.test("openShuffleKernel() computes sums near the observed one again in double precision", () => {
  const job = globalJob(normalNumbers(400, "doubt"), 32);
  const [{ sums: [sums] }] = finish(openShuffleKernel(job, kernel), 1);
  const exact = finish(openShuffleCounter(job), 1)[0].sums[0];
  assert.notDeepEqual(sums, exact);
  const doubtful = { ...job, doubt: job.doubt.map(() => Infinity) };
  assert.deepEqual(finish(openShuffleKernel(doubtful, kernel), 1)[0].sums[0], exact);
});

Deno.test("pairLinks() keeps the quadratic form of one-way and unequal links", () => {
  const matrix = [[0, 2, 0, 1], [1, 0, 0, 0], [5, 0, 0, 3], [0, 0, 0, 0]];
  const z = Float64Array.of(1, -2, 3, 0.5);
  // By hand: 2·1·(-2) + 1·1·0.5 + 1·(-2)·1 + 5·3·1 + 3·3·0.5 = -4 + 0.5 - 2 + 15 + 4.5 = 14.
  const pairs = pairLinks(weightsOfMatrix(matrix));
  assert.equal(quadraticForm(pairs, z), 14);
  assert.deepEqual([...pairs.indices], [1, 2, 3, 3]);
});

Deno.test("orderAreas() puts few neighbors first and observed values in ascending order", () => {
  const found = orderAreas(Uint32Array.of(3, 2, 3, 2, 3), Float64Array.of(0.5, 4, -7, -4, 1e-3));
  assert.deepEqual([...found.places], [3, 1, 2, 4, 0]);
  assert.deepEqual([...found.degrees], [2, 3]);
  assert.deepEqual([...found.starts], [0, 2, 5]);
});
