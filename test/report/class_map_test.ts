import assert from "node:assert/strict";
import { classMap } from "../../lib/report/class_map.ts";
import { mapGroups } from "../../lib/report/map_groups.ts";
import { CLASS_LOOKS } from "../../lib/write/class_looks.ts";
import type { ReportInput } from "../../lib/report/report_input.ts";
import { reportSample } from "../support/report_sample.ts";

const sample = reportSample();
const rows = sample.areas.class.length;

/** The sample without any shape. */
function withoutShapes(input: ReportInput): ReportInput {
  const none = new Uint32Array(rows + 1);
  return {
    ...input,
    geometry: {
      kinds: new Uint8Array(rows),
      partStarts: none,
      ringStarts: Uint32Array.of(0),
      vertexStarts: Uint32Array.of(0),
      xy: new Float64Array(0),
    },
  };
}

Deno.test("classMap() draws every area once, with its name and class in a tooltip", () => {
  const svg = classMap(sample)!.markup;
  const tooltips = [...svg.matchAll(/<path d="m[^"]+"><title>([^<]*)<\/title><\/path>/g)]
    .map(([, text]) => text.split("\n").slice(0, 2).join("\n"));
  const expected = sample.areas.class.map((name, row) => `${sample.labels![row]}\n${name}`);
  assert.deepEqual(tooltips.toSorted(), expected.toSorted());
});

Deno.test("classMap() uses the colors and hatches of the classes that occur", () => {
  const svg = classMap(sample)!.markup;
  for (const name of new Set(sample.areas.class)) {
    const { fill, hatch } = CLASS_LOOKS[name];
    const used = hatch === "none" ? fill : `url(#class-map-${name.replaceAll(" ", "-")})`;
    assert.ok(svg.includes(`<g fill="${used}"`), `${name} is not drawn with ${used}`);
  }
});

Deno.test("classMap() says in its legend how many areas each class has", () => {
  const svg = classMap(sample)!.markup;
  const texts = [...svg.matchAll(/<text [^>]*>([^<]*)<\/text>/g)].map(([, text]) => text);
  for (const name of ["high among high", "low among high", "alone", "no value"]) {
    const count = sample.areas.class.filter((other) => other === name).length;
    assert.equal(texts[texts.indexOf(name) + 1], String(count), name);
  }
});

Deno.test("mapGroups() puts fragile areas last, so that nothing covers their outline", () => {
  const groups = mapGroups(sample);
  const first = groups.findIndex(({ fragile }) => fragile);
  assert.ok(first > 0 && groups.slice(first).every(({ fragile }) => fragile));
  const drawn = groups.flatMap((group) => [...group.rows]);
  assert.deepEqual(drawn.toSorted((a, b) => a - b), [...sample.areas.class.keys()]);
  for (const { name, fragile, rows } of groups) {
    for (const row of rows) {
      assert.equal(sample.areas.class[row], name);
      assert.equal(sample.areas.steady![row] === "fragile", fragile);
    }
  }
});

Deno.test("classMap() draws fragile areas at half strength with a dashed outline", () => {
  const svg = classMap(sample)!.markup;
  const style = `<g fill="#7A1F5C" fill-opacity="0.5" stroke="#7A1F5C" stroke-width="`;
  assert.match(svg, new RegExp(`${style}[\\d.]+" stroke-dasharray=`));
});

Deno.test("classMap() merges areas by class where there are more than 3,000", () => {
  const large = reportSample({ columns: 56, rows: 54, bends: 1 });
  const svg = classMap(large)!.markup;
  assert.doesNotMatch(svg, /<title>/);
  const paths = svg.match(/<path d="/g)!.length;
  assert.ok(paths < 60, `${paths} paths`);
});

Deno.test("classMap() draws nothing for a layer without shapes", () => {
  assert.equal(classMap(withoutShapes(sample)), null);
});

Deno.test("classMap() gives the same bytes for the same input", () => {
  assert.equal(classMap(reportSample())!.markup, classMap(sample)!.markup);
});
