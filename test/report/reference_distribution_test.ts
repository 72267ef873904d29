import assert from "node:assert/strict";
import { referenceHistogram } from "../../lib/report/reference_distribution.ts";
import type { ReferenceDistribution, Results } from "../../lib/write/results.ts";
import { reportSample, withResults } from "../support/report_sample.ts";

const sample = reportSample({ columns: 8, rows: 8 });

/** The histogram for an observed I among permutations that lie evenly between -0.2 and 0.2. */
function histogram(value: number, change: Partial<ReferenceDistribution> = {}): string | undefined {
  const reference: ReferenceDistribution = {
    mean: 0,
    sd: 0.1,
    quantiles: [],
    bins: { start: -0.2, width: 0.1, counts: [25, 25, 25, 25] },
    ...change,
  };
  const changed = withResults(sample, (results): Results => {
    const [run] = results.runs;
    const moranI = { ...run.global.moranI, value, expected: -0.016 };
    return { ...results, runs: [{ ...run, reference, global: { ...run.global, moranI } }] };
  });
  return referenceHistogram(changed)?.markup;
}

Deno.test("referenceHistogram() marks the observed and the expected I", () => {
  const svg = histogram(0.5)!;
  assert.match(svg, />observed 0\.500</);
  assert.match(svg, />expected −0\.016</);
  assert.equal(svg.match(/<path d="([^"]*)"/)![1].match(/M/g)!.length, 4);
});

Deno.test("referenceHistogram() points at an observed I too far out to be drawn beside the bins", () => {
  assert.match(histogram(3)!, />observed 3\.000, 30 standard deviations away</);
  assert.match(histogram(-3)!, />observed −3\.000, 30 standard deviations away</);
});

Deno.test("referenceHistogram() draws nothing where all permutations gave the same I", () => {
  assert.equal(histogram(0.5, { bins: null }), undefined);
});
