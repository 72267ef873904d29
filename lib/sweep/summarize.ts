/**
 * From the numbers of a sweep to its results without NaN.
 *
 * @module
 */
import { twoSidedP } from "../inference/p_value.ts";
import type { GlobalReference } from "../inference/permute_global.ts";
import { isFlagged } from "./area_classes.ts";
import type { Standing } from "./family_weights.ts";
import { jointTest, stepDownMax } from "./joint.ts";
import type { MergedDefinition } from "./merge.ts";
import { flips, onlyElsewhere, overlap, type Steadiness } from "./stability.ts";
import { standardScores } from "./standard_scores.ts";
import type { DefinitionResult, SweepResults } from "./sweep_results.ts";

/** References of the definitions; null for a definition under which no area has a neighbor. */
export type References = readonly (GlobalReference | null)[];

/** What was computed under each definition, the main one first. */
export interface Computed {
  readonly references: References;
  /** Class numbers of the areas. */
  readonly classes: readonly Uint8Array[];
}

/** What each definition says by itself and beside the main one. */
export function definitionResults(
  merged: readonly MergedDefinition[],
  { references, classes }: Computed,
): DefinitionResult[] {
  const statistics = references.map(mapsOf);
  const adjusted = stepDownMax(statistics);
  return merged.map(({ rule, weightsText, family, main, sameAs, topologySummary }, s) => {
    const reference = references[s];
    const [z] = standardScores(statistics[s]);
    const { pairs, islands, components, meanNeighbors } = topologySummary;
    const p = reference && !Number.isNaN(z) ? twoSidedP(reference) : null;
    return {
      rule,
      weights: weightsText,
      family,
      main,
      sameAs,
      pairs,
      islands,
      components,
      meanNeighbors,
      value: reference && reference.observed,
      z: orNull(z),
      p,
      // A doubled tail has twice the floor of a rank of |z|; an adjusted p below its own would puzzle.
      pAdjusted: p === null ? null : Math.max(p, adjusted[s]),
      significantAreas: classes[s].reduce((count, own) => count + Number(isFlagged(own)), 0),
      overlap: orNull(overlap(classes[0], classes[s])),
    };
  });
}

/** What the definitions say together, with the range of I. */
export function jointResult(
  references: References,
  options: { readonly standings: readonly Standing[]; readonly level: number },
): SweepResults["joint"] {
  const { median, p, share, shareP, direction } = jointTest(references.map(mapsOf), options);
  const observed = references.flatMap((reference) => reference ? [reference.observed] : []);
  return {
    median: orNull(median),
    p: orNull(p),
    share: orNull(share),
    shareP: orNull(shareP),
    direction,
    smallest: observed.length > 0 ? Math.min(...observed) : null,
    largest: observed.length > 0 ? Math.max(...observed) : null,
  };
}

/** The statistic on all maps, the observed one first; enumerated orders begin with it already. */
function mapsOf(reference: GlobalReference | null): Float64Array {
  if (reference === null) return Float64Array.of(NaN);
  const { observed, drawn, enumerated } = reference;
  return enumerated ? drawn : withFirst(observed, drawn);
}

function withFirst(observed: number, drawn: Float64Array): Float64Array {
  const maps = new Float64Array(drawn.length + 1);
  maps[0] = observed;
  maps.set(drawn, 1);
  return maps;
}

/**
 * How many areas hold how far, and which ones other definitions see differently.
 *
 * @param classes Class numbers of the areas under each definition, the main one first.
 * @param options A word for each area (null for one that is not tested and not counted), and the row of
 * the layer of each area where that is not its position.
 */
export function stabilityResult(
  classes: readonly Uint8Array[],
  { steady, rows }: {
    readonly steady: readonly (Steadiness | null)[];
    readonly rows?: Uint32Array;
  },
): SweepResults["stability"] {
  const count = (word: Steadiness) => steady.filter((own) => own === word).length;
  const rowsOf = (areas: readonly number[]) => areas.map((area) => rows ? rows[area] : area);
  return {
    steady: count("steady"),
    mostly: count("mostly"),
    fragile: count("fragile"),
    quiet: count("quiet"),
    flaggedSteady: steady.filter((word, i) => word === "steady" && isFlagged(classes[0][i])).length,
    onlyElsewhere: rowsOf(onlyElsewhere(classes, 0)),
    flips: rowsOf(flips(classes)),
  };
}

function orNull(value: number): number | null {
  return Number.isNaN(value) ? null : value;
}
