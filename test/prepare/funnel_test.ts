import assert from "node:assert/strict";
import { binomialTable, type CountTable, poissonTable } from "../../lib/prepare/count_table.ts";
import { funnelLimits, funnelWords } from "../../lib/prepare/funnel.ts";

/** Quantiles at 0.001, 0.025, 0.975 and 0.999. Source: scipy 1.17.1, scipy.stats.poisson.ppf. */
const POISSON: readonly (readonly [mean: number, quantiles: readonly number[]])[] = [
  [0.3, [0, 0, 2, 3]],
  [1, [0, 0, 3, 5]],
  [4.7, [0, 1, 9, 13]],
  [25, [11, 16, 35, 42]],
  [100.5, [71, 81, 121, 133]],
  [1234.5, [1127, 1166, 1304, 1344]],
  [1e6, [996911, 998041, 1001960, 1003092]],
];

/** The same of a binomial distribution. Source: scipy 1.17.1, scipy.stats.binom.ppf. */
const BINOMIAL: readonly (readonly [n: number, p: number, quantiles: readonly number[]])[] = [
  [3, 0.01, [0, 0, 1, 1]],
  [10, 0.5, [1, 2, 8, 9]],
  [40, 0.9, [29, 32, 39, 40]],
  [250, 0.08, [8, 12, 29, 34]],
  [5000, 0.3, [1400, 1437, 1564, 1601]],
  [1e6, 0.6, [598486, 599040, 600960, 601514]],
];

function limitsOf(table: CountTable): number[] {
  const { low998, low95, high95, high998 } = funnelLimits(table);
  return [low998, low95, high95, high998];
}

for (const [mean, quantiles] of POISSON) {
  Deno.test(`funnelLimits() are exact when ${mean} cases are expected`, () =>
    assert.deepEqual(limitsOf(poissonTable(mean)), quantiles));
}

for (const [n, p, quantiles] of BINOMIAL) {
  Deno.test(`funnelLimits() are exact when ${n} each are a case with probability ${p}`, () =>
    assert.deepEqual(limitsOf(binomialTable(n, p)), quantiles));
}

Deno.test("funnelWords() takes binomial limits for a share", () => {
  // At an overall share of 0.9 the limits of 40 are 29, 32, 39, 40; Poisson ones of 36 would be wider.
  const shares = { cases: Float64Array.of(31, 8969), population: Float64Array.of(40, 9960) };
  assert.equal(funnelWords({ ...shares, share: true })[0], "below 95");
  assert.equal(funnelWords(shares)[0], "inside");
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
