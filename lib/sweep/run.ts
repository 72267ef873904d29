/**
 * Runs a sweep: one set of permutations for all definitions, a local test under each, and what they say
 * together.
 *
 * @module
 */
import type { Adjustment } from "../inference/adjust.ts";
import type { PermuteOptions } from "../inference/options.ts";
import { type GlobalReference, permuteMoran } from "../inference/permute_global.ts";
import { testLocalMoran } from "../inference/test_local.ts";
import { localMoran } from "../statistics/local_moran.ts";
import type { Weights } from "../weights/weights.ts";
import { areaClasses, CLASS } from "./area_classes.ts";
import { familyFindings } from "./families.ts";
import { familyWeights } from "./family_weights.ts";
import { type MergedDefinition, mergeDefinitions, type SweepDefinition } from "./merge.ts";
import { agreement, modalClasses, overlapTable, type Steadiness, steadiness } from "./stability.ts";
import { definitionResults, jointResult, stabilityResult } from "./summarize.ts";
import type { FamilyFinding, SweepResults } from "./sweep_results.ts";

/** Options of {@link runSweep}; `permutations` are those of the global tests. */
export interface SweepOptions extends PermuteOptions {
  /** Conditional permutations of each area under each definition. @default 99999 */
  readonly localPermutations?: number;
  /** Level of every test. @default 0.05 */
  readonly level?: number;
  /** Adjustment of the areas' p under each definition. @default "bh" */
  readonly adjust?: Adjustment;
  /** Row of the layer of each area, for the lists in the results. @default the areas' positions */
  readonly rows?: Uint32Array;
  /** Areas that are tested (1); the others count as neighbors only. @default all */
  readonly tested?: Uint8Array;
  /**
   * Classes of the areas under the main definition, from `areaClasses`, where they are known from more
   * permutations. @default tested like the other definitions
   */
  readonly mainClasses?: Uint8Array;
}

/** What {@link runSweep} finds. Definitions are the merged ones, the main definition first. */
export interface SweepOutcome {
  readonly results: SweepResults;
  /** What each family says by itself, for the verdict. */
  readonly families: readonly FamilyFinding[];
  /** Share of definitions that give each area its main class; NaN where it is always alone or not tested. */
  readonly agree: Float64Array;
  /** A word for each area; null where it is not tested. */
  readonly steady: readonly (Steadiness | null)[];
  /** Class numbers of the areas under each definition. */
  readonly classes: readonly Uint8Array[];
  /** The class that most definitions give each area. */
  readonly modal: Uint8Array;
  /** Overlap of significant areas between definitions, row by row (S × S); NaN where neither has any. */
  readonly overlaps: Float64Array;
  /** Permutation reference of the main definition; null where no area has a neighbor under it. */
  readonly mainReference: GlobalReference | null;
}

/**
 * Tests one map under many definitions of neighbor.
 *
 * All definitions see the same permuted maps, so their joint test is exact however alike they are. Equal
 * ones are merged first and count for all they stand for (`mergeDefinitions`). Definitions under which no
 * area has a neighbor, or everyone is everyone's, have null results and no say in the joint test. Each
 * local test is like that of the main definition, with `localPermutations`. Cost: `permutations` shuffles
 * of the values in all, for each shuffle one pass over the pairs of each definition, and one local test
 * for each definition.
 *
 * @param values One finite number for each area.
 * @param definitions Weights of the same areas; exactly one is `main`.
 * @throws {RangeError} when there is not exactly one main definition, or lengths differ.
 * @throws {UnfitDataError} for values that are all equal and for fewer than 3 areas. Rejects with the
 * signal's reason when aborted.
 */
export async function runSweep(
  values: Float64Array,
  definitions: readonly SweepDefinition[],
  options: SweepOptions = {},
): Promise<SweepOutcome> {
  checkLengths(values, definitions, options);
  const { level = 0.05, localPermutations = 99_999 } = options;
  const merged = mergeDefinitions(definitions);
  const stage = stagesOf(merged.length + 1, options);
  const { permutations } = options;
  const references = await globalReferences(values, merged, { ...stage(0), permutations });
  const classes: Uint8Array[] = [];
  for (const [s, { main, weights }] of merged.entries()) {
    const known = main ? options.mainClasses : undefined;
    const local = { ...options, ...stage(s + 1), level, permutations: localPermutations };
    classes.push(known ?? await localClasses(values, weights, local));
  }
  const standings = merged.map(({ standing }) => standing);
  const isTested = (i: number) => options.tested?.[i] !== 0;
  const agree = agreement(classes, { standings, main: 0 })
    .map((share, i) => isTested(i) ? share : NaN);
  const steady = steadiness(classes, agree).map((word, i) => isTested(i) ? word : null);
  const found = definitionResults(merged, { references, classes });
  return {
    results: {
      permutations: references.find((reference) => reference !== null)?.permutations ?? 0,
      localPermutations,
      definitions: found,
      joint: jointResult(references, { standings, level }),
      stability: stabilityResult(classes, { steady, rows: options.rows }),
    },
    families: familyFindings(found, { standings, level }),
    agree,
    steady,
    classes,
    modal: modalClasses(classes, { weights: familyWeights(standings), main: 0 }),
    overlaps: overlapTable(classes),
    mainReference: references[0],
  };
}

function checkLengths(
  values: Float64Array,
  definitions: readonly SweepDefinition[],
  { rows, tested, mainClasses }: SweepOptions,
): void {
  const mains = definitions.filter(({ main }) => main).length;
  if (mains !== 1) {
    throw new RangeError(`Cannot sweep with ${mains} main definitions; mark exactly one`);
  }
  const lengths = [
    ...definitions.map(({ rule, weights }) => [rule, weights.offsets.length - 1] as const),
    ...Object.entries({ rows, tested, mainClasses })
      .flatMap(([name, array]) => array ? [[name, array.length] as const] : []),
  ];
  for (const [name, length] of lengths) {
    if (length === values.length) continue;
    throw new RangeError(
      `Cannot sweep ${values.length} values with "${name}" for ${length} areas; lengths have to agree`,
    );
  }
}

/** Options of each of `count` stages of equal length, whose progress adds up to that of the whole. */
function stagesOf(
  count: number,
  { seed, workers, signal, onProgress }: SweepOptions,
): (stage: number) => PermuteOptions {
  return (stage) => ({
    seed,
    workers,
    signal,
    onProgress: onProgress && ((share) => onProgress((stage + share) / count)),
  });
}

/** One reference for each definition from shared permutations; null where no area has a neighbor. */
async function globalReferences(
  values: Float64Array,
  merged: readonly MergedDefinition[],
  options: PermuteOptions,
): Promise<(GlobalReference | null)[]> {
  const linked = merged.filter(({ weights }) => weights.indices.length > 0);
  const references = await permuteMoran(values, linked.map(({ weights }) => weights), options);
  return merged.map((definition) => references[linked.indexOf(definition)] ?? null);
}

async function localClasses(
  values: Float64Array,
  weights: Weights,
  options: SweepOptions & { readonly level: number },
): Promise<Uint8Array> {
  const { offsets, indices } = weights;
  if (indices.length === 0) return new Uint8Array(values.length).fill(CLASS.alone);
  const { quad } = localMoran(values, weights);
  const { sig } = await testLocalMoran(values, weights, options);
  return areaClasses(offsets, { sig, quad });
}
