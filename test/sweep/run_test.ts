import assert from "node:assert/strict";
import { adjustP } from "../../lib/inference/adjust.ts";
import { permuteMoran } from "../../lib/inference/permute_global.ts";
import { twoSidedP } from "../../lib/inference/p_value.ts";
import { testLocalMoran } from "../../lib/inference/test_local.ts";
import { CLASS, TESTED_CLASSES } from "../../lib/sweep/area_classes.ts";
import type { SweepDefinition } from "../../lib/sweep/merge.ts";
import { runSweep } from "../../lib/sweep/run.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { AREA_CLASSES, type SweepResults } from "../../lib/write/results.ts";
import { gridWeights, linkWeights, randomNumbers } from "./small_maps.ts";

const SIDE = 12, COUNT = SIDE * SIDE;
/** At a floor of 2/10,000 no adjustment over 144 areas needs a second draw, which keeps the tests fast. */
const OPTIONS = { permutations: 99, localPermutations: 9999 };

/** A definition around weights; counts of pairs and the like are not looked at by the sweep. */
function definition(rule: string, weights: Weights, more: Partial<SweepDefinition> = {}) {
  return {
    rule,
    weightsText: "equal",
    family: "contiguity",
    main: false,
    topologySummary: {
      pairs: weights.indices.length / 2,
      islands: 0,
      components: 1,
      meanNeighbors: 4,
    },
    weights,
    ...more,
  } satisfies SweepDefinition;
}

const EDGE = definition("edge", gridWeights(SIDE, SIDE, 1), { main: true });
const TOUCHING = definition("touching", gridWeights(SIDE, SIDE, 1.5));
const BAND = definition("within:2km", gridWeights(SIDE, SIDE, 2), { family: "band" });

/** Noise with a block of high values in one corner. */
function plantedValues(): Float64Array {
  const random = randomNumbers(4);
  return Float64Array.from({ length: COUNT }, (_, i) => {
    const inBlock = Math.floor(i / SIDE) < 5 && i % SIDE < 5;
    return random() + random() + (inBlock ? 1.5 : 0);
  });
}

Deno.test("runSweep() finds a planted block under every definition and calls its middle steady", async () => {
  const outcome = await runSweep(plantedValues(), [EDGE, TOUCHING, BAND], OPTIONS);
  const { joint, definitions } = outcome.results;
  assert.equal(joint.p, 0.02);
  assert.equal(joint.share, 1);
  assert.equal(joint.direction, "positive");
  assert.deepEqual(definitions.map(({ rule }) => rule), ["edge", "touching", "within:2km"]);
  assert.ok(definitions.every(({ p, z }) => p === 0.02 && z! > 3));
  const middle = 2 * SIDE + 2;
  assert.ok(outcome.classes.every((own) => own[middle] === CLASS.highHigh));
  assert.equal(outcome.agree[middle], 1);
  assert.equal(outcome.steady[middle], "steady");
  assert.equal(outcome.modal[middle], CLASS.highHigh);
  assert.ok(outcome.results.stability.flaggedSteady >= 9);
  assert.deepEqual(outcome.families, [
    { family: "contiguity", definitions: 2, positive: 2, negative: 0 },
    { family: "band", definitions: 1, positive: 1, negative: 0 },
  ]);
});

Deno.test("runSweep() gives each definition what its own tests give", async () => {
  const values = plantedValues();
  const outcome = await runSweep(values, [EDGE, BAND], OPTIONS);
  const references = await permuteMoran(values, [EDGE.weights, BAND.weights], { permutations: 99 });
  const local = await testLocalMoran(values, BAND.weights, { permutations: 9999 });
  const [edge, band] = outcome.results.definitions;
  assert.equal(edge.value, references[0].observed);
  assert.equal(edge.p, twoSidedP(references[0]));
  assert.deepEqual(outcome.mainReference, references[0]);
  assert.equal(band.value, references[1].observed);
  const significant = local.sig.reduce((sum, own) => sum + own, 0);
  assert.equal(band.significantAreas, significant);
  assert.equal(edge.overlap, 1);
  assert.equal(band.overlap, outcome.overlaps[1]);
  assert.equal(outcome.results.joint.smallest, Math.min(edge.value!, band.value!));
});

