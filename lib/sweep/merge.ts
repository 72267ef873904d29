/**
 * Definitions that turn out to be the same on this map, computed once.
 *
 * @module
 */
import type { Family } from "../neighbors/rule.ts";
import type { Weights } from "../weights/weights.ts";
import type { Standing } from "./family_weights.ts";

/** One definition of neighbor with the weights it gave on this map. */
export interface SweepDefinition {
  /** The neighbor rule as text. */
  readonly rule: string;
  /** How much each neighbor counts, as text: `equal`, `inverse:1`, … */
  readonly weightsText: string;
  readonly family: Family;
  /** True for the definition the rest of the report is about; exactly one has it. */
  readonly main: boolean;
  readonly topologySummary: {
    readonly pairs: number;
    readonly islands: number;
    readonly components: number;
    readonly meanNeighbors: number | null;
  };
  readonly weights: Weights;
}

/** A definition with those that gave the same weights. */
export interface MergedDefinition extends SweepDefinition {
  /** The others, as text. */
  readonly sameAs: string[];
  /** The family of this one and of each in `sameAs`: what it counts for. */
  readonly standing: Standing;
}

/**
 * Merges definitions whose offsets, neighbors and weights are equal to the last bit.
 *
 * A merged definition keeps the family of every definition in it, so that all that is averaged over
 * definitions later comes out as if each had been computed. The main definition comes first; the others
 * keep their order. Cost: one comparison of arrays for each pair with the same number of links.
 */
export function mergeDefinitions(definitions: readonly SweepDefinition[]): MergedDefinition[] {
  const mainFirst = [...definitions].sort((a, b) => Number(b.main) - Number(a.main));
  const groups: SweepDefinition[][] = [];
  for (const definition of mainFirst) {
    const group = groups.find(([first]) => sameWeights(first.weights, definition.weights));
    if (group) group.push(definition);
    else groups.push([definition]);
  }
  return groups.map(([first, ...others]) => ({
    ...first,
    sameAs: others.map(definitionText),
    standing: [first, ...others].map(({ family }) => family),
  }));
}

/** A definition in one phrase: the rule, and how neighbors count where they do not count equally. */
export function definitionText(
  { rule, weightsText }: { readonly rule: string; readonly weightsText: string },
): string {
  return weightsText === "equal" ? rule : `${rule} with ${weightsText}`;
}

function sameWeights(a: Weights, b: Weights): boolean {
  return sameNumbers(a.offsets, b.offsets) && sameNumbers(a.indices, b.indices) &&
    sameNumbers(a.values, b.values);
}

function sameNumbers(a: ArrayLike<number>, b: ArrayLike<number>): boolean {
  if (a.length !== b.length) return false;
  for (let k = 0; k < a.length; k++) if (a[k] !== b[k]) return false;
  return true;
}
