/**
 * The definitions of a sweep in the order in which people compare them.
 *
 * @module
 */
import type { DefinitionResult, Family } from "../write/results.ts";
import { FAMILY_LOOKS } from "./family_looks.ts";

/** Definitions of one family. */
export interface FamilyGroup {
  readonly family: Family;
  /** Largest I first; those where I is undefined come last. */
  readonly definitions: readonly DefinitionResult[];
}

/** Definitions by family, families in the order of {@link FAMILY_LOOKS}. */
export function byFamily(definitions: readonly DefinitionResult[]): FamilyGroup[] {
  const families = Object.keys(FAMILY_LOOKS) as Family[];
  return families.map((family) => ({
    family,
    definitions: definitions.filter((definition) => definition.family === family)
      .sort((a, b) => (b.value ?? -Infinity) - (a.value ?? -Infinity) || 0),
  })).filter((group) => group.definitions.length > 0);
}

/** Rule and, where neighbors do not count alike, how they count: `nearest:12, inverse:1`. */
export function definitionText({ rule, weights }: { rule: string; weights: string }): string {
  return weights === "equal" ? rule : `${rule}, ${weights}`;
}
