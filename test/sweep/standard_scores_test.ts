import assert from "node:assert/strict";
import { observedRank, standardScores, twoSidedRanks } from "../../lib/sweep/standard_scores.ts";
import { randomNumbers } from "./small_maps.ts";

Deno.test("standardScores() uses all maps, the observed one included, with divisor P + 1", () => {
  // 5, 1, 3: mean 3, squared deviations 4 + 4 + 0 over 3 maps, sd = sqrt(8 / 3).
  const sd = Math.sqrt(8 / 3);
  assert.deepEqual(standardScores(Float64Array.of(5, 1, 3)), Float64Array.of(2 / sd, -2 / sd, 0));
});

Deno.test("standardScores() is NaN where the statistic is the same on every map, or undefined", () => {
  // Everyone a neighbor of everyone: I is -1/(n - 1) up to rounding whatever the arrangement.
  const complete = Float64Array.of(-0.25, -0.25 + 1e-17, -0.25 - 3e-17);
  assert.ok(standardScores(complete).every(Number.isNaN));
  assert.ok(standardScores(new Float64Array(4).fill(NaN)).every(Number.isNaN));
});

Deno.test("twoSidedRanks() counts ties, near-ties included, in both tails", () => {
  // Largest of five alone: 2 x 1/5. The tied pair: 3 at least, 3 at most (itself, its twin, one beyond).
  const scores = Float64Array.of(2, 0.5, 0.5 + 1e-12, -1, -3);
  assert.deepEqual(twoSidedRanks(scores), Float64Array.of(0.4, 1, 1, 0.8, 0.4));
});

Deno.test("twoSidedRanks() equals direct counting on random scores with ties", () => {
  const random = randomNumbers(5);
  const scores = Float64Array.from({ length: 60 }, () => Math.floor(random() * 12));
  const slow = scores.map((own) => {
    const atLeast = scores.filter((score) => score >= own).length;
    const atMost = scores.filter((score) => score <= own).length;
    return Math.min(1, 2 * Math.min(atLeast, atMost) / 60);
  });
  assert.deepEqual(twoSidedRanks(scores), slow);
  assert.equal(observedRank(scores), slow[0]);
});

Deno.test("twoSidedRanks() and observedRank() stay NaN for a definition with nothing to say", () => {
  const mute = new Float64Array(3).fill(NaN);
  assert.ok(twoSidedRanks(mute).every(Number.isNaN));
  assert.ok(Number.isNaN(observedRank(mute)));
});
