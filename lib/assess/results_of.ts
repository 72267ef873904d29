/**
 * All findings as `results.json` holds them.
 *
 * @module
 */
import { intervalOfP, twoSidedP } from "../inference/p_value.ts";
import type { JoinReport } from "../read/join.ts";
import { ruleText } from "../neighbors/rule.ts";
import { VERSION } from "../layer/version.ts";
import type { EbIndex } from "../statistics/eb_index.ts";
import { verdictOf } from "../sweep/verdict.ts";
import type { FlaggedArea } from "../sweep/verdict_input.ts";
import type {
  AreaResults,
  GlobalMoranResult,
  LocalSummary,
  Results,
  Run,
} from "../write/results.ts";
import { classCounts } from "./area_results.ts";
import type { Findings } from "./findings.ts";
import { rateResults } from "./rate_results.ts";
import { referenceDistribution } from "./reference_distribution.ts";
import { figure } from "./spread.ts";
import type { Study } from "./study.ts";

/** Results of one indicator; numbers that are undefined are null. */
export function resultsOf(
  study: Study,
  found: Findings,
  { areas, join, warnings }: {
    readonly areas: AreaResults;
    readonly join: JoinReport | null;
    readonly warnings: readonly string[];
  },
): Results {
  const { plan, indicator } = study;
  const run = runOf(study, found, areas);
  const sweep = found.swept?.outcome ?? null;
  return {
    tool: { name: "nearkin", version: VERSION },
    layer: layerOf(study),
    join: join && joinOf(join),
    missingValues: indicator.missing.map(({ kind, count }) => ({ kind, count })),
    runs: [run],
    sweep: sweep && sweep.results,
    verdict: verdictOf({
      run,
      sweep: sweep && sweep.results,
      families: sweep?.families,
      flagged: plan.source.id === undefined ? undefined : flaggedAreas(areas, study.names),
    }),
    seed: plan.seed,
    warnings: [...warnings],
  };
}

function layerOf({ layer, indicator, laid }: Study): Results["layer"] {
  const { metric } = laid;
  return {
    source: layer.source,
    name: layer.name,
    features: layer.count,
    used: indicator.used.length,
    leftOut: indicator.counts.map(({ reason, count }) => ({ reason, count })),
    shape: layer.shape,
    crs: layer.crs && [layer.crs.name, layer.crs.code].filter(Boolean).join(" · "),
    metricCrs: metric && {
      name: metric.name,
      definition: metric.definition,
      worstDistortion: metric.worstDistortion,
      unit: metric.unit,
    },
  };
}

function joinOf(join: JoinReport): NonNullable<Results["join"]> {
  const { table, layerKey, tableKey, matched, layerOnlyCount, tableOnlyCount, hint } = join;
  return {
    table,
    layerKey,
    tableKey,
    matched,
    layerOnly: [...join.layerOnly],
    layerOnlyCount,
    tableOnly: [...join.tableOnly],
    tableOnlyCount,
    hint,
  };
}

function runOf(study: Study, found: Findings, areas: AreaResults): Run {
  const { plan, indicator, main, rule, diagnostics } = study;
  const { values } = indicator;
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const square = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length;
  return {
    indicator: indicator.name,
    neighbors: {
      ...main.summary,
      rule: ruleText(rule),
      neighborCounts: [...main.summary.neighborCounts],
    },
    diagnostics,
    weights: plan.weights,
    standardize: plan.standardize,
    values: {
      mean,
      sd: Math.sqrt(square),
      min: values.reduce((least, value) => Math.min(least, value), Infinity),
      max: values.reduce((most, value) => Math.max(most, value), -Infinity),
    },
    transform: plan.indicator.transform,
    global: { moranI: globalOf(found), ebIndex: found.rate && ebIndexOf(found.rate.ebIndex) },
    reference: referenceDistribution(found.reference.drawn),
    local: localOf(found, areas, plan),
    rate: found.rate && rateResults(found.rate),
  };
}

function globalOf({ moran, reference }: Findings): GlobalMoranResult {
  return {
    value: figure(moran.value),
    expected: figure(moran.expected),
    varianceNormality: figure(moran.varianceNormality),
    varianceRandomization: figure(moran.varianceRandomization),
    z: figure(moran.zRandomization),
    permutations: reference.permutations,
    atLeast: reference.atLeast,
    atMost: reference.atMost,
    enumerated: reference.enumerated,
    p: twoSidedP(reference),
    pInterval: intervalOfP(reference),
    alternative: "two-sided",
  };
}

function ebIndexOf({ value, asPublished }: EbIndex): NonNullable<Run["global"]["ebIndex"]> {
  return { value: figure(value), asPublished: figure(asPublished) };
}

function localOf(
  { test }: Findings,
  areas: AreaResults,
  { level, adjust }: Study["plan"],
): LocalSummary {
  return {
    permutations: test.permutations,
    redrawn: test.redrawn,
    floor: figure(test.floor),
    floorDecides: test.floorDecides,
    level,
    adjust,
    tested: test.tested,
    significant: areas.sig.filter((flag) => flag).length,
    counts: classCounts(areas.class),
  };
}

/** Flagged areas, the smallest p first. */
function flaggedAreas(areas: AreaResults, names: readonly string[]): FlaggedArea[] {
  return areas.class
    .map((name, row) => ({ name, row }))
    .filter(({ name }) => name.includes(" among "))
    .sort((a, b) =>
      areas.p[a.row] - areas.p[b.row] || Math.abs(areas.i[b.row]) - Math.abs(areas.i[a.row])
    )
    .map(({ name, row }) => ({
      name: names[row],
      class: name,
      steady: areas.steady?.[row] ?? null,
    }));
}
