import assert from "node:assert/strict";
import { median } from "./interleave.ts";
import { type Comparison, comparisonTable, isMet } from "./section.ts";

const twice: Comparison = {
  what: "job",
  ours: 1,
  peer: 2,
  target: "at least 2 x faster",
  isMet: (ours, peer) => 2 * ours <= peer,
};

Deno.test("isMet() holds the target against both times", () => {
  assert.equal(isMet(twice), true);
  assert.equal(isMet({ ...twice, ours: 1.01 }), false);
});

Deno.test("isMet() is false without the peer and true without a target", () => {
  assert.equal(isMet({ ...twice, peer: null }), false);
  assert.equal(isMet({ what: "shown", ours: 1, peer: null, target: null }), true);
});

Deno.test("comparisonTable() shows the ratio and the verdict, or what is missing", () => {
  const [, met, missing] = comparisonTable([twice, { ...twice, peer: null }]).split("\n");
  assert.match(met, /^job +1\.000 +2\.000 +0\.50 +at least 2 x faster +MET$/);
  assert.match(missing, /^job +1\.000 +missing +- +at least 2 x faster +NOT MET$/);
});

Deno.test("median() is the middle value or the mean of the two in the middle", () => {
  assert.equal(median([5, 1, 3]), 3);
  assert.equal(median([4, 1, 3, 2]), 2.5);
});
