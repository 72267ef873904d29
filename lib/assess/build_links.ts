/**
 * Links without a test: build them, describe them, write them as a table.
 *
 * @module
 */
import { GEOMETRY_KINDS } from "../layer/geometry.ts";
import type { Crs } from "../layer/layer.ts";
import type { NeighborSummary } from "../neighbors/describe.ts";
import { parseRule, ruleNeeds, ruleText } from "../neighbors/rule.ts";
import { oneOf } from "./one_of.ts";
import { STANDARDIZATIONS } from "../weights/standardize.ts";
import { parseWeightRule, weightRuleText } from "../weights/weight_rule.ts";
import type { LinkTable, MapDiagnostics } from "../write/results.ts";
import { diagnoseGround, groundWarnings } from "./diagnose_ground.ts";
import { definitionBuilder } from "./build_definitions.ts";
import { areaNames, defaultRule, layGround } from "./lay_ground.ts";
import { linkTable } from "./link_table.ts";
import { openSource } from "./open_source.ts";
import type { NeighborOptions, SourceOptions } from "./options.ts";

/** Options of {@link buildLinks}. */
export interface BuildLinksOptions extends SourceOptions, NeighborOptions {}

/** Links of a whole layer. */
export interface BuiltLinks {
  readonly summary: NeighborSummary;
  /** By row of the layer. */
  readonly links: LinkTable;
  /** Names of all rows, from the id field or row numbers. */
  readonly names: readonly string[];
  /** Whether an id field was named. */
  readonly named: boolean;
  readonly diagnostics: MapDiagnostics;
  readonly warnings: readonly string[];
  /** Representative point of every row in the layer's coordinates; NaN where it has none. */
  readonly places: Float64Array;
  readonly crs: Crs | null;
  /** Unit of all distances; null without a metric. */
  readonly unit: string | null;
}

/**
 * Builds the links between all areas of a layer that have a geometry.
 *
 * @throws What reading the layer and building the rule throw.
 */
export async function buildLinks(
  path: string,
  options: BuildLinksOptions = {},
): Promise<BuiltLinks> {
  const { layer } = await openSource(path, options);
  const rule = options.neighbors === undefined ? defaultRule(layer) : parseRule(options.neighbors);
  const names = areaNames(layer, options.id);
  const none = GEOMETRY_KINDS.indexOf("none");
  const kept = Uint32Array.from({ length: layer.count }, (_, row) => row);
  const usable = layer.geometry.kinds.map((kind) => kind === none ? 0 : 1);
  const used = kept.filter((row) => usable[row] === 1);
  const weights = weightRuleText(parseWeightRule(options.weights ?? "equal"));
  const standardize = oneOf("--standardize", options.standardize ?? "row", STANDARDIZATIONS);
  const { metric, points } = options;
  const laid = await layGround(layer, { kept, usable }, {
    rules: [rule],
    metric,
    points,
    weights,
    names,
  });
  const builder = definitionBuilder(laid, { standardize, nameOf: (i) => names[used[i]] });
  const built = builder.build(rule, weights);
  const { space } = builder;
  const summary = { ...built.summary, rule: ruleText(rule) };
  const diagnostics = diagnoseGround(laid, space, ruleNeeds(rule).snap);
  return {
    summary,
    links: linkTable(built, { used, space }),
    names,
    named: options.id !== undefined,
    diagnostics,
    warnings: groundWarnings(diagnostics, { rule, islands: summary.islands }),
    places: laid.places,
    crs: layer.crs,
    unit: laid.metric?.unit ?? null,
  };
}
