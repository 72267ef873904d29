/**
 * How much each definition of a sweep counts, so that ten bands do not outvote one contiguity.
 *
 * @module
 */
import type { Family } from "../neighbors/rule.ts";

/**
 * What a definition stands for: one family for each definition that was merged into it, its own
 * included. `["contiguity", "contiguity", "graph"]` is a set of weights that two contiguity rules and
 * one graph rule all gave: it is computed once and counts three times.
 */
export type Standing = readonly Family[];

/**
 * Weight of each definition: every family present counts the same, and every definition the same within
 * its family. A merged definition gets the sum of what it stands for, so that merging changes no result.
 *
 * @param standings One per definition. An empty one weighs 0 and its families are not counted.
 * @returns Weights that sum to 1 (all 0 when nothing stands for anything), one per definition.
 */
export function familyWeights(standings: readonly Standing[]): Float64Array {
  const sizes = new Map<Family, number>();
  for (const family of standings.flat()) sizes.set(family, (sizes.get(family) ?? 0) + 1);
  const weightOf = (family: Family) => 1 / (sizes.size * sizes.get(family)!);
  return Float64Array.from(
    standings,
    (standing) => standing.reduce((sum, family) => sum + weightOf(family), 0),
  );
}
