/**
 * What the main definition of neighbor says about a map, and what others would have said.
 *
 * @module
 */
import { type GlobalReference, permuteMoran } from "../inference/permute_global.ts";
import { type LocalTest, testLocalMoran } from "../inference/test_local.ts";
import { parseRule } from "../neighbors/rule.ts";
import { type LocalMoran, localMoran } from "../statistics/local_moran.ts";
import { type MoranI, moranI } from "../statistics/moran.ts";
import { areaClasses } from "../sweep/area_classes.ts";
import type { SweepDefinition } from "../sweep/merge.ts";
import { type PlannedDefinition, planSweep } from "../sweep/plan.ts";
import { runSweep, type SweepOutcome } from "../sweep/run.ts";
import { standardDefinitions } from "../sweep/standard.ts";
import type { BuiltDefinition } from "./build_definitions.ts";
import type { WorkOptions } from "./options.ts";
import type { AssessPlan } from "./plan.ts";
import { type RateFindings, rateFindings } from "./rate_findings.ts";
import type { Study } from "./study.ts";

/** What the main definition says, and the others where they were tried. */
export interface Findings {
  readonly moran: MoranI;
  readonly reference: GlobalReference;
  readonly local: LocalMoran;
  readonly test: LocalTest;
  readonly swept: Swept | null;
  /** Null where the indicator is no rate. */
  readonly rate: RateFindings | null;
}

/** A sweep and the sentences on what could not be tried. */
export interface Swept {
  readonly outcome: SweepOutcome;
  readonly notes: readonly string[];
}

/** Tests the map and its areas, and sweeps where the plan says so. */
export async function findingsOf(study: Study, options: WorkOptions): Promise<Findings> {
  const { plan, main } = study;
  const { values, usedTested } = study.indicator;
  const work = workOf(plan, options, "Testing");
  const local = localMoran(values, main.weights);
  const test = await testLocalMoran(values, main.weights, {
    ...work,
    permutations: plan.localPermutations,
    level: plan.level,
    adjust: plan.adjust,
    tested: usedTested,
  });
  const swept = plan.sweep ? await trySweep(study, { local, test }, options) : null;
  // A sweep permutes the map for the main definition too, with the same streams.
  const reference = swept?.outcome.mainReference ??
    (await permuteMoran(values, [main.weights], { ...work, permutations: plan.permutations }))[0];
  const rate = await rateFindings(study, options);
  return { moran: moranI(values, main.weights), reference, local, test, swept, rate };
}

async function trySweep(
  study: Study,
  { local, test }: Pick<Findings, "local" | "test">,
  options: WorkOptions,
): Promise<Swept> {
  const { plan, layer, indicator, builder, main } = study;
  const standard = plan.vary === null
    ? standardDefinitions({
      shape: layer.shape === "polygon" ? "polygon" : "point",
      space: builder.space,
      count: indicator.used.length,
    })
    : { definitions: [], notes: [] };
  const { definitions } = planSweep({
    main: { rule: study.rule, weights: plan.weights },
    vary: plan.vary?.map(parseRule) ?? null,
    standard: standard.definitions,
  });
  const built = definitions.map((planned) =>
    sweepDefinition(planned, planned.main ? main : builder.build(planned.rule, planned.weights))
  );
  const outcome = await runSweep(indicator.values, built, {
    ...workOf(plan, options, "Trying other definitions"),
    permutations: plan.permutations,
    localPermutations: plan.sweepLocalPermutations,
    level: plan.level,
    adjust: plan.adjust,
    rows: indicator.used,
    tested: indicator.usedTested,
    mainClasses: areaClasses(main.weights.offsets, { sig: test.sig, quad: local.quad }),
  });
  return { outcome, notes: study.laid.withoutMetric === null ? standard.notes : [] };
}

function sweepDefinition(planned: PlannedDefinition, built: BuiltDefinition): SweepDefinition {
  return {
    rule: planned.ruleText,
    weightsText: planned.weights,
    family: planned.family,
    main: planned.main,
    topologySummary: built.summary,
    weights: built.weights,
  };
}

function workOf(plan: AssessPlan, { signal, onProgress }: WorkOptions, stage: string) {
  return {
    seed: plan.seed,
    signal,
    onProgress: onProgress && ((share: number) => onProgress(stage, share)),
  };
}
