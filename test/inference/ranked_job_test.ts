import assert from "node:assert/strict";
import { createDealer } from "../../lib/inference/dealer.ts";
import {
  drawsOf,
  openRankedCounter,
  type RankedJob,
  rankedWorkload,
} from "../../lib/inference/ranked_job.ts";
import { seedFromText } from "../../lib/inference/seed.ts";
import { openStream } from "../../lib/inference/stream.ts";
import { awkwardValues, randomNumbers } from "../support/maps.ts";

/** Areas 0 … 9 with 2 neighbors, 10 … 24 with 3, the rest not tested; neighbors' sums made up of real ones. */
function exampleJob(values: Float64Array, permutations: number): RankedJob {
  const pick = randomNumbers(200, "neighbors").map((u) => Math.floor(u * values.length));
  const observed = Float64Array.from({ length: 25 }, (_, area) => {
    let sum = 0;
    for (let m = 0; m < (area < 10 ? 2 : 3); m++) sum += values[pick[7 * area + m]];
    return sum;
  });
  return {
    kind: "ranked",
    seed: seedFromText("ranked"),
    permutations,
    z: values,
    observed,
    degrees: Uint32Array.of(2, 3),
    starts: Uint32Array.of(0, 10, 25),
  };
}

/** The slow and obvious way: every area looks at every permutation. */
function countOneByOne({ z, observed, degrees, starts, seed, permutations }: RankedJob) {
  const draws = degrees[degrees.length - 1] + 1;
  const dealer = createDealer(z.length, draws);
  const atLeast = new Uint32Array(observed.length), atMost = new Uint32Array(observed.length);
  for (let p = 0; p < permutations; p++) {
    if (p % 1024 === 0) dealer.open(openStream(seed, "rankedBlock", p / 1024));
    dealer.deal();
    for (let area = 0; area < observed.length; area++) {
      const degree = area < starts[1] ? degrees[0] : degrees[1];
      const first = [...dealer.drawn.slice(0, degree)].map((drawn) =>
        drawn === area ? dealer.drawn[degree] : drawn
      );
      const sum = first.reduce((total, drawn) => total + z[drawn], 0);
      if (sum >= observed[area] - 1e-10) atLeast[area]++;
      if (sum <= observed[area] + 1e-10) atMost[area]++;
    }
  }
  return { atLeast, atMost };
}

for (const [kind, values] of Object.entries(awkwardValues(30))) {
  Deno.test(`openRankedCounter() counts what looking one by one counts when values are ${kind}`, () => {
    const job = exampleJob(values, 3000);
    const counter = openRankedCounter(job);
    for (let unit = 0; unit < rankedWorkload(job).units; unit++) for (const _ of counter.run(unit));
    assert.deepEqual(counter.finish(), countOneByOne(job));
  });
}

Deno.test("openRankedCounter() adds up to the same counts when units are shared out in any order", () => {
  const wide = { ...exampleJob(awkwardValues(30).tied, 140_000) };
  assert.equal(rankedWorkload(wide).units, 3);
  const whole = openRankedCounter(wide),
    first = openRankedCounter(wide),
    second = openRankedCounter(wide);
  for (const unit of [2, 0, 1]) for (const _ of whole.run(unit));
  for (const _ of first.run(0));
  for (const unit of [2, 1]) for (const _ of second.run(unit));
  const sum = first.finish().atLeast.map((count, i) => count + second.finish().atLeast[i]);
  assert.deepEqual(sum, whole.finish().atLeast);
  assert.equal(drawsOf(wide), 4);
});
