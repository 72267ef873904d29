import assert from "node:assert/strict";
import { countBars, neighborCountChart } from "../../lib/report/neighbor_counts.ts";
import { reportSample, withResults } from "../support/report_sample.ts";

Deno.test("countBars() has a bar for each number, numbers that do not occur included", () => {
  const bars = countBars([{ neighbors: 0, areas: 2 }, { neighbors: 3, areas: 5 }]);
  assert.deepEqual(bars, [
    { from: 0, to: 0, areas: 2 },
    { from: 1, to: 1, areas: 0 },
    { from: 2, to: 2, areas: 0 },
    { from: 3, to: 3, areas: 5 },
  ]);
});

Deno.test("countBars() gathers far-running numbers into equal stretches and loses no area", () => {
  const counts = Array.from({ length: 95 }, (_, i) => ({ neighbors: 7 + i, areas: i }));
  const bars = countBars(counts);
  assert.equal(bars.length, 32); // 95 numbers in stretches of 3
  assert.deepEqual([bars[0].from, bars[0].to], [7, 9]);
  assert.equal(bars.reduce((sum, { areas }) => sum + areas, 0), 95 * 94 / 2);
});

Deno.test("neighborCountChart() draws nothing without areas", () => {
  const sample = withResults(reportSample({ columns: 4, rows: 4 }), (results) => {
    const [run] = results.runs;
    return { ...results, runs: [{ ...run, neighbors: { ...run.neighbors, neighborCounts: [] } }] };
  });
  assert.equal(neighborCountChart(sample), null);
});