Deno.test("runSweep() merges equal weights, names them and changes no result by it", async () => {
  const values = plantedValues();
  // Weights that differ within rows, so that all are tested in the same way, merged or not.
  const main = definition("edge", unevenWeights(), { main: true });
  const twin = definition("triangulated", unevenWeights(), { family: "graph" });
  const weighted = definition("edge", unevenWeights(), {
    family: "weighted",
    weightsText: "inverse:1",
  });
  const merged = await runSweep(values, [TOUCHING, main, twin, weighted, BAND], OPTIONS);
  assert.deepEqual(
    merged.results.definitions.map(({ rule, sameAs }) => [rule, ...sameAs]),
    [["edge", "triangulated", "edge with inverse:1"], ["touching"], ["within:2km"]],
  );
  // Unequal in the last bit of one weight, so nothing merges; the numbers differ by nothing that counts.
  const nudged = await runSweep(
    values,
    [TOUCHING, main, nudge(twin, 0), nudge(weighted, 1), BAND],
    OPTIONS,
  );
  assert.equal(nudged.results.definitions.length, 5);
  const { median, ...joint } = merged.results.joint;
  const { median: medianApart, ...jointApart } = nudged.results.joint;
  assert.ok(Math.abs(median! - medianApart!) < 1e-9);
  assert.deepEqual({ ...joint, smallest: 0 }, { ...jointApart, smallest: 0 });
  assert.deepEqual(merged.results.stability, nudged.results.stability);
  assert.deepEqual(merged.agree, nudged.agree);
  assert.deepEqual(merged.families.toSorted(byFamily), nudged.families.toSorted(byFamily));
});

function unevenWeights(): Weights {
  const { weights } = EDGE;
  return { ...weights, values: weights.values.map((_, link) => 1 + link % 3), equalInRows: false };
}

function byFamily(a: { family: string }, b: { family: string }): number {
  return a.family < b.family ? -1 : 1;
}

function nudge(of: SweepDefinition, link: number): SweepDefinition {
  const values = of.weights.values.slice();
  values[link] *= 1 + Number.EPSILON;
  return { ...of, weights: { ...of.weights, values } };
}

Deno.test("runSweep() gives a definition with nothing to say nulls and no say", async () => {
  const values = plantedValues();
  const nobody = definition("within:1m", linkWeights(COUNT, () => false), { family: "band" });
  const everyone = definition("within:99km", linkWeights(COUNT, () => true), { family: "band" });
  const with2 = await runSweep(values, [EDGE, TOUCHING, nobody, everyone], OPTIONS);
  const without = await runSweep(values, [EDGE, TOUCHING], OPTIONS);
  const [, , ofNobody, ofEveryone] = with2.results.definitions;
  assert.deepEqual([ofNobody.value, ofNobody.z, ofNobody.p, ofNobody.pAdjusted], [
    null,
    null,
    null,
    null,
  ]);
  assert.ok(Math.abs(ofEveryone.value! + 1 / (COUNT - 1)) < 1e-12);
  assert.deepEqual([ofEveryone.z, ofEveryone.p, ofEveryone.pAdjusted], [null, null, null]);
  const { smallest: _, ...joint } = with2.results.joint;
  const { smallest: __, ...jointWithout } = without.results.joint;
  assert.deepEqual(joint, jointWithout);
  assert.ok(with2.classes[2].every((own) => own === CLASS.alone));
});

Deno.test("runSweep() has an answer where no definition links anybody", async () => {
  const nobody = definition("within:1m", linkWeights(COUNT, () => false), { main: true });
  const { results, agree, steady, mainReference } = await runSweep(
    plantedValues(),
    [nobody],
    OPTIONS,
  );
  assert.equal(results.joint.p, null);
  assert.equal(results.joint.smallest, null);
  assert.equal(mainReference, null);
  assert.ok(agree.every(Number.isNaN));
  assert.ok(steady.every((word) => word === "quiet"));
});

