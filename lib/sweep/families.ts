/**
 * What each family of definitions says by itself: where an answer depends on the kind of neighbor.
 *
 * @module
 */
import type { Family } from "../neighbors/rule.ts";
import type { Standing } from "./family_weights.ts";
import type { FamilyFinding } from "./sweep_results.ts";

/** A definition's own test; null where it has nothing to say, which counts for no direction. */
export interface DefinitionTest {
  /** Standard score; its sign is the direction. */
  readonly z: number | null;
  /** Two-sided p. */
  readonly p: number | null;
}

/**
 * Counts of each family, in order of first appearance.
 *
 * @param standings For each definition, the families it stands for; it counts once for each.
 */
export function familyFindings(
  tests: readonly DefinitionTest[],
  { standings, level }: { readonly standings: readonly Standing[]; readonly level: number },
): FamilyFinding[] {
  const votes = tests.flatMap((test, s) => standings[s].map((family) => ({ ...test, family })));
  const passing = votes.filter(({ z, p }) => z !== null && p !== null && p <= level);
  return [...new Set<Family>(standings.flat())].map((family) => {
    const own = passing.filter((vote) => vote.family === family);
    return {
      family,
      definitions: votes.filter((vote) => vote.family === family).length,
      positive: own.filter(({ z }) => z! > 0).length,
      negative: own.filter(({ z }) => z! < 0).length,
    };
  });
}
