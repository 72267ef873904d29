/**
 * Links without a test: build them, describe them, write them as a table.
 *
 * @module
 */
import { GEOMETRY_KINDS } from "../layer/geometry.ts";
import type { NeighborSummary } from "../neighbors/describe.ts";
import { connectingDistances } from "../neighbors/distances.ts";
import { parseRule, ruleText } from "../neighbors/rule.ts";
import type { LinkTable } from "../write/results.ts";
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
  /** Smallest distance at which no area is alone, and at which the map hangs together; null without a metric. */
  readonly connecting: { readonly noneAlone: number; readonly oneComponent: number } | null;
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
  const laid = await layGround(layer, { kept, usable }, {
    rules: [rule],
    metric: options.metric,
    names,
  });
  const builder = definitionBuilder(laid, {
    standardize: options.standardize ?? "row",
    nameOf: (i) => names[used[i]],
  });
  const built = builder.build(rule, "equal");
  const { points } = builder;
  return {
    summary: { ...built.summary, rule: ruleText(rule) },
    links: linkTable(built, { used, points }),
    names,
    connecting: points && used.length > 1 ? connectingDistances(points) : null,
    unit: laid.metric?.unit ?? null,
  };
}
