import assert from "node:assert/strict";
import { CLASS_LOOKS } from "../../lib/write/class_looks.ts";
import { styleSld } from "../../lib/write/style_sld.ts";
import { reportSample } from "../support/report_sample.ts";

const { areas } = reportSample();

/** Titles of the rules with the rest of each. */
function rulesOf(sld: string): Map<string, string> {
  const rules = sld.matchAll(/<se:Rule>\n<se:Name>([^<]*)<\/se:Name>([\s\S]*?)<\/se:Rule>/g);
  return new Map(Array.from(rules, ([, name, rest]) => [name, rest]));
}

/** Fails unless every element is closed in order. */
function assertNested(xml: string): void {
  const open: string[] = [];
  for (const [, slash, name, self] of xml.matchAll(/<(\/?)([\w:]+)[^>]*?(\/?)>/g)) {
    if (slash) assert.equal(open.pop(), name);
    else if (!self) open.push(name);
  }
  assert.deepEqual(open, []);
}

Deno.test("styleSld() has a rule for every class that occurs, in its own color", () => {
  const sld = styleSld(areas);
  const rules = rulesOf(sld);
  assertNested(sld);
  for (const name of new Set(areas.class)) {
    const rule = rules.get(name)!;
    assert.ok(rule.includes(`<se:SvgParameter name="fill">${CLASS_LOOKS[name].fill}</`), name);
    assert.ok(rule.includes(`<ogc:Literal>${name}</ogc:Literal>`));
    assert.equal(rule.includes("<se:GraphicFill>"), CLASS_LOOKS[name].hatch !== "none");
  }
});

Deno.test("styleSld() draws fragile areas at half strength with a dashed outline", () => {
  const rules = rulesOf(styleSld(areas));
  const fragile = rules.get("high among high, fragile")!;
  assert.match(fragile, /name="fill-opacity">0\.5</);
  assert.match(fragile, /name="stroke-dasharray">/);
  assert.match(rules.get("high among high")!, /<ogc:Not>.*fragile.*<\/ogc:Not>/);
  const plain = rulesOf(styleSld({ ...areas, steady: null }));
  assert.ok(![...plain.keys()].some((name) => name.includes("fragile")));
});

Deno.test("styleSld() names the fields as they were written, markup in them escaped", () => {
  const sld = styleSld(areas, { classField: "a<b & c_class_2" });
  assert.match(sld, /<ogc:PropertyName>a&lt;b &amp; c_class_2<\/ogc:PropertyName>/);
  assertNested(sld);
  assert.match(styleSld(areas), /<ogc:PropertyName>damp_rate_steady<\/ogc:PropertyName>/);
});

Deno.test("styleSld() draws points as marks and lines as lines", () => {
  const points = styleSld(areas, { shape: "point" }), lines = styleSld(areas, { shape: "line" });
  assert.match(points, /<se:PointSymbolizer>/);
  assert.match(lines, /<se:LineSymbolizer>/);
  assert.doesNotMatch(points + lines, /PolygonSymbolizer/);
  assertNested(points);
  assertNested(lines);
});

// The colors are a contract: a style, a map and a legend must agree.
Deno.test("CLASS_LOOKS holds the published colors", () => {
  const fills = Object.values(CLASS_LOOKS).map(({ fill }) => fill);
  assert.deepEqual(fills, [
    "#7A1F5C",
    "#0F6E6E",
    "#E3B7D0",
    "#A9D5D1",
    "#E9E6E0",
    "#FFFFFF",
    "#FFFFFF",
  ]);
});
