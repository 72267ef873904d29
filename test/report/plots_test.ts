import assert from "node:assert/strict";
import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { FIGURE_NAMES, plotFigures } from "../../lib/report/plots.ts";
import type { ReportInput } from "../../lib/report/report_input.ts";
import { AREA_CLASSES } from "../../lib/write/results.ts";
import { reportSample } from "../support/report_sample.ts";

const SNAPSHOTS = new URL("../../testdata/snapshots/", import.meta.url);
const figures = plotFigures(ofAllClasses(reportSample({ columns: 6, rows: 5, bends: 1 })));

/** The same areas with all classes dealt out in turn, and every third area fragile. */
function ofAllClasses(input: ReportInput): ReportInput {
  const classes = input.areas.class.map((_, row) => AREA_CLASSES[row % AREA_CLASSES.length]);
  const steady = classes.map((_, row) => row % 3 === 0 ? "fragile" : "steady");
  return { ...input, areas: { ...input.areas, class: classes, steady } };
}

/** Places and sizes to a tenth, so that the last bits of an engine do not matter; texts as they are. */
function rounded(svg: string): string {
  const tenths = (tag: string) =>
    tag.replace(/-?\d+\.\d+/g, (number) => String(Math.round(10 * Number(number)) / 10));
  return svg.replace(/<[^>]*>/g, tenths) + "\n";
}

// After a change that is meant, look at the figures and renew the snapshots:
// deno test -A test/report/plots_test.ts -- --renew
for (const name of FIGURE_NAMES) {
  Deno.test(`plotFigures() draws ${name} as it was drawn before`, () => {
    const file = new URL(`${name}.svg`, SNAPSHOTS);
    const svg = rounded(figures.get(name)!);
    if (Deno.args.includes("--renew")) {
      mkdirSync(SNAPSHOTS, { recursive: true });
      writeFileSync(file, svg);
    }
    assert.equal(svg, readFileSync(file, "utf8"));
  });
}

Deno.test("plotFigures() gives complete documents that need nothing else", () => {
  for (const [name, svg] of figures) {
    assert.ok(svg.startsWith('<svg xmlns="http://www.w3.org/2000/svg" viewBox='), name);
    assert.ok(svg.endsWith("</svg>"), name);
    assert.match(svg, /role="img" aria-label="[^"]{20,}"/, name);
    assert.doesNotMatch(svg, /class=|<style|<script|href="(?!#)/, name);
    for (const [, id] of svg.matchAll(/url\(#([^)]+)\)/g)) {
      assert.ok(svg.includes(`id="${id}"`), id);
    }
  }
});
