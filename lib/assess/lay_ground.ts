/**
 * The ground neighbors are looked for on: boundaries and points of the areas in play.
 *
 * @module
 */
import { UnfitDataError, UsageError } from "../layer/errors.ts";
import { readColumn } from "../layer/column.ts";
import { pickFeatures } from "../layer/geometry.ts";
import type { Layer } from "../layer/layer.ts";
import type { Ground } from "../neighbors/build.ts";
import { parseRule, type Rule, ruleNeeds } from "../neighbors/rule.ts";
import { chooseMetric, type Metric } from "../project/metric.ts";
import { representativePoints } from "../project/points.ts";
import { resolveCrs } from "../read/crs.ts";
import { readLinks } from "../read/links.ts";

/** What {@link layGround} found out. */
export interface LaidGround {
  readonly ground: Ground;
  /** The rule of the main definition. */
  readonly rule: Rule;
  /** How distance is measured; null where no distance can be. */
  readonly metric: Metric | null;
  /** Representative points of all kept areas in the layer's own coordinates, 2 each. */
  readonly places: Float64Array;
  /** Why distances are missing, where nothing needs them but the sweep would have used them. */
  readonly withoutDistance: string | null;
}

/** What the ground is laid for. */
export interface GroundOptions {
  /** The main rule as text. @default `touching` for polygons, `nearest:6` for points */
  readonly neighbors?: string | null;
  /** How distance is measured. @default "auto" */
  readonly metric?: string;
  /** Field of ids, for link files. @default row numbers */
  readonly id?: string;
}

/**
 * Finds points and metric for the kept rows and makes link files and block fields readable.
 *
 * @param kept Rows in play, ascending.
 * @param usable Mask over `kept`: areas that may be linked.
 * @throws {UnfitDataError} when the main rule measures distance and the layer does not allow it.
 */
export async function layGround(
  layer: Layer,
  { kept, usable }: { kept: Uint32Array; usable: Uint8Array },
  options: GroundOptions = {},
): Promise<LaidGround> {
  const rule = parseRule(options.neighbors ?? defaultRule(layer));
  const geometry = pickFeatures(layer.geometry, kept);
  const places = representativePoints(geometry);
  const needs = ruleNeeds(rule);
  const { metric, withoutDistance } = await metricOf(layer, options, needs.points);
  const ground: Ground = {
    geometry,
    points: metric && metric.project(places),
    count: kept.length,
    usable,
    links: await linksOf(needs.linkFiles, layer, kept, options.id),
    fieldKeys: (field) => keysOf(layer, field, kept),
  };
  return { ground, rule, metric, places, withoutDistance };
}

/** `touching` where most features are polygons, else `nearest:6`. */
export function defaultRule(layer: Layer): string {
  return layer.shape === "polygon" ? "touching" : "nearest:6";
}

/** The names of a layer's areas: the id field as text, or row numbers. */
export function areaNames(layer: Layer, id: string | undefined): string[] {
  if (id === undefined) return Array.from({ length: layer.count }, (_, row) => String(row));
  return Array.from(readColumn(layer, id).values, (value) => value === null ? "" : String(value));
}

async function metricOf(
  layer: Layer,
  { metric = "auto" }: GroundOptions,
  needed: boolean,
): Promise<{ metric: Metric | null; withoutDistance: string | null }> {
  try {
    return { metric: await chooseMetric(layer, metric, { resolveCrs }), withoutDistance: null };
  } catch (error) {
    if (needed || !(error instanceof UnfitDataError) || metric !== "auto") throw error;
    return { metric: null, withoutDistance: error.message };
  }
}
