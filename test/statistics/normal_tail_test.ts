import assert from "node:assert/strict";
import { normalCritical, normalUpperTail } from "../../lib/statistics/normal_tail.ts";
import { assertClose } from "../support/close.ts";

// scipy.stats.norm.sf 1.17.1.
const TAILS: readonly (readonly [number, number])[] = [
  [-3, 0.9986501019683699],
  [-0.5, 0.6914624612740131],
  [0, 0.5],
  [0.7, 0.24196365222307303],
  [1, 0.15865525393145707],
  [2.4, 0.008197535924596131],
  [2.6, 0.004661188023718747],
  [5, 2.866515718791933e-07],
  [10, 7.61985302416047e-24],
  [30, 4.906713927147908e-198],
];

Deno.test("normalUpperTail() has the chances of scipy from one end to the other", () => {
  for (const [z, tail] of TAILS) assertClose(normalUpperTail(z), tail, 1e-12, `tail of ${z}`);
  assert.equal(normalUpperTail(Infinity), 0);
  assert.equal(normalUpperTail(-Infinity), 1);
  assert.ok(Number.isNaN(normalUpperTail(NaN)));
});

Deno.test("normalUpperTail() has no step where the series gives way to the fraction", () => {
  // The density at 2.5 is 0.0175, so a step of 2e-9 takes 3.5e-11 off a tail of 0.0062.
  const below = normalUpperTail(2.5 - 1e-9), above = normalUpperTail(2.5 + 1e-9);
  assertClose(below - above, 2e-9 * Math.exp(-3.125) / Math.sqrt(2 * Math.PI), 1e-5);
});

Deno.test("normalCritical() takes a chance back to its number", () => {
  for (const [z, tail] of TAILS) assert.ok(Math.abs(normalCritical(tail) - z) < 1e-12, `${z}`);
  assert.throws(() => normalCritical(0), RangeError);
  assert.throws(() => normalCritical(1), RangeError);
});
