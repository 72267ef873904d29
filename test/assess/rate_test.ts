/** A rate end to end: values tested, fields added, results, report, and what the command line says. */
import assert from "node:assert/strict";
import { assess } from "../../lib/assess/assess.ts";
import { inventedRegion, shuffledTwin } from "../../lib/demo/region.ts";
import { readColumn } from "../../lib/layer/column.ts";
import { rateMoments } from "../../lib/prepare/rate_moments.ts";
import { readLayer } from "../../lib/read/vector.ts";
import { resultsSchema } from "../../lib/write/results.ts";
import { assertClose } from "../support/close.ts";
import { referenceCase } from "../support/reference.ts";
import { runCli } from "../support/run_cli.ts";
import { withFolder } from "../support/temp_folder.ts";

const NC = new URL("../../testdata/data/nc.gpkg", import.meta.url).pathname;
const unscaled = {
  rate: "SID74/BIR74",
  neighbors: "touching",
  standardize: "none",
  sweep: false,
  localPermutations: 999,
} as const;

// Source: eb-nc74.json, computed with numpy 2.4.6; formulas of Assunção & Reis 1999 and Marshall 1991.
Deno.test("assess() tests standardized rates and shows raw and shrunken ones", async () => {
  const { expected } = referenceCase("eb-nc74");
  const { results, areas } = await assess(NC, unscaled);
  const [{ indicator, global, rate, transform }] = results.runs;
  assert.equal(indicator, "SID74_rate");
  assert.equal(transform, "standardized");
  assertClose(global.moranI.value!, expected.ebi_centred);
  assertClose(global.ebIndex!.value!, expected.ebi_centred);
  assertClose(global.ebIndex!.asPublished!, expected.ebi_paper);
  assertClose(rate!.overall!, 1000 * expected.m);
  assertClose(rate!.between!, 1000 * Math.sqrt(expected.A));
  assert.equal(rate!.totalCases, 667);
  areas.value.forEach((value, row) => assertClose(value, 1000 * expected.raw[row], 1e-12));
  areas.rates!.shrunk.forEach((shrunk, row) => assertClose(shrunk, 1000 * expected.eb[row], 1e-9));
  const words = Object.values(rate!.funnel).reduce((sum, count) => sum + count, 0);
  assert.equal(words, 100);
});

// Source: nc-global-queen_unscaled.json, computed with numpy 2.4.6 by Cressie & Read 1989.
Deno.test("assess() tests Freeman-Tukey values of a rate when asked", async () => {
  const { expected } = referenceCase("nc-global-queen_unscaled");
  const { results } = await assess(NC, { ...unscaled, transform: "freeman-tukey", name: "sids" });
  const [{ indicator, global, rate }] = results.runs;
  assert.equal(indicator, "sids");
  assert.equal(rate!.tested, "freeman-tukey");
  assertClose(global.moranI.value!, expected.ft74.I, 1e-9);
});

Deno.test("assess() shrinks locally with the area itself among its neighbors", async () => {
  const { layer, areas, links } = await assess(NC, unscaled);
  const numbers = (name: string) => readColumn(layer, name).values as Float64Array;
  const counts = { cases: numbers("SID74"), population: numbers("BIR74") };
  const members = [0, ...[...links.to].filter((_, link) => links.from[link] === 0)];
  const { rate, between } = rateMoments(counts, members);
  const raw = counts.cases[0] / counts.population[0];
  const kept = between / (between + rate / counts.population[0]);
  assertClose(areas.rates!.shrunkLocal[0], 1000 * (rate + (raw - rate) * kept), 1e-9);
});

Deno.test("assess() gives a rank transform the I of the ranks", async () => {
  const plain = { ...unscaled, rate: undefined, value: "BIR74" };
  const ranked = await assess(NC, { ...plain, transform: "rank" });
  const [{ values, transform, rate }] = ranked.results.runs;
  assert.deepEqual([values.min, values.max, values.mean], [1, 100, 50.5]);
  assert.equal(transform, "rank");
  assert.equal(rate, null);
  assert.equal(ranked.areas.value[0], 1091, "what is shown is the value as read");
});

async function withRegion(
  region: ReturnType<typeof inventedRegion>,
  use: (folder: string, args: string[]) => Promise<void>,
): Promise<void> {
  await withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/region.geojson`, JSON.stringify(region.geojson));
    await Deno.writeTextFile(`${folder}/damp.csv`, region.table);
    await use(folder, [
      ...["assess", `${folder}/region.geojson`, "--join", `${folder}/damp.csv`, "--on", "code"],
      ...["--rate", "damp/dwellings", "--per", "1000", "--share", "--missing-values", "*,.."],
      ...["--id", "code", "--local-permutations", "9999", "--vary", "nearest:4..6"],
      ...["--out", `${folder}/out`],
    ]);
  });
}

const region = inventedRegion();

Deno.test("nearkin assess --rate writes rates to layer, table, results and report", () =>
  withRegion(region, async (folder, args) => {
    const { code, stdout, stderr } = await runCli(...args);
    assert.equal(code, 0, stderr);
    assert.match(stdout, /Values of "damp_rate" are \w+ clustered/);
    assert.match(stdout, /Rates +88\.1 per 1000 overall, more variable than chance/);
    const read = (name: string) => Deno.readTextFile(`${folder}/out/${name}`);
    const results = resultsSchema.parse(JSON.parse(await read("results.json")));
    const { rate } = results.runs[0];
    assert.equal(rate!.overdispersion.p, 0.001);
    assert.equal(rate!.constantRisk.p, 0.002);
    assert.match(results.verdict.sentences.join(" "), /rates also differ more between areas/);
    const report = await read("report.html");
    assert.match(report, /<a href="#rates">/);
    assert.match(report, /<section id="rates"[\s\S]*above 99\.8: \d+ areas/);
    assert.match(report, /its standardized rate/);
    const record = JSON.parse(await read("record.json"));
    assert.deepEqual(record.plan.indicator, {
      kind: "rate",
      name: "damp_rate",
      cases: "damp",
      population: "dwellings",
      per: 1000,
      share: true,
      transform: "standardized",
    });
    const layer = await readLayer(`${folder}/out/areas.fgb`);
    const shown = readColumn(layer, "damp_rate_rate").values as Float64Array;
    const words = readColumn(layer, "damp_rate_funnel").values as readonly (string | null)[];
    const codes = readColumn(layer, "code").values as readonly string[];
    region.areas.forEach(({ code, damp, dwellings }) => {
      const row = codes.indexOf(code);
      if (damp === null) assert.ok(Number.isNaN(shown[row]) && words[row] === null);
      else assertClose(shown[row], 1000 * damp / dwellings, 1e-12);
    });
    const head = (await read("areas.csv")).split("\r\n")[0];
    assert.match(head, /damp_rate_rate,damp_rate_shrunk,damp_rate_shrunk_local,damp_rate_funnel$/);
  }));

Deno.test("nearkin assess --rate tells more variable than chance from clustered", () =>
  withRegion(shuffledTwin(region), async (folder, args) => {
    const { code, stderr } = await runCli(...args, "--quiet");
    assert.equal(code, 0, stderr);
    const { verdict, runs } = JSON.parse(await Deno.readTextFile(`${folder}/out/results.json`));
    assert.equal(verdict.clustered, "not shown");
    assert.equal(runs[0].rate.overdispersion.p, 0.001);
    assert.match(
      verdict.sentences.join(" "),
      /rates do differ more between areas .* no pattern in where they do is shown/,
    );
  }));
