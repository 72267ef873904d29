import assert from "node:assert/strict";
import { checkConstantRisk, type ConstantRisk } from "../../lib/inference/constant_risk.ts";
import { constantRiskMaps } from "../../lib/inference/constant_risk_maps.ts";
import { seedFromText } from "../../lib/inference/seed.ts";
import { drawUniform, openStream } from "../../lib/inference/stream.ts";
import { UsageError } from "../../lib/layer/errors.ts";
import { freemanTukey } from "../../lib/prepare/freeman_tukey.ts";
import type { RateCounts } from "../../lib/prepare/rate_moments.ts";
import { standardizedRates } from "../../lib/prepare/standardized_rates.ts";
import { moranI } from "../../lib/statistics/moran.ts";
import { assertClose } from "../support/close.ts";
import { gridWeights, randomNumbers } from "../support/maps.ts";

const seed = seedFromText("constant risk");
const streamsOf = (count: number) =>
  Array.from({ length: count }, (_, m) => openStream(seed, "simulatedMap", m));

/** Probabilities of 0 … n successes, each from the one before. */
function binomial(n: number, p: number): number[] {
  const probabilities = [(1 - p) ** n];
  for (let k = 1; k <= n; k++) {
    probabilities.push(probabilities[k - 1] * (n - k + 1) / k * p / (1 - p));
  }
  return probabilities;
}

/** Largest distance between the cumulated shares of counts and of a distribution. */
function distance(counts: readonly number[], probabilities: readonly number[]): number {
  let expected = 0, largest = 0;
  probabilities.forEach((probability, k) => {
    expected += probability;
    const seen = counts.filter((count) => count <= k).length / counts.length;
    largest = Math.max(largest, Math.abs(seen - expected));
  });
  return largest;
}

// In a multinomial draw each count, and each sum of counts, is binomial. 3 cases are added one by one only; 60 by both
// ways; of 400 some must be taken away. 1.95 / sqrt(m) is the 0.1 % point of Kolmogorov and Smirnov.
for (const total of [3, 60, 400]) {
  Deno.test(`constantRiskMaps() draws from the multinomial distribution when there are ${total} cases`, () => {
    const counts = {
      cases: Float64Array.of(total, 0, 0),
      population: Float64Array.of(20.5, 49.5, 30),
    };
    const maps = constantRiskMaps(counts, streamsOf(2000));
    assert.ok(maps.every((map) => map.reduce((sum, count) => sum + count, 0) === total));
    assert.ok(maps.every((map) => map.every((count) => count >= 0 && Number.isInteger(count))));
    const limit = 1.95 / Math.sqrt(maps.length);
    [0.205, 0.495, 0.3].forEach((share, i) =>
      assert.ok(distance(maps.map((map) => map[i]), binomial(total, share)) < limit, `area ${i}`)
    );
    assert.ok(distance(maps.map((map) => map[0] + map[2]), binomial(total, 0.505)) < limit);
  });
}

// Whole populations whose 3 areas hold 4, 6 and 5 persons: C(4, k) C(11, 12 - k) / C(15, 12), likewise for the others.
Deno.test("constantRiskMaps() counts nobody twice when the rate is a share", () => {
  const population = Float64Array.of(4, 6, 5);
  const counts = { cases: Float64Array.of(4, 6, 2), population, share: true };
  const maps = constantRiskMaps(counts, streamsOf(4000));
  const limit = 1.95 / Math.sqrt(maps.length);
  const choose = (n: number, k: number): number =>
    k < 0 || k > n ? 0 : k === 0 ? 1 : choose(n - 1, k - 1) * n / k;
  population.forEach((size, i) => {
    const probabilities = Array.from(
      { length: size + 1 },
      (_, k) => choose(size, k) * choose(15 - size, 12 - k) / choose(15, 12),
    );
    assert.ok(maps.every((map) => map[i] <= size));
    assert.ok(distance(maps.map((map) => map[i]), probabilities) < limit, `area ${i}`);
  });
  assert.ok(maps.every((map) => map[0] + map[1] + map[2] === 12));
});

Deno.test("constantRiskMaps() gives a map the same counts whichever maps are drawn with it", () => {
  const counts = { cases: Float64Array.of(30, 9, 1), population: Float64Array.of(10, 20, 30) };
  const together = constantRiskMaps(counts, streamsOf(5));
  assert.deepEqual(constantRiskMaps(counts, streamsOf(5).slice(3))[0], together[3]);
});

