import assert from "node:assert/strict";
import { reportPage } from "../../lib/report/page.ts";
import { plotFigures } from "../../lib/report/plots.ts";
import type { ReportInput } from "../../lib/report/report_input.ts";
import { reportSample, withResults } from "../support/report_sample.ts";

const sample = reportSample();
const page = reportPage(sample);

/** Text of the page as a reader sees it. */
function textOf(html: string): string {
  return html.replace(/<style>[\s\S]*?<\/style>/g, "").replace(/<[^>]*>/g, " ")
    .replace(/&lt;/g, "<").replace(/&gt;/g, ">").replace(/&quot;/g, '"').replace(/&#39;/g, "'")
    .replace(/&amp;/g, "&").replace(/[\s\u00A0]+/g, " ");
}

Deno.test("reportPage() opens with the verdict and ends with the cautions", () => {
  const { headline, sentences } = sample.results.verdict;
  const text = textOf(page);
  assert.ok(text.indexOf(headline) < text.indexOf(sentences[0]));
  for (const part of [...sentences, ...sample.results.warnings]) {
    assert.ok(text.includes(part), part);
  }
  for (const { title, text: words } of sample.cautions) {
    assert.ok(text.includes(`${title} ${words}`), title);
  }
});

Deno.test("reportPage() states every choice a reviewer would ask for", () => {
  const text = textOf(page);
  const { runs, layer, seed, sweep } = sample.results;
  for (
    const choice of [
      `Seed "${seed}"`,
      "999 random permutations",
      "999,999 times",
      "99,999 permutations in each other definition",
      `level ${runs[0].local.level}`,
      "Benjamini & Hochberg 1995",
      layer.metricCrs!.definition,
      "divided by their sum",
      "record.json",
      ...sweep!.definitions.map(({ rule }) => rule),
    ]
  ) assert.ok(text.includes(choice), choice);
});

Deno.test("reportPage() counts what was left out and what could not be joined", () => {
  const text = textOf(page);
  const { layer, missingValues, join } = sample.results;
  for (const { reason, count } of layer.leftOut) {
    assert.ok(text.includes(`${reason} (${count} areas)`));
  }
  for (const { kind, count } of missingValues) {
    assert.ok(text.includes(`${kind} (${count} areas)`), kind);
  }
  assert.ok(text.includes(`2 keys: ${join!.tableOnly.join(", ")}`));
  assert.ok(text.includes(join!.hint!));
});

Deno.test("reportPage() lists flagged areas, smallest p first, and at most 200", () => {
  const large = reportSample({ columns: 56, rows: 56, bends: 0 });
  const html = reportPage(large);
  const table = html.match(/<section id="areas"[\s\S]*?<\/section>/)![0];
  const names = [...table.matchAll(/<tr><th scope="row">([^<]*)/g)].map(([, name]) => name);
  const flagged = large.results.runs[0].local.significant;
  assert.ok(flagged > 200);
  assert.equal(names.length, 200);
  const p = names.map((name) => large.areas.p[large.labels!.indexOf(name)]);
  assert.deepEqual(p, p.toSorted((a, b) => a - b));
  assert.match(table, new RegExp(`The 200 areas with the smallest p of ${flagged}`));
  assert.match(table, /areas\.csv has all areas/);
});

const HOSTILE = `<img src=x onerror=alert(1)> & "double" 'single'`;

/** The sample with a hostile text wherever a file can bring one in. */
function hostile(input: ReportInput): ReportInput {
  const { results } = input;
  const [run] = results.runs;
  return {
    ...input,
    labels: input.labels!.map(() => HOSTILE),
    areas: {
      ...input.areas,
      prefix: HOSTILE,
      leftOut: input.areas.leftOut.map((reason) => reason && HOSTILE),
    },
    cautions: [{ title: HOSTILE, text: HOSTILE }],
    results: {
      ...results,
      layer: {
        ...results.layer,
        source: HOSTILE,
        name: HOSTILE,
        crs: HOSTILE,
        leftOut: [{ reason: HOSTILE, count: 1 }],
        metricCrs: {
          ...results.layer.metricCrs!,
          name: HOSTILE,
          definition: HOSTILE,
          unit: HOSTILE,
        },
      },
      join: {
        ...results.join!,
        table: HOSTILE,
        layerKey: HOSTILE,
        tableKey: HOSTILE,
        layerOnly: [HOSTILE],
        tableOnly: [HOSTILE],
        hint: HOSTILE,
      },
      missingValues: [{ kind: HOSTILE, count: 1 }],
      runs: [{
        ...run,
        indicator: HOSTILE,
        weights: HOSTILE,
        neighbors: { ...run.neighbors, rule: HOSTILE },
      }],
      sweep: {
        ...results.sweep!,
        definitions: results.sweep!.definitions.map((definition) => ({
          ...definition,
          rule: HOSTILE,
          weights: HOSTILE,
          sameAs: [HOSTILE],
        })),
      },
      verdict: { ...results.verdict, headline: HOSTILE, sentences: [HOSTILE] },
      seed: HOSTILE,
      warnings: [HOSTILE],
    },
  };
}

Deno.test("reportPage() escapes every text that a file or a user can bring in", () => {
  const html = reportPage(hostile(sample));
  assert.doesNotMatch(html, /<img/);
  assert.doesNotMatch(html, /& "/);
  for (const [, value] of html.matchAll(/ (?:aria-label|title|content|href|d)="([^"]*)"/g)) {
    assert.doesNotMatch(value, /[<>]/);
  }
  const texts = html.replace(/<style>[\s\S]*?<\/style>/, "").replace(/<[^>]*>/g, "");
  assert.equal(texts.search(/[<>"]/), -1);
  assert.equal(texts.includes("'single'"), false);
});

Deno.test("reportPage() fetches nothing and runs nothing", () => {
  assert.doesNotMatch(page, /<script|<link|<iframe|@import|\bsrc=|url\((?!#)/i);
  const addresses = [...page.matchAll(/(?:https?:)?\/\/[\w.-]+/g)].map(([address]) => address);
  assert.deepEqual([...new Set(addresses)], ["http://www.w3.org"]); // the name of SVG, not a fetch
});

Deno.test("reportPage() uses every id once and every link inside the page leads somewhere", () => {
  const ids = [...page.matchAll(/ id="([^"]+)"/g)].map(([, id]) => id);
  assert.equal(new Set(ids).size, ids.length);
  const targets = [...page.matchAll(/(?:href="#|url\(#|labelledby=")([^")]+)/g)];
  for (const [, target] of targets) assert.ok(ids.includes(target), target);
});

Deno.test("reportPage() says so where no sweep was run", () => {
  const html = reportPage(withResults(sample, (results) => ({ ...results, sweep: null })));
  assert.match(html, /No other definition of neighbor was tried/);
  assert.doesNotMatch(html, /Joint p|Westfall/);
});

Deno.test("reportPage() gives the same bytes for the same findings, with no date in them", () => {
  assert.equal(reportPage(reportSample()), page);
  assert.doesNotMatch(textOf(page), new RegExp(`\\b${new Date().getFullYear()}-\\d\\d`));
});

Deno.test("reportPage() of 100,000 areas stays below 15 MB", () => {
  const large = reportSample({ columns: 400, rows: 250 });
  const figures = plotFigures(large);
  const bytes = new TextEncoder().encode(reportPage(large, figures)).length;
  console.log(`report of ${large.areas.class.length} areas: ${(bytes / 1e6).toFixed(1)} MB`);
  assert.ok(bytes < 15e6, `${bytes} bytes`);
});
