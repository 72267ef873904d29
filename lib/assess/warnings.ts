/**
 * What a careful colleague would point out before anyone quotes a number.
 *
 * @module
 */
import type { Topology } from "../neighbors/topology.ts";
import type { Metric } from "../project/metric.ts";
import type { JoinReport } from "../read/join.ts";
import type { NeighborSummary } from "../neighbors/describe.ts";
import type { Rule } from "../neighbors/rule.ts";
import type { MapDiagnostics } from "../write/results.ts";
import type { LocalTest } from "../inference/test_local.ts";

import { groundWarnings } from "./diagnose_ground.ts";

/** Distances wrong by more than this share of themselves are pointed out. */
const NOTABLE_DISTORTION = 0.01;
/** With fewer areas than this, permutation tests have little to go on. */
const FEW_AREAS = 30;

/** What the warnings look at. */
export interface WarningInput {
  readonly notes: readonly string[];
  readonly join: JoinReport | null;
  readonly used: number;
  readonly rule: Rule;
  readonly summary: NeighborSummary;
  readonly diagnostics: MapDiagnostics;
  readonly metric: Metric | null;
  readonly withoutMetric: string | null;
  readonly sweep: boolean;
  /** Links that `--where` cut; 0 without a filter. */
  readonly cutLinks: number;
  /** Whether the links came with weights that the plan does not use. */
  readonly weightsUnused: boolean;
  readonly test: LocalTest;
}

/** Warnings in the order of the path: reading, joining, neighbors, distance, tests. */
export function warningsOf(input: WarningInput): string[] {
  return [
    ...input.notes,
    ...joinWarnings(input.join),
    ...neighborWarnings(input),
    ...groundWarnings(input.diagnostics, { rule: input.rule, islands: input.summary.islands }),
    ...metricWarnings(input),
    ...testWarnings(input),
  ];
}

function joinWarnings(join: JoinReport | null): string[] {
  if (!join) return [];
  const warnings: string[] = [];
  const list = (keys: readonly string[]) =>
    keys.slice(0, 5).map(shownKey).join(", ") + (keys.length > 5 ? ", …" : "");
  if (join.layerOnlyCount > 0) {
    const areas = counted(join.layerOnlyCount, "area has", "areas have");
    warnings.push(`${areas} no row in ${join.table} (${list(join.layerOnly)})`);
  }
  if (join.tableOnlyCount > 0) {
    const [rows, match] = join.tableOnlyCount === 1 ? ["row", "matches"] : ["rows", "match"];
    const keys = list(join.tableOnly);
    warnings.push(`${join.tableOnlyCount} ${rows} of ${join.table} ${match} no area (${keys})`);
  }
  return join.hint ? [...warnings, join.hint] : warnings;
}

/** In quotes where spaces at an end would not be seen. */
function shownKey(key: string): string {
  return key === key.trim() ? key : `"${key}"`;
}

function counted(count: number, one: string, more: string): string {
  return `${count} ${count === 1 ? one : more}`;
}

function neighborWarnings(
  { summary, cutLinks, used, weightsUnused }: WarningInput,
): string[] {
  const warnings: string[] = [];
  if (used < FEW_AREAS) {
    warnings.push(`Only ${used} areas could be used; tests on so few find strong patterns only`);
  }
  if (summary.islands > 0) {
    const areas = counted(summary.islands, "area has", "areas have");
    warnings.push(
      `${areas} no neighbor under ${summary.rule}: counted in the mean but not tested`,
    );
  }
  if (cutLinks > 0) {
    warnings.push(
      `The filter cut ${
        counted(cutLinks, "neighbor pair", "neighbor pairs")
      } at its border; --value-where would keep those neighbors`,
    );
  }
  if (weightsUnused) {
    warnings.push(
      `${summary.rule} carries weights that were not used; --weights given would use them`,
    );
  }
  return warnings;
}

function metricWarnings(
  { metric, withoutMetric, sweep, summary }: WarningInput,
): string[] {
  if (withoutMetric !== null && sweep) {
    return [`No definition by distance was tried: ${withoutMetric}`];
  }
  if (metric?.unit === "map units" && summary.rule.includes("within:")) {
    return [
      `Coordinates were taken as stored: in ${summary.rule}, each meter stands for one map unit`,
    ];
  }
  const distortion = metric?.worstDistortion ?? 0;
  if (distortion <= NOTABLE_DISTORTION) return [];
  const percent = (100 * distortion).toPrecision(2);
  return [`Distances in ${metric!.name} are wrong by up to ${percent} % over this extent`];
}

function testWarnings({ test }: WarningInput): string[] {
  if (!test.floorDecides) return [];
  return [
    `Some areas are at the smallest p that these permutations can give (${test.floor}) and a smaller one could ` +
    "change which areas are flagged; ask for more --local-permutations or a milder --adjust",
  ];
}

/** Unordered pairs of a topology on all areas of which exactly one stays. */
export function countCutPairs(
  { offsets, indices }: Topology,
  stays: (area: number) => boolean,
): number {
  let pairs = 0;
  for (let i = 0; i + 1 < offsets.length; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      if (indices[link] > i && stays(i) !== stays(indices[link])) pairs++;
    }
  }
  return pairs;
}
