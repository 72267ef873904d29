import assert from "node:assert/strict";
import { rawRates } from "../../lib/prepare/rate_moments.ts";
import { localShrunkenRates, shrunkenRates } from "../../lib/prepare/shrunken_rates.ts";
import { assertClose } from "../support/close.ts";
import { completeWeights } from "../support/maps.ts";
import { numberColumn, referenceCase } from "../support/reference.ts";

// Source: eb-nc74.json, computed with numpy 2.4.6; formulas of Marshall 1991.
Deno.test("shrunkenRates() agrees with North Carolina", () => {
  const counts = {
    cases: numberColumn("nc.csv", "SID74"),
    population: numberColumn("nc.csv", "BIR74"),
  };
  const { expected } = referenceCase("eb-nc74");
  shrunkenRates(counts).forEach((rate, i) => assertClose(rate, expected.eb[i], 1e-9, `area ${i}`));
});

// Source: eb-auckland.json, computed with numpy 2.4.6; data of Marshall 1991: deaths 1977-85 against 9 x the
// children under 5 of 1981.
Deno.test("shrunkenRates() agrees with the data it was published on", () => {
  const counts = {
    cases: numberColumn("auckland_table.csv", "Deaths.1977.85"),
    population: numberColumn("auckland_table.csv", "Under.5.1981").map((children) => 9 * children),
  };
  const { expected } = referenceCase("eb-auckland");
  const raw = rawRates(counts), shrunken = shrunkenRates(counts);
  assert.equal(raw.length, 167);
  raw.forEach((rate, i) => assertClose(1000 * rate, expected.raw_per_1000[i], 1e-12));
  shrunken.forEach((rate, i) => assertClose(1000 * rate, expected.eb_per_1000[i], 1e-9));
});

Deno.test("shrunkenRates() gives every area the overall rate when there is nothing between areas", () => {
  const counts = { cases: Float64Array.of(10, 11, 9), population: Float64Array.of(50, 50, 50) };
  assert.deepEqual(shrunkenRates(counts), Float64Array.of(0.2, 0.2, 0.2));
});

/** Areas in a row, the last one alone. */
const chain = { offsets: Uint32Array.of(0, 1, 3, 4, 4), indices: Uint32Array.of(1, 0, 2, 1) };

Deno.test("localShrunkenRates() gives the worked values of a chain, none where alone", () => {
  // Area 0 with neighbor 1: b = 40 / 200 = 0.2, s² = 0.01, b / n̄ = 0.002, a = 0.008, kept 0.8: 0.2 - 0.08 = 0.12.
  // Area 1 with 0 and 2: b = 60 / 300 = 0.2, s² = 2 · 0.01 / 3, a = 0.02 / 3 - 0.002 = 0.014 / 3,
  // kept a / (a + 0.002) = 0.014 / 0.02 = 0.7: 0.2 + 0.07 = 0.27.
  // Area 2 with 1: b = 50 / 200 = 0.25, s² = 0.0025, b / n̄ = 0.0025, a = 0: 0.25.
  const counts = {
    cases: Float64Array.of(10, 30, 20, 5),
    population: new Float64Array(4).fill(100),
  };
  const [first, second, third, alone] = localShrunkenRates(counts, chain);
  assertClose(first, 0.12, 1e-12);
  assertClose(second, 0.27, 1e-12);
  assertClose(third, 0.25, 1e-6);
  assert.ok(Number.isNaN(alone));
});

Deno.test("localShrunkenRates() is 0 where area and neighbors have no cases", () => {
  const counts = { cases: Float64Array.of(0, 0, 0, 7), population: Float64Array.of(9, 8, 7, 6) };
  assert.deepEqual([...localShrunkenRates(counts, chain)].slice(0, 3), [0, 0, 0]);
});

Deno.test("localShrunkenRates() is the global form when everybody is everybody's neighbor", () => {
  const counts = {
    cases: Float64Array.of(3, 9, 1, 14),
    population: Float64Array.of(60, 50, 90, 70),
  };
  const whole = shrunkenRates(counts);
  localShrunkenRates(counts, completeWeights(4)).forEach((rate, i) =>
    assertClose(rate, whole[i], 1e-12)
  );
});
