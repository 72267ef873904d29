import assert from "node:assert/strict";
import { moranScatter } from "../../lib/report/moran_scatter.ts";
import { reportSample } from "../support/report_sample.ts";

Deno.test("moranScatter() draws a circle for every used area and writes Moran's I at its line", () => {
  const sample = reportSample();
  const svg = moranScatter(sample).markup;
  assert.equal(svg.match(/<circle /g)!.length, sample.results.layer.used);
  const { value } = sample.results.runs[0].global.moranI;
  assert.ok(svg.includes(`>slope = Moran&#39;s I = ${value!.toFixed(3)}</text>`));
});

Deno.test("moranScatter() draws circles whose own slope is Moran's I", () => {
  const sample = reportSample();
  const svg = moranScatter(sample).markup;
  const points = [...svg.matchAll(/<circle cx="([\d.]+)" cy="([\d.]+)"/g)]
    .map(([, x, y]) => [Number(x), Number(y)]);
  // The line runs through the figure from its left to its right end with the same scales as the circles.
  const [, x1, y1, x2, y2] = svg.match(
    /<line x1="([\d.]+)" y1="([\d.]+)" x2="([\d.]+)" y2="([\d.]+)" stroke="#B0460E"/,
  )!.map(Number);
  const mean = (axis: number) => points.reduce((sum, p) => sum + p[axis], 0) / points.length;
  const [mx, my] = [mean(0), mean(1)];
  const slope = points.reduce((sum, [x, y]) => sum + (x - mx) * (y - my), 0) /
    points.reduce((sum, [x]) => sum + (x - mx) ** 2, 0);
  assert.ok(Math.abs(slope - (y2 - y1) / (x2 - x1)) < 1e-3);
});

Deno.test("moranScatter() gathers more than 5,000 areas into hexagons", () => {
  const sample = reportSample({ columns: 75, rows: 70, bends: 0 });
  const svg = moranScatter(sample).markup;
  assert.doesNotMatch(svg, /<circle /);
  assert.ok(svg.match(/<use /g)!.length > 100);
  assert.ok(svg.length < 200_000, `${svg.length} bytes`);
});