/** A 6 × 6 map with populations from 30 to 3,000. */
const weights = gridWeights(6, 6);
const population = randomNumbers(36, "sizes").map((u) => Math.round(30 * 100 ** u));

/** Deals cases out one by one in proportion to population times risk: the slow obvious way. */
function dealtOut(cases: number, name: string, risk: (area: number) => number): RateCounts {
  const shares = population.map((size, area) => size * risk(area));
  const all = shares.reduce((sum, share) => sum + share, 0);
  const stream = openStream(seedFromText(name), "simulatedMap", 0);
  const counts = new Float64Array(36);
  for (let left = cases; left > 0; left--) {
    let x = drawUniform(stream) * all, area = 0;
    while (area < 35 && x >= shares[area]) x -= shares[area++];
    counts[area]++;
  }
  return { cases: counts, population };
}

function check(counts: RateCounts, permutations: number): Promise<ConstantRisk> {
  return checkConstantRisk(counts, weights, { valuesOf: standardizedRates, permutations });
}

Deno.test("checkConstantRisk() rejects one risk for all as often as it says", async () => {
  const maps = 400, level = 0.1;
  let moran = 0, varied = 0;
  for (let map = 0; map < maps; map++) {
    const found = await check(dealtOut(300, `map ${map}`, () => 1), 99);
    if (found.moran.p <= level) moran++;
    if (found.overdispersion.p <= level) varied++;
  }
  // With 99 maps p is a multiple of 0.02 and 0.01: 0.1 can be reached exactly. 4 standard errors are 0.06.
  const allowed = 4 * Math.sqrt(level * (1 - level) / maps);
  assert.ok(Math.abs(moran / maps - level) < allowed, `I: ${moran} of ${maps}`);
  assert.ok(Math.abs(varied / maps - level) < allowed, `over-dispersion: ${varied} of ${maps}`);
});

Deno.test("checkConstantRisk() tells clustered from more variable than chance", async () => {
  const left = (area: number) => area % 6 < 3;
  const halves = await check(dealtOut(3000, "halves", (area) => left(area) ? 2 : 1), 999);
  assert.equal(halves.moran.p, 0.002);
  assert.equal(halves.overdispersion.p, 0.001);
  assert.ok(halves.overdispersion.index > 1);
  const even = await check(dealtOut(3000, "even", () => 1), 999);
  assert.ok(even.moran.p > 0.05 && even.overdispersion.p > 0.05);
  // Risks that differ, but not by place: dealt to the areas at random.
  const mixed = randomNumbers(36, "mixed");
  const varied = await check(dealtOut(3000, "varied", (area) => mixed[area] < 0.5 ? 2 : 1), 999);
  assert.equal(varied.overdispersion.p, 0.001);
  assert.ok(varied.moran.p > 0.05, `p ${varied.moran.p}`);
});

Deno.test("checkConstantRisk() compares the same I as moranI(), for any values made of counts", async () => {
  const counts = dealtOut(300, "one", () => 1);
  for (const valuesOf of [standardizedRates, freemanTukey]) {
    const { moran, maps } = await checkConstantRisk(counts, weights, { valuesOf });
    assertClose(moran.observed, moranI(valuesOf(counts), weights).value, 1e-12);
    assert.equal(maps, 999);
    assert.ok(moran.atLeast + moran.atMost >= maps);
    assert.ok(Math.abs(moran.mean + 1 / 35) < 0.02, `mean ${moran.mean}`);
  }
});

Deno.test("checkConstantRisk() depends on its seed and on nothing else", async () => {
  const counts = dealtOut(200, "seeded", () => 1);
  const of = (text: string) =>
    checkConstantRisk(counts, weights, {
      valuesOf: standardizedRates,
      permutations: 99,
      seed: text,
    });
  assert.deepEqual(await of("a"), await of("a"));
  assert.notEqual((await of("a")).moran.mean, (await of("b")).moran.mean);
});

Deno.test("checkConstantRisk() has no p for over-dispersion when there is one case", async () => {
  const cases = new Float64Array(36);
  cases[7] = 1;
  const { overdispersion } = await check({ cases, population }, 99);
  assert.ok(Number.isNaN(overdispersion.index) && Number.isNaN(overdispersion.p));
});

Deno.test("checkConstantRisk() stops when it is aborted, and refuses too few maps", async () => {
  const counts = dealtOut(200, "stopped", () => 1);
  const options = { valuesOf: standardizedRates, signal: AbortSignal.abort() };
  await assert.rejects(checkConstantRisk(counts, weights, options), { name: "AbortError" });
  await assert.rejects(check(counts, 10), UsageError);
});
