import assert from "node:assert/strict";
import { counted, listed, pValue, statistic } from "../../lib/sweep/phrases.ts";

Deno.test("counted() knows one from many and groups thousands", () => {
  assert.equal(counted(1, "area"), "1 area");
  assert.equal(counted(0, "area"), "0 areas");
  assert.equal(counted(12_345, "area"), "12,345 areas");
  assert.equal(counted(2, "high among high", "high among high"), "2 high among high");
});

Deno.test("listed() puts the comma before and from three items on", () => {
  assert.deepEqual([[], ["A"], ["A", "B"], ["A", "B", "C"]].map(listed), [
    "",
    "A",
    "A and B",
    "A, B, and C",
  ]);
});

Deno.test("statistic() keeps two decimals, or two digits where the number is small", () => {
  assert.deepEqual(
    [0.4567, -0.1, 0.0567, -0.0101, 0.00049, -1e-7, 0].map(statistic),
    ["0.46", "-0.10", "0.057", "-0.01", "0.000", "0.000", "0.000"],
  );
});

Deno.test("pValue() never rounds a p onto or across the level", () => {
  assert.equal(pValue(0.0123, 0.05), "p = 0.012");
  assert.equal(pValue(0.0004, 0.05), "p < 0.001");
  assert.equal(pValue(1, 0.05), "p = 1");
  assert.equal(pValue(0.0504, 0.05), "p = 0.0504");
  assert.equal(pValue(0.04996, 0.05), "p = 0.04996");
  assert.equal(pValue(0.05, 0.05), "p = 0.05");
  assert.equal(pValue(0.0004, 0.0001), "p = 0.0004");
});
