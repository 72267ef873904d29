/**
 * Whether what is said about an area would still be said under other definitions of neighbor.
 *
 * All functions take the classes of `n` areas under each of `S` definitions: `classes[s][i]` is a class
 * number of `TESTED_CLASSES`. Pure and deterministic; cost S × n.
 *
 * @module
 */
import { CLASS, isFlagged, TESTED_CLASSES } from "./area_classes.ts";
import type { Family } from "../neighbors/rule.ts";
import type { Standing } from "./family_weights.ts";

/** How far an area's class holds: {@link steadiness} says which is which. */
export type Steadiness = "steady" | "mostly" | "fragile" | "quiet";

/** Agreement is a ratio of small whole numbers; a gap smaller than this to a threshold is rounding. */
const ROUNDING = 1e-9;

/**
 * `_agree`: for each area the share of definitions that give it the main definition's class, averaged
 * within each family first and then over families. Definitions that leave the area alone are left out, and
 * a family that is thereby empty is not averaged.
 *
 * @param standings For each definition, the families it stands for.
 * @param main Position of the main definition. It agrees with itself and counts like any other.
 * @returns n shares, 0 to 1; NaN for an area that is alone in every definition. An area that is alone in
 * the main definition only has 0: no definition that tests it gives that class.
 */
export function agreement(
  classes: readonly Uint8Array[],
  { standings, main }: { standings: readonly Standing[]; main: number },
): Float64Array {
  const ballots = ballotsOf(standings);
  const shares = new Float64Array(classes[main].length);
  for (let i = 0; i < shares.length; i++) {
    const wanted = classes[main][i];
    let sum = 0, families = 0;
    for (const ballot of ballots) {
      let tested = 0, same = 0;
      for (const { definition, times } of ballot) {
        const given = classes[definition][i];
        if (given === CLASS.alone) continue;
        tested += times;
        if (given === wanted) same += times;
      }
      if (tested === 0) continue;
      sum += same / tested;
      families++;
    }
    shares[i] = sum / families;
  }
  return shares;
}

/** A definition and how often it stands for the ballot's family. */
interface Vote {
  readonly definition: number;
  readonly times: number;
}

/** The votes of each family. */
function ballotsOf(standings: readonly Standing[]): Vote[][] {
  const families = new Set<Family>(standings.flat());
  return [...families].map((family) =>
    standings.map((standing, definition) => ({
      definition,
      times: standing.filter((name) => name === family).length,
    })).filter(({ times }) => times > 0)
  );
}

/**
 * `_steady`: a word for each area. `steady` where at least 80 % agree, `mostly` from 50 %, `fragile` below;
 * `quiet` for every area that no definition finds significant.
 *
 * @param agree From {@link agreement}.
 */
export function steadiness(classes: readonly Uint8Array[], agree: Float64Array): Steadiness[] {
  return Array.from(agree, (share, i) => {
    if (!classes.some((own) => isFlagged(own[i]))) return "quiet";
    if (share >= 0.8 - ROUNDING) return "steady";
    return share >= 0.5 - ROUNDING ? "mostly" : "fragile";
  });
}

/** Areas that some definition finds significant and the main one does not, ascending. */
export function onlyElsewhere(classes: readonly Uint8Array[], main: number): number[] {
  return areasWhere(
    classes[main].length,
    (i) => !isFlagged(classes[main][i]) && classes.some((own) => isFlagged(own[i])),
  );
}

/**
 * Areas whose surroundings are significantly high in one definition and significantly low in another,
 * ascending. The area's own value is the same in every definition, so a flip is always one of
 * surroundings: part of a cluster here, an outlier there.
 */
export function flips(classes: readonly Uint8Array[]): number[] {
  return areasWhere(classes[0].length, (i) => {
    const given = (wanted: number) => classes.some((own) => own[i] === wanted);
    const amongHigh = given(CLASS.highHigh) || given(CLASS.lowHigh);
    return amongHigh && (given(CLASS.lowLow) || given(CLASS.highLow));
  });
}

function areasWhere(count: number, holds: (area: number) => boolean): number[] {
  return Array.from({ length: count }, (_, i) => i).filter(holds);
}

/**
 * The class most definitions give each area, each definition weighing as in the joint test. Definitions
 * that leave the area alone have no vote unless all do. A tie goes to the main definition's class when
 * it is among the tied, else to the first in the order of `TESTED_CLASSES`.
 *
 * @param weights From `familyWeights`, one per definition.
 */
export function modalClasses(
  classes: readonly Uint8Array[],
  { weights, main }: { weights: Float64Array; main: number },
): Uint8Array {
  const votes = new Float64Array(TESTED_CLASSES.length);
  return classes[main].map((own, i) => {
    votes.fill(0);
    classes.forEach((given, s) => votes[given[i]] += weights[s]);
    votes[CLASS.alone] = 0;
    const most = Math.max(...votes);
    if (most === 0) return CLASS.alone;
    return votes[own] >= most - ROUNDING ? own : votes.findIndex((v) => v >= most - ROUNDING);
  });
}

/**
 * Jaccard overlap of the areas that two definitions find significant: |both| / |either|, 0 to 1, NaN where
 * neither finds any. Symmetric in its arguments.
 */
export function overlap(a: Uint8Array, b: Uint8Array): number {
  return jaccard(flagsOf(a), flagsOf(b));
}

/** {@link overlap} of every two definitions, row by row (S × S). Cost: n for each pair. */
export function overlapTable(classes: readonly Uint8Array[]): Float64Array {
  const size = classes.length;
  const flags = classes.map(flagsOf);
  const table = new Float64Array(size * size);
  for (let row = 0; row < size; row++) {
    for (let column = row; column < size; column++) {
      const share = jaccard(flags[row], flags[column]);
      table[row * size + column] = table[column * size + row] = share;
    }
  }
  return table;
}

function flagsOf(classes: Uint8Array): Uint8Array {
  return classes.map((own) => Number(isFlagged(own)));
}

function jaccard(a: Uint8Array, b: Uint8Array): number {
  let both = 0, either = 0;
  for (let i = 0; i < a.length; i++) {
    both += a[i] & b[i];
    either += a[i] | b[i];
  }
  return both / either;
}
