import assert from "node:assert/strict";
import { overdispersion } from "../../lib/statistics/overdispersion.ts";
import { assertClose } from "../support/close.ts";

Deno.test("overdispersion() gives the worked value of three areas", () => {
  // Shares 0.5, 0.25, 0.25; counts 4, 3, 1: 12/0.5 + 6/0.25 + 0 = 48, over 8 · 7 = 56.
  const counts = { cases: Float64Array.of(4, 3, 1), population: Float64Array.of(20, 10, 10) };
  assertClose(overdispersion(counts), 48 / 56, 1e-14);
});

Deno.test("overdispersion() averages 1 over all ways to place the cases", () => {
  // 3 cases on shares 0.2 and 0.8: k in the first area with probability C(3, k) 0.2^k 0.8^(3 - k).
  const population = Float64Array.of(2, 8);
  const probabilities = [0.512, 0.384, 0.096, 0.008];
  const mean = probabilities.reduce(
    (sum, probability, k) =>
      sum + probability * overdispersion({ cases: Float64Array.of(k, 3 - k), population }),
    0,
  );
  assertClose(mean, 1, 1e-14);
});

Deno.test("overdispersion() is undefined when there is one case or none", () => {
  const population = Float64Array.of(5, 5);
  assert.ok(Number.isNaN(overdispersion({ cases: Float64Array.of(1, 0), population })));
  assert.ok(Number.isNaN(overdispersion({ cases: Float64Array.of(0, 0), population })));
});
