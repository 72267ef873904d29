import assert from "node:assert/strict";
import { funnelLimits, funnelWords } from "../../lib/prepare/funnel.ts";
import { poissonQuantiles, poissonTable } from "../../lib/prepare/poisson_quantiles.ts";
import { assertClose } from "../support/close.ts";

/** Quantiles at 0.001, 0.025, 0.975 and 0.999. Source: scipy 1.17.1, scipy.stats.poisson.ppf. */
const QUANTILES: readonly (readonly [mean: number, quantiles: readonly number[]])[] = [
  [0.3, [0, 0, 2, 3]],
  [1, [0, 0, 3, 5]],
  [4.7, [0, 1, 9, 13]],
  [25, [11, 16, 35, 42]],
  [100.5, [71, 81, 121, 133]],
  [1234.5, [1127, 1166, 1304, 1344]],
  [1e6, [996911, 998041, 1001960, 1003092]],
];

for (const [mean, quantiles] of QUANTILES) {
  Deno.test(`funnelLimits() are exact when ${mean} cases are expected`, () => {
    const { low998, low95, high95, high998 } = funnelLimits(mean);
    assert.deepEqual([low998, low95, high95, high998], quantiles);
  });
}

Deno.test("poissonQuantiles() is 0 when nothing is expected", () => {
  assert.deepEqual(poissonQuantiles(0, [0.001, 0.999]), [0, 0]);
});

Deno.test("poissonTable() has the probabilities e^-mean mean^k / k!", () => {
  const { first, terms, total } = poissonTable(2.5);
  assert.equal(first, 0);
  for (let k = 0, factorial = 1; k < 12; factorial *= ++k) {
    assertClose(terms[k] / total, Math.exp(-2.5) * 2.5 ** k / factorial, 1e-13, `P(X = ${k})`);
  }
});

Deno.test("funnelWords() calls a count on a limit inside and the next one outside", () => {
  // Populations of 25 at an overall rate of 1: limits 11, 16, 35, 42. The last area makes up the total.
  const cases = [35, 36, 42, 43, 16, 15, 11, 10];
  const rest = 25 * 1000 - cases.reduce((sum, count) => sum + count, 0);
  const counts = {
    cases: Float64Array.of(...cases, rest),
    population: Float64Array.of(...cases.map(() => 25), 25 * (1000 - cases.length)),
  };
  assert.deepEqual(funnelWords(counts).slice(0, -1), [
    "inside",
    "above 95",
    "above 95",
    "above 99.8",
    "inside",
    "below 95",
    "below 95",
    "below 99.8",
  ]);
});
