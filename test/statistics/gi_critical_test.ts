import assert from "node:assert/strict";
import { giCritical } from "../../lib/statistics/gi_critical.ts";
import { normalCritical } from "../../lib/statistics/normal_tail.ts";
import { referenceCase } from "../support/reference.ts";

// Source: ord-getis-1995-critical-open.json: idea of the percentile table of Ord & Getis 1995 (from memory), values
// of scipy.stats.norm.ppf 1.17.1.
Deno.test("giCritical() has the normal percentile of the largest of n when n grows", () => {
  const { expected } = referenceCase("ord-getis-1995-critical-open");
  for (const { n, ...byProbability } of expected.sidak) {
    for (const [p, z] of Object.entries<number>(byProbability)) {
      assert.ok(Math.abs(giCritical(n, 1 - Number(p)) - z) < 1e-6);
    }
  }
  for (const { n, ...byProbability } of expected.bonferroni) {
    for (const [p, z] of Object.entries<number>(byProbability)) {
      assert.ok(Math.abs(normalCritical((1 - Number(p)) / n) - z) < 1e-6);
    }
  }
});

Deno.test("giCritical() refuses no areas and levels outside 0 to 1", () => {
  assert.throws(() => giCritical(0, 0.05), RangeError);
  assert.throws(() => giCritical(5, 1), RangeError);
});
