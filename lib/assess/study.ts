/**
 * One indicator on its ground: everything that is decided before anything is tested.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import type { Layer } from "../layer/layer.ts";
import { parseRule, type Rule, ruleNeeds, ruleText } from "../neighbors/rule.ts";
import {
  type BuiltDefinition,
  type DefinitionBuilder,
  definitionBuilder,
} from "./build_definitions.ts";
import { diagnoseGround } from "./diagnose_ground.ts";
import { defaultRule, type LaidGround, layGround } from "./lay_ground.ts";
import type { AssessPlan } from "./plan.ts";
import type { MapDiagnostics } from "../write/results.ts";
import type { Indicator } from "./prepare_indicator.ts";

/** One indicator on its ground, with the main definition built. */
export interface Study {
  readonly plan: AssessPlan;
  readonly layer: Layer;
  readonly names: readonly string[];
  readonly indicator: Indicator;
  readonly laid: LaidGround;
  readonly builder: DefinitionBuilder;
  readonly rule: Rule;
  readonly main: BuiltDefinition;
  readonly diagnostics: MapDiagnostics;
}

/**
 * Lays the ground and builds the main definition.
 *
 * @throws {UnfitDataError} when no area has a neighbor, or a rule cannot be built on this layer.
 */
export async function layStudy(
  layer: Layer,
  { plan, indicator, names }: Pick<Study, "plan" | "indicator" | "names">,
): Promise<Study> {
  const rule = plan.neighbors === null ? defaultRule(layer) : parseRule(plan.neighbors);
  const laid = await layGround(layer, indicator, {
    rules: [rule, ...(plan.vary ?? []).map(parseRule)],
    metric: plan.metric,
    points: plan.points ?? undefined,
    weights: plan.weights,
    names,
  });
  const builder = definitionBuilder(laid, {
    standardize: plan.standardize,
    nameOf: (i) => names[indicator.used[i]],
  });
  const main = builder.build(rule, plan.weights);
  if (main.weights.indices.length === 0) {
    throw new UnfitDataError(
      `Cannot test ${indicator.name} as no area has a neighbor under ${
        ruleText(rule)
      }; choose a wider rule with --neighbors`,
    );
  }
  const diagnostics = diagnoseGround(laid, builder.space, ruleNeeds(rule).snap);
  return { plan, layer, names, indicator, laid, builder, rule, main, diagnostics };
}