Deno.test("runSweep() adjusts over the tested areas only and says nothing about the others", async () => {
  const values = plantedValues();
  const tested = Uint8Array.from({ length: COUNT }, (_, i) => i < COUNT / 2 ? 1 : 0);
  const outcome = await runSweep(values, [EDGE, BAND], { ...OPTIONS, tested });
  const { p } = await testLocalMoran(values, EDGE.weights, { permutations: 9999 });
  const q = adjustP(p.map((own, i) => tested[i] ? own : NaN), "bh");
  const flagged = q.filter((own) => own <= 0.05).length;
  assert.equal(outcome.results.definitions[0].significantAreas, flagged);
  assert.ok(outcome.steady.slice(COUNT / 2).every((word) => word === null));
  assert.ok(outcome.agree.slice(COUNT / 2).every(Number.isNaN));
  const { steady, mostly, fragile, quiet } = outcome.results.stability;
  assert.equal(steady + mostly + fragile + quiet, COUNT / 2);
});

Deno.test("runSweep() takes the main classes it is given and lists areas by row", async () => {
  const mainClasses = new Uint8Array(COUNT).fill(CLASS.noEvidence);
  const rows = Uint32Array.from({ length: COUNT }, (_, i) => 1000 + i);
  const outcome = await runSweep(plantedValues(), [EDGE, TOUCHING], {
    ...OPTIONS,
    mainClasses,
    rows,
  });
  assert.equal(outcome.results.definitions[0].significantAreas, 0);
  assert.equal(outcome.results.definitions[1].overlap, 0);
  const found = outcome.results.definitions[1].significantAreas;
  assert.equal(outcome.results.stability.onlyElsewhere.length, found);
  assert.ok(outcome.results.stability.onlyElsewhere.includes(1000 + 2 * SIDE + 2));
});

Deno.test("runSweep() enumerates the orders of a small map for all definitions together", async () => {
  // 6 areas in a row, 720 orders. With three 0 and three 1 both definitions' I falls with the number of
  // linked unlike pairs, which is smallest for 000111 and 111000: 2 x 3! x 3! = 72 orders.
  const chain = definition("edge", linkWeights(6, (i, j) => Math.abs(i - j) === 1), { main: true });
  const wide = definition("within:2km", linkWeights(6, (i, j) => Math.abs(i - j) <= 2));
  const { results } = await runSweep(Float64Array.of(0, 0, 0, 1, 1, 1), [chain, wide], OPTIONS);
  assert.equal(results.permutations, 720);
  assert.equal(results.definitions[0].p, 2 * 72 / 720);
  assert.equal(results.joint.p, 2 * 72 / 720);
});

Deno.test("runSweep() reports progress from 0 to 1 and stops when aborted", async () => {
  const shares: number[] = [];
  const onProgress = (share: number) => shares.push(share);
  await runSweep(plantedValues(), [EDGE, TOUCHING], { ...OPTIONS, permutations: 9999, onProgress });
  assert.deepEqual(shares, shares.toSorted((a, b) => a - b));
  assert.ok(shares.every((share) => share >= 0 && share <= 1));
  const signal = AbortSignal.abort(new Error("enough"));
  await assert.rejects(runSweep(plantedValues(), [EDGE], { ...OPTIONS, signal }), /enough/);
});

Deno.test("runSweep() refuses no main definition, two of them, and lengths that differ", async () => {
  const values = plantedValues();
  await assert.rejects(runSweep(values, [TOUCHING]), /0 main definitions/);
  await assert.rejects(runSweep(values, [EDGE, EDGE]), /2 main definitions/);
  await assert.rejects(runSweep(values.slice(1), [EDGE]), /143 values with "edge" for 144 areas/);
  await assert.rejects(
    runSweep(values, [EDGE], { rows: new Uint32Array(3) }),
    /144 values with "rows" for 3 areas/,
  );
});

Deno.test("the sweep's results fit results.json, and its class numbers the classes there", async () => {
  const outcome = await runSweep(plantedValues(), [EDGE], OPTIONS);
  const results: SweepResults = outcome.results;
  assert.ok(results.definitions[0].main);
  assert.deepEqual(TESTED_CLASSES, AREA_CLASSES.slice(0, TESTED_CLASSES.length));
});
