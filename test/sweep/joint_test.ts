import assert from "node:assert/strict";
import type { Standing } from "../../lib/sweep/family_weights.ts";
import { jointTest, medianScores, stepDownMax, weightedMedian } from "../../lib/sweep/joint.ts";
import { standardScores, twoSidedRanks } from "../../lib/sweep/standard_scores.ts";
import {
  gridWeights,
  linkWeights,
  randomNumbers,
  sharedStatistics,
  slowMoran,
} from "./small_maps.ts";

/*
 * Three by three areas, three of value 1 and six of value 0, on the observed map and four permuted ones:
 *
 *   observed   first      second     third      fourth
 *   1 1 1      1 0 0      1 0 1      1 1 0      0 1 0
 *   0 0 0      0 1 0      0 0 0      1 0 0      0 1 0
 *   0 0 0      0 0 1      1 0 0      0 0 0      0 1 0
 *
 * With z = 2/3 and -1/3 and sum z^2 = 2, Moran's I of unscaled weights is
 * (4 x pairs 1-1 - 2 x pairs 1-0 + pairs 0-0) / (2 x pairs). Edge has 12 pairs, touching 20:
 *
 *              observed        first            second          third          fourth
 *   edge       8 -  6 +  7 =  9  0 - 16 + 4 = -12  0 - 12 +  6 = -6   8 -  8 +  6 = 6  8 - 12 + 4 =   0  / 24
 *   touching   8 - 14 + 11 =  5  8 - 20 + 8 =  -4  0 - 18 + 11 = -7  12 - 14 + 10 = 8  8 - 28 + 4 = -16  / 40
 */
const MAPS = ["111000000", "100010001", "101000100", "110100000", "010010010"];
const EDGE = Float64Array.of(9 / 24, -12 / 24, -6 / 24, 6 / 24, 0);
const TOUCHING = Float64Array.of(5 / 40, -4 / 40, -7 / 40, 8 / 40, -16 / 40);
const BOTH: Standing[] = [["contiguity"], ["contiguity"]];

Deno.test("the hand-worked statistics of 3 x 3 areas are Moran's I", () => {
  MAPS.forEach((map, p) => {
    const values = Array.from(map, Number);
    close(slowMoran(values, gridWeights(3, 3, 1)), EDGE[p], 1e-15);
    close(slowMoran(values, gridWeights(3, 3, 1.5)), TOUCHING[p], 1e-15);
  });
});

Deno.test("jointTest() gives the hand-worked median and share on 3 x 3 areas and two definitions", () => {
  // edge: mean -0.6, squares 295.2 / 5, sd 7.6837; touching: mean -2.8, squares 370.8 / 5, sd 8.6116.
  // z edge:     1.2494 -1.4836 -0.7028 0.8590  0.0781   own p .4 .4 .8 .8 1
  // z touching: 0.9057 -0.1393 -0.4877 1.2541 -1.5328   own p .8 1 .8 .4 .4
  // medians (here midpoints): 1.0776 -0.8115 -0.5952 1.0565 -0.7274: the observed one is the largest, 2/5.
  // At level 0.5: shares 1/2 (edge, up), 1/2 (edge, down), 0, 1/2 and 1/2 (touching): 4 of 5 at least 1/2.
  const joint = jointTest([EDGE, TOUCHING], { standings: BOTH, level: 0.5 });
  const edgeScore = 9.6 / Math.sqrt(295.2 / 5), touchingScore = 7.8 / Math.sqrt(370.8 / 5);
  close(joint.median, (edgeScore + touchingScore) / 2, 1e-12);
  close(joint.median, 1.0776, 5e-5);
  assert.equal(joint.p, 0.4);
  assert.equal(joint.share, 0.5);
  assert.equal(joint.shareP, 0.8);
  assert.equal(joint.direction, "positive");
});

Deno.test("stepDownMax() gives the hand-worked p on 3 x 3 areas and two definitions", () => {
  // |z| observed: edge 1.2494 before touching 0.9057. Largest of both on each map: 1.2494 1.4836 0.7028
  // 1.2541 1.5328, four at least 1.2494: 4/5. Touching alone: 0.9057, 1.2541, 1.5328 reach it: 3/5,
  // raised to the 4/5 before it.
  assert.deepEqual(stepDownMax([EDGE, TOUCHING]), Float64Array.of(0.8, 0.8));
  assert.deepEqual(stepDownMax([TOUCHING, EDGE]), Float64Array.of(0.8, 0.8));
});

