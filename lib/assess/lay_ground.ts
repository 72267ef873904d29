/**
 * The ground neighbors are looked for on: boundaries, points and given links of the areas in play.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { readColumn } from "../layer/column.ts";
import { pickFeatures } from "../layer/geometry.ts";
import type { Layer } from "../layer/layer.ts";
import type { Ground } from "../neighbors/build.ts";
import { parseRule, type Rule, ruleNeeds } from "../neighbors/rule.ts";
import { chooseMetric, type Metric } from "../project/metric.ts";
import { representativePoints } from "../project/points.ts";
import { resolveCrs } from "../read/crs.ts";
import { type LinkList, readLinks } from "../read/links.ts";
import { type RecordedInput, recordInput } from "../read/record_input.ts";

/** What {@link layGround} found out. */
export interface LaidGround {
  readonly ground: Ground;
  /** How distance is measured; null where no distance can be. */
  readonly metric: Metric | null;
  /** Representative points of the kept areas in the layer's own coordinates, 2 each. */
  readonly places: Float64Array;
  /** Why there is no metric, where only the sweep would have used one. */
  readonly withoutMetric: string | null;
  /** Link files that were read. */
  readonly inputs: readonly RecordedInput[];
}

/** What the ground is laid for. */
export interface GroundOptions {
  /** All rules that will be asked for. */
  readonly rules: readonly Rule[];
  /** How distance is measured. @default "auto" */
  readonly metric?: string;
  /** Names of all rows, for link files. */
  readonly names: readonly string[];
}

/**
 * Finds points and metric for the kept rows, and reads link files and block fields.
 *
 * @param areas Rows in play, ascending, and a mask over them: areas that may be linked.
 * @throws {UnfitDataError} when a rule measures distance and the layer does not allow it.
 */
export async function layGround(
  layer: Layer,
  areas: { readonly kept: Uint32Array; readonly usable: Uint8Array },
  options: GroundOptions,
): Promise<LaidGround> {
  const { kept, usable } = areas;
  const needs = options.rules.map(ruleNeeds);
  const geometry = pickFeatures(layer.geometry, kept);
  const geographic = layer.crs?.geographic ?? false;
  const places = representativePoints(geometry, { geographic });
  const needed = needs.some(({ points }) => points);
  const { metric, withoutMetric } = await metricOf(layer, options.metric ?? "auto", needed);
  const files = new Set(needs.flatMap(({ linkFiles }) => linkFiles));
  const links = await readLinkFiles(files, kept, options.names);
  const inputs = await Promise.all([...files].map((file) => recordInput("links", file)));
  const ground: Ground = {
    geometry,
    points: metric && metric.project(places),
    count: kept.length,
    usable,
    geographic,
    readLinks: (file) => links.get(file)!,
    fieldKeys: (field) => {
      const { values } = readColumn(layer, field);
      return Array.from(kept, (row) => textOf(values[row]));
    },
  };
  return { ground, metric, places, withoutMetric, inputs: inputs.flat() };
}

/** The rule when none is given: `touching` where most features are polygons, else `nearest:6`. */
export function defaultRule(layer: Layer): Rule {
  return parseRule(layer.shape === "polygon" ? "touching" : "nearest:6");
}

/** The names of all rows: the id field as text, or row numbers. */
export function areaNames(layer: Layer, id: string | undefined): string[] {
  if (id === undefined) return Array.from({ length: layer.count }, (_, row) => String(row));
  const { values } = readColumn(layer, id);
  return Array.from({ length: layer.count }, (_, row) => textOf(values[row]) ?? "");
}

function textOf(value: string | number | null): string | null {
  return value === null || Number.isNaN(value) ? null : String(value);
}

async function metricOf(
  layer: Layer,
  choice: string,
  needed: boolean,
): Promise<{ metric: Metric | null; withoutMetric: string | null }> {
  try {
    return { metric: await chooseMetric(layer, choice, { resolveCrs }), withoutMetric: null };
  } catch (error) {
    if (needed || choice !== "auto" || !(error instanceof UnfitDataError)) throw error;
    return { metric: null, withoutMetric: error.message };
  }
}

/** Links between kept areas, by position among them; links of areas that a filter took out are dropped. */
async function readLinkFiles(
  files: ReadonlySet<string>,
  kept: Uint32Array,
  names: readonly string[],
): Promise<Map<string, LinkList>> {
  const position = new Int32Array(names.length).fill(-1);
  kept.forEach((row, at) => position[row] = at);
  const lists = new Map<string, LinkList>();
  for (const file of files) {
    const { from, to, weight } = await readLinks(file, names);
    const inPlay = (_: number, link: number) =>
      position[from[link]] >= 0 && position[to[link]] >= 0;
    lists.set(file, {
      from: from.filter(inPlay).map((row) => position[row]),
      to: to.filter(inPlay).map((row) => position[row]),
      weight: weight && weight.filter(inPlay),
    });
  }
  return lists;
}
