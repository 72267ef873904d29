/**
 * The main job: is the map clustered, where, and would it still stand?
 *
 * @module
 */
import type { Layer } from "../layer/layer.ts";
import { neighborBuilder } from "../neighbors/build.ts";
import { parseRule, ruleNeeds } from "../neighbors/rule.ts";
import type { RecordedInput } from "../read/record_input.ts";
import type { AreaResults, LinkTable, Results } from "../write/results.ts";
import { areaResults } from "./area_results.ts";
import { findingsOf } from "./findings.ts";
import { gatherInput } from "./gather_input.ts";
import { areaNames } from "./lay_ground.ts";
import { linkTable } from "./link_table.ts";
import type { AssessOptions, WorkOptions } from "./options.ts";
import { type AssessPlan, planAssessment } from "./plan.ts";
import { prepareIndicator } from "./prepare_indicator.ts";
import { areaRates } from "./rate_results.ts";
import { resultsOf } from "./results_of.ts";
import { layStudy, type Study } from "./study.ts";
import { countCutPairs, warningsOf } from "./warnings.ts";

/** Everything the main job found, ready to be written. */
export interface Assessment {
  readonly plan: AssessPlan;
  readonly layer: Layer;
  /** Names of all rows, from the id field or row numbers. */
  readonly names: readonly string[];
  readonly results: Results;
  readonly areas: AreaResults;
  readonly links: LinkTable;
  /** Representative point of every row in the layer's coordinates; NaN where it has none. */
  readonly places: Float64Array;
  readonly inputs: readonly RecordedInput[];
}

/**
 * Reads a layer (and a table beside it), builds neighbors, tests the map as a whole and each area, and
 * tries other reasonable definitions of neighbor on the same permutations.
 *
 * @param path Any vector file GDAL opens, or a CSV or XLSX with x/y or WKT.
 * @throws {UsageError} for options that cannot be, {UnreadableError} for files, {UnfitDataError} for data that
 * cannot answer. Rejects with the signal's reason when aborted.
 * Cost: for 100,000 polygons a few seconds without the sweep.
 */
export async function assess(path: string, options: AssessOptions): Promise<Assessment> {
  const plan = planAssessment(path, options);
  const stage = stageReporter(options);
  stage("Reading");
  const { layer, join, inputs, notes } = await gatherInput(plan);
  const names = areaNames(layer, plan.source.id);
  const indicator = prepareIndicator(layer, plan, join);
  stage("Building neighbors");
  const study = await layStudy(layer, { plan, indicator, names });
  stage("Testing");
  const found = await findingsOf(study, options);
  const { local, test, swept } = found;
  const areas = areaResults(
    {
      prefix: indicator.name,
      used: indicator.used,
      values: indicator.all,
      leftOut: indicator.leftOut,
      rates: found.rate && areaRates(found.rate, { used: indicator.used, count: layer.count }),
    },
    { local, ...test, agree: swept?.outcome.agree ?? null, steady: swept?.outcome.steady ?? null },
  );
  const warnings = warningsOf({
    notes: [...notes, ...indicator.notes, ...(swept?.notes ?? [])],
    join,
    used: indicator.used.length,
    rule: study.rule,
    summary: study.main.summary,
    diagnostics: study.diagnostics,
    metric: study.laid.metric,
    withoutMetric: study.laid.withoutMetric,
    sweep: plan.sweep,
    cutLinks: cutLinksOf(study),
    weightsUnused: plan.weights !== "given" && study.main.topology.given !== undefined,
    test,
  });
  return {
    plan,
    layer,
    names,
    results: resultsOf(study, found, { areas, join, warnings }),
    areas,
    links: linkTable(study.main, { used: indicator.used, space: study.builder.space }),
    places: spreadPlaces(study.laid.places, indicator.kept, layer.count),
    inputs: [...inputs, ...study.laid.inputs],
  };
}

/** Pairs that touch across the border of `--where`; only looked for where boundaries make neighbors. */
function cutLinksOf({ plan, layer, indicator, rule }: Study): number {
  if (plan.where === null || !ruleNeeds(rule).boundaries) return 0;
  const all = neighborBuilder({
    geometry: layer.geometry,
    points: null,
    count: layer.count,
    usable: new Uint8Array(layer.count).fill(1),
  });
  const kept = new Set(indicator.kept);
  return countCutPairs(all(parseRule("touching")), (row) => kept.has(row));
}

function spreadPlaces(places: Float64Array, kept: Uint32Array, count: number): Float64Array {
  const all = new Float64Array(2 * count).fill(NaN);
  kept.forEach((row, at) => all.set(places.subarray(2 * at, 2 * at + 2), 2 * row));
  return all;
}

function stageReporter({ signal, onProgress }: WorkOptions): (stage: string) => void {
  return (stage) => {
    signal?.throwIfAborted();
    onProgress?.(stage);
  };
}