Deno.test("weightedMedian() takes the value in the middle of the weight, or the midpoint of two", () => {
  const values = Float64Array.of(5, 1, 9);
  assert.equal(weightedMedian(values, new Float64Array(3).fill(1 / 3)), 5);
  // 1 carries exactly half: midpoint of 1 and the next value, 5.
  assert.equal(weightedMedian(values, Float64Array.of(1 / 4, 1 / 2, 1 / 4)), 3);
  // 9 carries more than half.
  assert.equal(weightedMedian(values, Float64Array.of(0.2, 0.2, 0.6)), 9);
  // A value without weight has no say: the midpoint is of 1 and 9.
  assert.equal(weightedMedian(values, Float64Array.of(0, 1 / 2, 1 / 2)), 5);
  assert.equal(weightedMedian(Float64Array.of(7), Float64Array.of(1)), 7);
});

Deno.test("medianScores() does not let ten bands outvote one contiguity and one nearest", () => {
  // Weights: contiguity 1/3, nearest 1/3, ten bands 1/30 each. All bands say 3, contiguity -1, nearest 1:
  // the middle of the weight lies in nearest, while the plain median would be 3.
  const scores = [-1, 1, ...new Array(10).fill(3)].map((score) => Float64Array.of(score));
  const standings: Standing[] = [["contiguity"], ["nearest"], ...new Array(10).fill(["band"])];
  assert.deepEqual(medianScores(scores, standings), Float64Array.of(1));
});

Deno.test("jointTest() is the same whether equal definitions are merged or not", () => {
  const random = randomNumbers(11);
  const [a, b, c] = [1, 1.5, 2].map((reach) => gridWeights(4, 4, reach));
  const values = Float64Array.from({ length: 16 }, random);
  const [onA, onB, onC] = sharedStatistics(values, [a, b, c], { permutations: 99, random });
  const merged = jointTest([onA, onB, onC], {
    standings: [["contiguity", "graph", "graph"], ["contiguity"], ["band"]],
    level: 0.2,
  });
  const apart = jointTest([onA, onA, onA, onB, onC], {
    standings: [["contiguity"], ["graph"], ["graph"], ["contiguity"], ["band"]],
    level: 0.2,
  });
  assert.deepEqual(merged, apart);
  const adjusted = stepDownMax([onA, onA, onA, onB, onC]);
  assert.deepEqual(stepDownMax([onA, onB, onC]), Float64Array.from([0, 3, 4], (s) => adjusted[s]));
});

Deno.test("jointTest() mirrors when every statistic is negated", () => {
  const random = randomNumbers(12);
  const definitions = [1, 1.5].map((reach) => gridWeights(4, 4, reach));
  const values = Float64Array.from({ length: 16 }, (_, i) => i + 3 * random());
  const statistics = sharedStatistics(values, definitions, { permutations: 99, random });
  const options = { standings: BOTH, level: 0.05 };
  const joint = jointTest(statistics, options);
  const mirrored = jointTest(statistics.map((own) => own.map((value) => -value)), options);
  assert.equal(joint.direction, "positive");
  assert.equal(mirrored.direction, "negative");
  close(mirrored.median, -joint.median, 1e-12);
  assert.deepEqual(
    [mirrored.p, mirrored.share, mirrored.shareP],
    [joint.p, joint.share, joint.shareP],
  );
});

Deno.test("jointTest() and stepDownMax() leave out a definition with nothing to say", () => {
  const complete = new Float64Array(5).fill(-1 / 8), islands = new Float64Array(5).fill(NaN);
  const standings: Standing[] = [["band"], ...BOTH, ["nearest"]];
  assert.deepEqual(
    jointTest([complete, EDGE, TOUCHING, islands], { standings, level: 0.5 }),
    jointTest([EDGE, TOUCHING], { standings: BOTH, level: 0.5 }),
  );
  assert.deepEqual(
    stepDownMax([complete, EDGE, TOUCHING, islands]),
    Float64Array.of(NaN, 0.8, 0.8, NaN),
  );
  const nothing = jointTest([complete], { standings: [["band"]], level: 0.05 });
  assert.ok(
    Number.isNaN(nothing.p) && Number.isNaN(nothing.median) && Number.isNaN(nothing.shareP),
  );
});

