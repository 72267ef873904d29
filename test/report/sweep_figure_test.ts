import assert from "node:assert/strict";
import { sweepFigure } from "../../lib/report/sweep_figure.ts";
import { byFamily, definitionText } from "../../lib/report/sweep_order.ts";
import { reportSample, withResults } from "../support/report_sample.ts";

const sample = reportSample({ columns: 8, rows: 8 });
const definitions = sample.results.sweep!.definitions;

Deno.test("byFamily() keeps families together, the largest I first", () => {
  const groups = byFamily(definitions);
  assert.deepEqual(groups.map(({ family }) => family), [
    "contiguity",
    "nearest",
    "band",
    "graph",
    "weighted",
  ]);
  for (const group of groups) {
    const values = group.definitions.map(({ value }) => value!);
    assert.deepEqual(values, values.toSorted((a, b) => b - a));
  }
  assert.equal(groups.flatMap((group) => group.definitions).length, definitions.length);
});

Deno.test("definitionText() names weights only where neighbors do not count alike", () => {
  assert.equal(definitionText({ rule: "nearest:12", weights: "equal" }), "nearest:12");
  assert.equal(
    definitionText({ rule: "nearest:12", weights: "inverse:1" }),
    "nearest:12, inverse:1",
  );
});

Deno.test("sweepFigure() shows every definition and how it passes", () => {
  const svg = sweepFigure(sample)!.markup;
  // One mark each and one ring for each that passes after adjustment; the key has three marks and a ring.
  const rings = definitions.filter(({ pAdjusted }) => pAdjusted! <= 0.05).length;
  assert.equal(svg.match(/<circle /g)!.length, definitions.length + rings + 4);
  const hollow = definitions.filter(({ p }) => p! > 0.05).length;
  assert.equal(svg.match(/r="5.5" fill="#FFFFFF"/g)!.length, hollow + 1);
  assert.match(svg, />touching \(main\)</);
});

Deno.test("sweepFigure() cuts long rules and keeps them whole in a tooltip", () => {
  const svg = sweepFigure(sample)!.markup;
  assert.match(svg, /<title>\(touching \+ nearest:3 either\) - within:800m<\/title>/);
  assert.match(svg, />\(touching \+ nearest:3[^<]*…</);
});

Deno.test("sweepFigure() draws definitions without an I, and nothing without a sweep", () => {
  const broken = withResults(sample, (results) => ({
    ...results,
    sweep: {
      ...results.sweep!,
      definitions: definitions.map((definition) => ({ ...definition, value: null, p: null })),
    },
  }));
  assert.match(sweepFigure(broken)!.markup, />–</);
  assert.equal(sweepFigure(withResults(sample, (results) => ({ ...results, sweep: null }))), null);
});
