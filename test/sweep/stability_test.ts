import assert from "node:assert/strict";
import { CLASS, isFlagged, TESTED_CLASSES } from "../../lib/sweep/area_classes.ts";
import { familyWeights, type Standing } from "../../lib/sweep/family_weights.ts";
import {
  agreement,
  flips,
  modalClasses,
  onlyElsewhere,
  overlap,
  overlapTable,
  steadiness,
} from "../../lib/sweep/stability.ts";
import { randomNumbers } from "./small_maps.ts";

const { highHigh: HH, lowLow: LL, highLow: HL, lowHigh: LH, noEvidence: NO, alone: AL } = CLASS;

/*
 * Five areas (columns) under five definitions of three families; the first is the main one.
 */
const STANDINGS: Standing[] = [["contiguity"], ["contiguity"], ["band"], ["band"], ["nearest"]];
const CLASSES = [
  [HH, NO, HH, AL, AL],
  [HH, NO, NO, NO, AL],
  [HH, NO, AL, LL, AL],
  [NO, NO, HL, NO, AL],
  [HH, NO, NO, NO, AL],
].map((row) => Uint8Array.from(row));

Deno.test("agreement() averages within families first, then over families", () => {
  const agree = agreement(CLASSES, { standings: STANDINGS, main: 0 });
  // First area: contiguity 2/2, band 1/2, nearest 1/1 -> 5/6 (the plain share would be 4/5).
  assert.ok(Math.abs(agree[0] - 5 / 6) < 1e-15);
  assert.equal(agree[1], 1);
});

Deno.test("agreement() leaves out definitions in which the area is alone", () => {
  const agree = agreement(CLASSES, { standings: STANDINGS, main: 0 });
  // Third area: contiguity 1/2, band 0/1 (one of two left out), nearest 0/1 -> 1/6.
  assert.ok(Math.abs(agree[2] - 1 / 6) < 1e-15);
  // Fourth: alone in the main definition only; nobody who tests it agrees. Fifth: alone everywhere.
  assert.equal(agree[3], 0);
  assert.ok(Number.isNaN(agree[4]));
});

Deno.test("agreement() does not average a family in which the area is always alone", () => {
  // contiguity 1/1; band has the area alone and does not pull the share down.
  const classes = [HH, AL, AL].map((own) => Uint8Array.of(own));
  const standings: Standing[] = [["contiguity"], ["band"], ["band"]];
  assert.deepEqual(agreement(classes, { standings, main: 0 }), Float64Array.of(1));
});

Deno.test("agreement() is the same whether equal definitions are merged or not", () => {
  const random = randomNumbers(3);
  const draw = () => Uint8Array.from({ length: 50 }, () => Math.floor(random() * 6));
  const [a, b, c] = [draw(), draw(), draw()];
  const merged: Standing[] = [["contiguity", "graph", "graph"], ["graph"], ["band"]];
  const apart: Standing[] = [["contiguity"], ["graph"], ["graph"], ["graph"], ["band"]];
  const once = agreement([a, b, c], { standings: merged, main: 0 });
  const often = agreement([a, a, a, b, c], { standings: apart, main: 0 });
  assert.deepEqual(once, often);
});

Deno.test("steadiness() gives a word only to areas that some definition finds significant", () => {
  const agree = agreement(CLASSES, { standings: STANDINGS, main: 0 });
  // 5/6; nobody significant; 1/6; significant elsewhere only; alone everywhere.
  assert.deepEqual(steadiness(CLASSES, agree), ["steady", "quiet", "fragile", "fragile", "quiet"]);
});

Deno.test("steadiness() puts 80 % to steady and 50 % to mostly, in spite of rounding", () => {
  const flagged = [new Uint8Array(4)];
  const almost = (0.7 + 0.9) / 2 - Number.EPSILON;
  assert.deepEqual(
    steadiness(flagged, Float64Array.of(almost, 0.79, 0.5 - Number.EPSILON, 0.49)),
    ["steady", "mostly", "mostly", "fragile"],
  );
});

Deno.test("onlyElsewhere() lists areas that another definition finds and the main one does not", () => {
  assert.deepEqual(onlyElsewhere(CLASSES, 0), [3]);
  assert.deepEqual(onlyElsewhere(CLASSES, 3), [0, 3]);
});

Deno.test("flips() lists areas whose surroundings change between high and low", () => {
  const classes = [
    [HH, LL, HH, LH, HH, NO],
    [HL, LH, NO, LH, HH, HL],
  ].map((row) => Uint8Array.from(row));
  assert.deepEqual(flips(classes), [0, 1]);
});

Deno.test("modalClasses() weighs by family and prefers the main class among ties", () => {
  const weights = familyWeights(STANDINGS);
  // First area: HH has all of contiguity (1/6 + 1/6), band 1/6, nearest 1/3: 5/6.
  // Third: HH 1/6, none 1/6 + 1/3, HL 1/6: no evidence. Fourth: none 1/6 + 1/6 + 1/3. Fifth: alone.
  assert.deepEqual(modalClasses(CLASSES, { weights, main: 0 }), Uint8Array.of(HH, NO, NO, NO, AL));
  const tied = [[LL], [HH], [NO]].map((row) => Uint8Array.from(row));
  const equal = new Float64Array(3).fill(1 / 3);
  assert.deepEqual(modalClasses(tied, { weights: equal, main: 2 }), Uint8Array.of(NO));
  const alone = [[AL], [LL], [HH]].map((row) => Uint8Array.from(row));
  assert.deepEqual(modalClasses(alone, { weights: equal, main: 0 }), Uint8Array.of(HH));
});

Deno.test("overlap() is both over either, and undefined where neither finds any", () => {
  assert.equal(overlap(CLASSES[0], CLASSES[0]), 1);
  // Main finds 0 and 2; the third definition 0 and 3: one of three.
  assert.equal(overlap(CLASSES[0], CLASSES[2]), 1 / 3);
  assert.equal(overlap(CLASSES[2], CLASSES[0]), 1 / 3);
  const none = new Uint8Array(5).fill(NO);
  assert.ok(Number.isNaN(overlap(none, none)));
});

Deno.test("overlapTable() holds the overlap of every two definitions", () => {
  const table = overlapTable(CLASSES);
  CLASSES.forEach((a, row) =>
    CLASSES.forEach((b, column) => assert.equal(table[5 * row + column], overlap(a, b)))
  );
});

Deno.test("class numbers are positions in the list of classes, findings first", () => {
  assert.equal(TESTED_CLASSES[HH], "high among high");
  assert.equal(TESTED_CLASSES[LH], "low among high");
  assert.equal(TESTED_CLASSES[NO], "no evidence");
  assert.equal(TESTED_CLASSES[AL], "alone");
  assert.deepEqual([HH, LL, HL, LH, NO, AL].map(isFlagged), [true, true, true, true, false, false]);
});