Deno.test("stepDownMax() equals a slow direct version on random statistics", () => {
  const random = randomNumbers(21);
  for (let round = 0; round < 20; round++) {
    const common = Float64Array.from({ length: 40 }, () => random() - 0.5);
    const statistics = Array.from(
      { length: 1 + round % 6 },
      () => common.map((shared, map) => shared + random() - 0.5 + (map === 0 ? random() : 0)),
    );
    assert.deepEqual(stepDownMax(statistics), slowStepDown(statistics));
  }
});

/** Westfall & Young's steps read off one by one, each maximum taken anew. */
function slowStepDown(statistics: readonly Float64Array[]): Float64Array {
  const sizes = statistics.map((own) => Array.from(standardScores(own), Math.abs));
  const order = sizes.map((_, s) => s).sort((a, b) => sizes[b][0] - sizes[a][0]);
  const raw = order.map((s, step) => {
    const remaining = order.slice(step);
    const reaching = sizes[s].map((_, map) =>
      Math.max(...remaining.map((other) => sizes[other][map]))
    )
      .filter((largest) => largest >= sizes[s][0] - 1e-10);
    return reaching.length / sizes[s].length;
  });
  const adjusted = new Float64Array(order.length);
  order.forEach((s, step) => adjusted[s] = Math.max(...raw.slice(0, step + 1)));
  return adjusted;
}

/*
 * Five definitions of three families on a 5 x 5 grid of independent skewed values, P = 99, 600 times: what
 * the tests say when there is nothing to find.
 */
const NULL_STANDINGS: Standing[] = [["contiguity"], ["contiguity"], ["band"], ["band"], [
  "nearest",
]];
const ROUNDS = 600;

function nullRounds(): { median: number; share: number; smallest: number; adjusted: number }[] {
  const definitions = [
    ...[1, 1.5, 2, 2.5].map((reach) => gridWeights(5, 5, reach)),
    linkWeights(25, (i, j) => j === (i + 1) % 25 || j === (i + 7) % 25),
  ];
  const random = randomNumbers(2026);
  return Array.from({ length: ROUNDS }, () => {
    const values = Float64Array.from({ length: 25 }, () => -Math.log(1 - random()));
    const statistics = sharedStatistics(values, definitions, { permutations: 99, random });
    const joint = jointTest(statistics, { standings: NULL_STANDINGS, level: 0.05 });
    const own = statistics.map((s) => twoSidedRanks(standardScores(s))[0]);
    return {
      median: joint.p,
      share: joint.shareP,
      smallest: Math.min(...own),
      adjusted: Math.min(...stepDownMax(statistics)),
    };
  });
}

Deno.test("under the null the median p is uniform, the share conservative and the family-wise error held", () => {
  const rounds = nullRounds();
  const rate = (name: keyof typeof rounds[number], a: number) =>
    rounds.filter((round) => round[name] <= a + 1e-12).length / ROUNDS;
  // Kolmogorov-Smirnov at the p-values that 99 permutations can give: 0.02, 0.04, … 1. The 1 % bound.
  const steps = Array.from({ length: 50 }, (_, k) => (k + 1) / 50);
  const farthest = Math.max(...steps.map((a) => Math.abs(rate("median", a) - a)));
  assert.ok(farthest < 1.63 / Math.sqrt(ROUNDS), `median p is off uniform by ${farthest}`);
  const atMost = (a: number) => a + 3 * Math.sqrt(a * (1 - a) / ROUNDS);
  for (const a of steps) assert.ok(rate("share", a) <= atMost(a), `share p at ${a}`);
  assert.ok(rate("adjusted", 0.05) <= atMost(0.05), `family-wise error ${rate("adjusted", 0.05)}`);
  // The adjustment is needed: picking the best of the five finds something far too often.
  assert.ok(rate("smallest", 0.05) > atMost(0.05), `best of five ${rate("smallest", 0.05)}`);
});

function close(actual: number, expected: number, tolerance: number): void {
  assert.ok(Math.abs(actual - expected) <= tolerance, `${actual} is not ${expected}`);
}
