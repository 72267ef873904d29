/**
 * The ground neighbors are looked for on: boundaries, points and given links of the areas in play.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { readColumn } from "../layer/column.ts";
import { boundsOf, type Box, pickFeatures } from "../layer/geometry.ts";
import type { Layer } from "../layer/layer.ts";
import type { Ground } from "../neighbors/build.ts";
import { type ContiguityFinder, contiguityFinder } from "../neighbors/contiguity.ts";
import type { LinkTriples } from "../neighbors/links.ts";
import { fitsGlobe } from "../neighbors/globe.ts";
import { parseRule, type Rule, ruleNeeds } from "../neighbors/rule.ts";
import { chooseMetric, type Metric } from "../project/metric.ts";
import { representativePoints } from "../project/points.ts";
import { openProjection } from "../project/projection.ts";
import { resolveCrs } from "../read/crs.ts";
import { readLinks } from "../read/links.ts";
import { givenPlaces, parsePointFields } from "./area_places.ts";
import { type RecordedInput, recordInput } from "../read/record_input.ts";
import { fallsWithDistance, parseWeightRule } from "../weights/weight_rule.ts";

/** What {@link layGround} found out. */
export interface LaidGround {
  readonly ground: Ground;
  /** Shared boundaries of the kept areas, which the ground uses too. */
  readonly contiguity: ContiguityFinder;
  /** How distance is measured; null where no distance can be. */
  readonly metric: Metric | null;
  /** Representative points of the kept areas in the layer's own coordinates, 2 each. */
  readonly places: Float64Array;
  /** Why there is no metric, where only the sweep would have used one. */
  readonly withoutMetric: string | null;
  /** Link files that were read. */
  readonly inputs: readonly RecordedInput[];
}

/** Stands for the box of a layer without coordinates. */
const NO_BOX: Box = [0, 0, 0, 0];

/** What the ground is laid for. */
export interface GroundOptions {
  /** All rules that will be asked for. */
  readonly rules: readonly Rule[];
  /** How distance is measured. @default "auto" */
  readonly metric?: string;
  /** Two fields that hold the points, as `X,Y`. @default points inside the areas */
  readonly points?: string;
  /** How much each neighbor counts, as text. @default "equal" */
  readonly weights?: string;
  /** Names of all rows, for link files. */
  readonly names: readonly string[];
}

/**
 * Finds points and metric for the kept rows, and reads link files and block fields.
 *
 * @param areas Rows in play, ascending, and a mask over them: areas that may be linked.
 * @throws {UnfitDataError} when a rule or its weights measure distance and the layer does not allow it.
 */
export async function layGround(
  layer: Layer,
  areas: { readonly kept: Uint32Array; readonly usable: Uint8Array },
  options: GroundOptions,
): Promise<LaidGround> {
  const { kept, usable } = areas;
  const needs = options.rules.map(ruleNeeds);
  const geometry = pickFeatures(layer.geometry, kept);
  const geographic = layer.crs?.geographic === true && fitsGlobe(boundsOf(geometry) ?? NO_BOX);
  const places = options.points === undefined
    ? representativePoints(geometry, { geographic })
    : givenPlaces(layer, kept, parsePointFields(options.points));
  const needed = needs.some(({ points }) => points) ||
    fallsWithDistance(parseWeightRule(options.weights ?? "equal"));
  const { metric, withoutMetric } = await metricOf(layer, options.metric ?? "auto", needed);
  const files = new Set(needs.flatMap(({ linkFiles }) => linkFiles));
  const links = await readLinkFiles(files, kept, options.names);
  const inputs = await Promise.all([...files].map((file) => recordInput("links", file)));
  const metersPerUnit = geographic ? 1 : metersPerUnitOf(layer);
  const contiguity = contiguityFinder(geometry, { geographic, metersPerUnit });
  const ground: Ground = {
    geometry,
    contiguity,
    metersPerUnit,
    points: metric && metric.project(places),
    ellipsoid: metric && metric.ellipsoid,
    count: kept.length,
    usable,
    geographic,
    readLinks: (file) => links.get(file)!,
    fieldKeys: (field) => {
      const { values } = readColumn(layer, field);
      return Array.from(kept, (row) => textOf(values[row]));
    },
  };
  return { ground, contiguity, metric, places, withoutMetric, inputs: inputs.flat() };
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

/** Meters in a unit of a projected layer, so that a `snap` in meters is right on maps in feet; 1 where not known. */
function metersPerUnitOf({ crs }: Layer): number {
  return crs === null ? 1 : openProjection(crs.wkt)?.metersPerUnit ?? 1;
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
): Promise<Map<string, LinkTriples>> {
  const position = new Int32Array(names.length).fill(-1);
  kept.forEach((row, at) => position[row] = at);
  const lists = new Map<string, LinkTriples>();
  for (const file of files) {
    const { from, to, weight } = await readLinks(file, names);
    const inPlay = (_: number, link: number) =>
      position[from[link]] >= 0 && position[to[link]] >= 0;
    lists.set(file, {
      from: from.filter(inPlay).map((row) => position[row]),
      to: to.filter(inPlay).map((row) => position[row]),
      weight: weight && weight.filter(inPlay),
      nameOf: (area) => names[kept[area]],
    });
  }
  return lists;
}
