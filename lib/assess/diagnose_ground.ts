/**
 * What the ground of a run looks like, and what about it a person should know.
 *
 * @module
 */
import { GEOMETRY_KINDS } from "../layer/geometry.ts";
import { diagnose } from "../neighbors/diagnose.ts";
import type { PointSpace } from "../neighbors/point_space.ts";
import { type Rule, ruleFamily } from "../neighbors/rule.ts";
import { type Length, lengthAtLeast } from "../project/length.ts";
import { findSelfCrossings } from "../read/self_crossing.ts";
import type { MapDiagnostics } from "../write/results.ts";
import type { LaidGround } from "./lay_ground.ts";

/** Digits of the distances that warnings recommend. */
const DISTANCE_DIGITS = 4, SNAP_DIGITS = 2;

/**
 * Diagnoses places and boundaries.
 *
 * @param space Distance between the used areas; null without a metric.
 * @param snap The gap that the main rule closes; null for none.
 */
export function diagnoseGround(
  { ground, contiguity }: LaidGround,
  space: PointSpace | null,
  snap: Length | null = null,
): MapDiagnostics {
  const { geometry } = ground;
  const hasPolygons = geometry?.kinds.includes(GEOMETRY_KINDS.indexOf("polygon")) ?? false;
  return {
    ...diagnose({ space, contiguity: hasPolygons ? contiguity : null, snap }),
    selfCrossing: geometry ? findSelfCrossings(geometry).length : 0,
  };
}

/** Sentences on what could cost somebody neighbors, or their trust. */
export function groundWarnings(
  diagnostics: MapDiagnostics,
  { rule, islands }: { readonly rule: Rule; readonly islands: number },
): string[] {
  const { noneAlone, selfCrossing } = diagnostics;
  const warnings: string[] = [];
  if (islands > 0 && ruleFamily(rule) === "band" && noneAlone) {
    const distance = lengthAtLeast(noneAlone, DISTANCE_DIGITS);
    warnings.push(`The shortest band that leaves no area alone is within:${distance}`);
  }
  const misses = nearMissText(diagnostics.boundaries);
  if (misses !== null) warnings.push(misses);
  if (selfCrossing > 0) {
    warnings.push(
      `${selfCrossing} ${
        selfCrossing === 1 ? "area has a boundary" : "areas have boundaries"
      } that ` +
        "cross themselves, so their size and center cannot be trusted; repair them if these matter",
    );
  }
  return warnings;
}

/** What pairs that nearly touch would need; null where there are none. */
export function nearMissText(boundaries: MapDiagnostics["boundaries"]): string | null {
  if (boundaries === null || boundaries.widestGap === null) return null;
  const { nearMisses, widestGap } = boundaries;
  const gap = lengthAtLeast(widestGap, SNAP_DIGITS);
  return `${nearMisses} ${
    nearMisses === 1 ? "pair of areas lies" : "pairs of areas lie"
  } within ${gap} ` +
    `of each other without touching; if their boundaries are meant to meet, touching snap=${gap} joins them`;
}
