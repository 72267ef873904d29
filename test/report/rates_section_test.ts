import assert from "node:assert/strict";
import { ratesSection } from "../../lib/report/rates_section.ts";
import type { ReportInput } from "../../lib/report/report_input.ts";
import { transformWords, valueMethods } from "../../lib/report/value_methods.ts";
import type { Run } from "../../lib/write/results.ts";
import { reportSample, withResults } from "../support/report_sample.ts";

const plain = reportSample();

/** The sample as a rate: three areas outside the funnel limits, all others inside. */
function rateSample(): ReportInput {
  const input = withResults(plain, (results) => {
    const [run] = results.runs;
    return { ...results, runs: [{ ...run, transform: "standardized", rate: RATE }] };
  });
  const inside = plain.areas.value.map(() => 50);
  const shrunk = inside.with(3, 60).with(5, 20).with(8, 55);
  const funnel = plain.areas.value.values().map(() => "inside" as const).toArray();
  const words = funnel.map((word, row) =>
    ({ 3: "above 95", 5: "below 99.8", 8: "above 99.8" } as const)[row] ?? word
  );
  const rates = { rate: inside, shrunk, shrunkLocal: inside.with(5, NaN), funnel: words };
  return { ...input, areas: { ...plain.areas, rates } };
}

const RATE: NonNullable<Run["rate"]> = {
  cases: "damp <1>",
  population: "homes",
  per: 1000,
  share: false,
  totalCases: 1,
  totalPopulation: 12_345.5,
  overall: 50,
  between: 0,
  tested: "standardized",
  overdispersion: { index: null, atLeast: 999, p: null },
  constantRisk: { maps: 999, mean: -0.01, atLeast: 30, atMost: 969, p: 0.062 },
  funnel: { "above 99.8": 1, "above 95": 1, inside: 0, "below 95": 0, "below 99.8": 1 },
};

Deno.test("ratesSection() is left out when the indicator is no rate", () => {
  assert.equal(ratesSection(plain), null);
});

Deno.test("ratesSection() lists areas outside the limits, the farthest from the overall rate first", () => {
  const { markup } = ratesSection(rateSample())!;
  const listed = Array.from(markup.matchAll(/<th scope="row">([^<]*)</g), ([, name]) => name);
  assert.deepEqual(listed, [5, 3, 8].map((row) => plain.labels![row]));
  assert.match(markup, /<td class="number">–<\/td><td>below 99\.8</, "alone: no local rate");
});

Deno.test("ratesSection() says what is undefined or absent, and escapes field names", () => {
  const { markup } = ratesSection(rateSample())!;
  assert.match(markup, /1 case \(damp &lt;1&gt;\)/);
  assert.match(markup, /no more variation than chance leaves/);
  assert.match(markup, /index of over-dispersion – \(1 by chance\), p = –/);
  assert.match(markup, /above 99\.8: 1 area; above 95: 1 area; inside: 0 areas/);
});

Deno.test("valueMethods() explains what was tested, and nothing when it is the value itself", () => {
  const [run] = plain.results.runs;
  assert.deepEqual(valueMethods(run), []);
  assert.equal(transformWords(run), "as it was read");
  assert.match(String(valueMethods({ ...run, transform: "log" })[0][1]), /natural logarithm/);
  const [tested] = valueMethods({ ...run, rate: RATE, transform: "freeman-tukey" });
  assert.match(String(tested[1]), /Freeman & Tukey 1950.*Assunção & Reis 1999/s);
});
