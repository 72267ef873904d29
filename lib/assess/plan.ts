/**
 * From options to a plain plan: every choice decided and checked before any file is opened.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import { parseMissingValues } from "../prepare/missing_values.ts";
import { parseRule, ruleText } from "../neighbors/rule.ts";
import { parseVary } from "../neighbors/vary.ts";
import { STANDARDIZATIONS, type Standardize } from "../weights/standardize.ts";
import { parseWeightRule, weightRuleText } from "../weights/weight_rule.ts";
import { type Adjustment, ADJUSTMENTS } from "../inference/adjust.ts";
import { parsePointFields } from "./area_places.ts";
import { oneOf } from "./one_of.ts";
import type { AssessOptions, SourceOptions } from "./options.ts";
import { type IndicatorPlan, planIndicator } from "./plan_indicator.ts";

/** Fewest permutations that are accepted, and most. */
const FEWEST = 99, MOST = 9_999_999;

/** The main job as data: what a record keeps and a reviewer reads. Null means "decided by the data". */
export interface AssessPlan {
  readonly path: string;
  readonly source: SourceOptions;
  readonly indicator: IndicatorPlan;
  readonly where: string | null;
  readonly valueWhere: string | null;
  readonly join: JoinPlan | null;
  readonly missingValues: readonly string[];
  readonly decimal: "." | "," | null;
  readonly thousands: "none" | "," | "." | "'" | " " | null;
  /** Canonical rule; null for the default of the layer's shape. */
  readonly neighbors: string | null;
  readonly metric: string;
  /** Two fields that hold the points, as `X,Y`; null for points inside the areas. */
  readonly points: string | null;
  readonly weights: string;
  readonly standardize: Standardize;
  readonly permutations: number;
  /** Conditional permutations for the main definition. */
  readonly localPermutations: number;
  /** Conditional permutations for each other definition of the sweep. */
  readonly sweepLocalPermutations: number;
  readonly seed: string;
  readonly level: number;
  readonly adjust: Adjustment;
  /** Canonical rules of the sweep; null for the standard sweep. */
  readonly vary: readonly string[] | null;
  readonly sweep: boolean;
}

/** How a table is joined. */
export interface JoinPlan {
  readonly table: string;
  readonly layerKey: string;
  readonly tableKey: string;
  readonly where: string | null;
}

/**
 * Decides every option and checks what can be checked without data.
 *
 * @param path The layer's file.
 * @throws {UsageError} naming the option, what it was and what it may be.
 */
export function planAssessment(path: string, options: AssessOptions): AssessPlan {
  const local = options.localPermutations;
  return {
    path,
    source: sourceOf(options),
    indicator: planIndicator(options),
    where: options.where ?? null,
    valueWhere: options.valueWhere ?? null,
    join: planJoin(options),
    missingValues: parseMissingValues(options.missingValues ?? ""),
    decimal: options.decimal === undefined ? null : oneOf("--decimal", options.decimal, [".", ","]),
    thousands: options.thousands === undefined
      ? null
      : oneOf("--thousands", options.thousands, ["none", ",", ".", "'", " "]),
    neighbors: options.neighbors === undefined ? null : ruleText(parseRule(options.neighbors)),
    metric: options.metric ?? "auto",
    points: options.points === undefined ? null : parsePointFields(options.points).join(","),
    weights: weightRuleText(parseWeightRule(options.weights ?? "equal")),
    standardize: oneOf("--standardize", options.standardize ?? "row", STANDARDIZATIONS),
    permutations: permutationCount("--permutations", options.permutations ?? 999),
    localPermutations: permutationCount("--local-permutations", local ?? 999_999),
    sweepLocalPermutations: Math.min(local ?? 99_999, 99_999),
    seed: options.seed ?? "nearkin",
    level: levelOf(options.level ?? 0.05),
    adjust: oneOf("--adjust", options.adjust ?? "bh", ADJUSTMENTS),
    vary: planVary(options),
    sweep: options.sweep ?? true,
  };
}

function sourceOf(options: SourceOptions): SourceOptions {
  const { layer, id, x, y, wkt, crs, delimiter, encoding, sheet } = options;
  return { layer, id, x, y, wkt, crs, delimiter, encoding, sheet };
}

function planJoin({ join, on, joinWhere }: AssessOptions): JoinPlan | null {
  if (join === undefined) {
    if (on === undefined && joinWhere === undefined) return null;
    throw new UsageError("Cannot use --on or --join-where without --join TABLE");
  }
  if (on === undefined) {
    throw new UsageError(`Cannot join ${join} without --on KEY, the field that both sides share`);
  }
  const [layerKey, tableKey = layerKey] = on.split("=").map((key) => key.trim());
  return { table: join, layerKey, tableKey, where: joinWhere ?? null };
}

function planVary({ vary, sweep }: AssessOptions): string[] | null {
  if (vary === undefined || vary.length === 0) return null;
  if (sweep === false) throw new UsageError("Cannot use --vary together with --no-sweep");
  return vary.flatMap((text) => parseVary(text).map(ruleText));
}

function permutationCount(option: string, count: number): number {
  if (Number.isInteger(count) && count >= FEWEST && count <= MOST) return count;
  throw new UsageError(
    `Cannot use ${option} ${count}; give a whole number from ${FEWEST} to ${MOST}`,
  );
}

function levelOf(level: number): number {
  if (level > 0 && level < 1) return level;
  throw new UsageError(`Cannot use --level ${level}; give a number between 0 and 1, such as 0.05`);
}
