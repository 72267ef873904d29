import assert from "node:assert/strict";
import { ruleText } from "../../lib/neighbors/rule.ts";
import { parseVary } from "../../lib/neighbors/vary.ts";

const texts = (vary: string) => parseVary(vary).map(ruleText);

Deno.test("parseVary() steps through counts by 1, both ends included", () => {
  assert.deepEqual(texts("nearest:4..7"), ["nearest:4", "nearest:5", "nearest:6", "nearest:7"]);
  assert.deepEqual(texts("touching upto=1..3"), ["touching", "touching upto=2", "touching upto=3"]);
  assert.deepEqual(texts("nearest:3..3"), ["nearest:3"]);
});

Deno.test("parseVary() takes a number of values at equal steps, both ends included", () => {
  // 2 to 20 km in 10 values: steps of 18 / 9 = 2 km.
  assert.deepEqual(
    texts("within:2km..20km/10"),
    [2, 4, 6, 8, 10, 12, 14, 16, 18, 20].map((km) => `within:${km}km`),
  );
  assert.deepEqual(texts("nearest:4..12/5"), [4, 6, 8, 10, 12].map((k) => `nearest:${k}`));
});

Deno.test("parseVary() gives lengths in the unit of the far end, without stray digits", () => {
  assert.deepEqual(texts("within:500m..2km/4"), [
    "within:0.5km",
    "within:1km",
    "within:1.5km",
    "within:2km",
  ]);
  // 0.1 + 2 × 0.1 is 0.30000000000000004 in binary.
  assert.deepEqual(texts("within:0.1km..0.3km/3"), [
    "within:0.1km",
    "within:0.2km",
    "within:0.3km",
  ]);
});

Deno.test("parseVary() goes on with a list at a comma before a digit, else starts a new rule", () => {
  assert.deepEqual(texts('touching, edge,nearest:4, 6..7 mutual, links:"a,b.csv"'), [
    "touching",
    "edge",
    "nearest:4 mutual",
    "nearest:6 mutual",
    "nearest:7 mutual",
    'links:"a,b.csv"',
  ]);
});

Deno.test("parseVary() combines several lists, the last changing fastest", () => {
  assert.deepEqual(texts("nearest:1,2 & (edge upto=2,3)"), [
    "nearest:1 & edge upto=2",
    "nearest:1 & edge upto=3",
    "nearest:2 & edge upto=2",
    "nearest:2 & edge upto=3",
  ]);
});

Deno.test("parseVary() refuses ranges that cannot be stepped through, and points at them", () => {
  const faults: [string, RegExp][] = [
    ["nearest:4..2", /from 4 to 2, which does not go up\n {2}nearest:4\.\.2\n {10}\^/],
    ["nearest:4..", /"4\.\.", which lacks an end/],
    ["nearest:a..b", /"a\.\.b"; write whole numbers/],
    ["nearest:4..12/4", /Cannot take 4 whole numbers at equal steps/],
    ["nearest:1..9/1", /Cannot take 1 values/],
    ["nearest:1..5000", /Cannot take all 5000 values/],
    ["within:2km..20km", /without the number of values, as in 2km\.\.20km\/10\n.*\n {9}\^/],
    ["within:2..20km/3", /which has no unit/],
    ["within:20km..2km/3", /does not go up/],
    ["touching,,edge", /Expected a neighbor rule but found nothing\n.*\n {11}\^/],
    ["nearest:1..999 + nearest:1..999", /more than 1000 definitions/],
  ];
  for (const [text, message] of faults) {
    assert.throws(() => parseVary(text), { name: "UsageError", message });
  }
});
