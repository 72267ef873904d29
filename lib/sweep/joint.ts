/**
 * Many definitions, one question: would the map be called clustered whatever the neighbors?
 *
 * The same arrangements are used for every definition, so any summary over definitions can be ranked
 * among its own values on the permuted maps, however much the definitions resemble each other
 * (specification curve: Simonsohn, Simmons & Nelson 2020).
 *
 * @module
 */
import { familyWeights, type Standing } from "./family_weights.ts";
import { observedRank, SCORE_TIE, standardScores, twoSidedRanks } from "./standard_scores.ts";

/** Which way more definitions point: alike neighbors (positive) or unlike ones (negative). */
export type Direction = "positive" | "negative";

/** What the definitions say together. NaN where no definition has anything to say. */
export interface JointTest {
  /** Family-weighted median over definitions of the observed standard scores. */
  readonly median: number;
  /** Two-sided rank of the median among the maps; it bounds the verdict. Uniform under the null. */
  readonly p: number;
  /** Share of definitions with p at most the level in the dominant direction, 0 to 1. */
  readonly share: number;
  /** Rank of the share among the maps; conservative, as a share takes few values. */
  readonly shareP: number;
  readonly direction: Direction;
}

/**
 * The median test and the share test over all definitions that have something to say.
 *
 * @param statistics For each definition P + 1 values of Moran's I, the observed one first; the same
 * position is the same map in all.
 * @param standings For each definition, the families it stands for.
 * @param level Level at which a definition counts as significant in the share.
 */
export function jointTest(
  statistics: readonly Float64Array[],
  { standings, level }: { standings: readonly Standing[]; level: number },
): JointTest {
  const scores = statistics.map(standardScores);
  const speaking = scores.map((_, s) => s).filter((s) => !Number.isNaN(scores[s][0]));
  if (speaking.length === 0) {
    return { median: NaN, p: NaN, share: NaN, shareP: NaN, direction: "positive" };
  }
  const heard = speaking.map((s) => scores[s]);
  const counted = speaking.map((s) => standings[s]);
  const medians = medianScores(heard, counted);
  return {
    median: medians[0],
    p: observedRank(medians),
    ...shareTest(heard, { standings: counted, level, median: medians[0] }),
  };
}

/**
 * Family-weighted median over definitions, on every map.
 *
 * Every family counts the same and every definition the same within its family
 * ({@link familyWeights}); the median is the score with half of that weight on either side. Because the
 * same function is applied to the observed and to every permuted map, its rank is uniform under the null.
 *
 * @param scores Standard scores of each definition (none NaN), all of one length.
 * @returns One median per map.
 */
export function medianScores(
  scores: readonly Float64Array[],
  standings: readonly Standing[],
): Float64Array {
  const weights = familyWeights(standings);
  const column = new Float64Array(scores.length);
  return scores[0].map((_, map) => {
    for (let s = 0; s < scores.length; s++) column[s] = scores[s][map];
    return weightedMedian(column, weights);
  });
}

/** Weights are fractions with small denominators: a sum this near to a half is a half. */
const HALF_TIE = 1e-9;

/**
 * The value with half of the weight on either side; the midpoint of the two middle values where the
 * weight splits exactly in half between them. With equal weights it is the plain median, and the median
 * of the negated values is the negated median.
 *
 * @param weights Not negative, summing to 1; a value of weight 0 has no say.
 */
export function weightedMedian(values: Float64Array, weights: Float64Array): number {
  const order = [...values.keys()].filter((s) => weights[s] > 0)
    .sort((a, b) => values[a] - values[b]);
  let below = 0;
  for (let k = 0; k < order.length; k++) {
    below += weights[order[k]];
    if (Math.abs(below - 0.5) <= HALF_TIE) return (values[order[k]] + values[order[k + 1]]) / 2;
    if (below > 0.5) return values[order[k]];
  }
  return NaN;
}

/**
 * Share of definitions whose own two-sided p is at most the level in the dominant direction, and its
 * rank among the shares of all maps. Each definition counts once (a merged one as often as it stands
 * for). The dominant direction of a map is the one with more such definitions and is chosen anew on every
 * map, so that choosing it after the fact is paid for.
 *
 * @param options `median` gives the direction reported when both have the same share.
 */
function shareTest(
  scores: readonly Float64Array[],
  { standings, level, median }: { standings: readonly Standing[]; level: number; median: number },
): { share: number; shareP: number; direction: Direction } {
  const maps = scores[0].length;
  const positive = new Float64Array(maps), negative = new Float64Array(maps);
  scores.forEach((own, s) => {
    const p = twoSidedRanks(own);
    for (let map = 0; map < maps; map++) {
      if (p[map] > level) continue;
      (own[map] > 0 ? positive : negative)[map] += standings[s].length;
    }
  });
  const dominant = positive.map((count, map) => Math.max(count, negative[map]));
  const total = standings.reduce((sum, standing) => sum + standing.length, 0);
  return {
    share: dominant[0] / total,
    shareP: dominant.filter((count) => count >= dominant[0]).length / maps,
    direction: (positive[0] - negative[0] || median) >= 0 ? "positive" : "negative",
  };
}

/**
 * Adjusted p of each definition: the answer to "you picked the neighbors that gave the result".
 *
 * Step-down max |z| (Westfall & Young 1993, section 2.6): definitions in descending order of their
 * observed |z|; each is ranked among the largest |z| on every map over itself and all definitions after
 * it; and no definition may end below one before it. It holds the chance of even one false finding at
 * the level. Merged definitions need no multiplicity here, as a repeated value does not move a maximum.
 *
 * @param statistics For each definition P + 1 values, the observed one first.
 * @returns One p per definition in [1 / (P + 1), 1]; NaN for a definition with nothing to say.
 */
export function stepDownMax(statistics: readonly Float64Array[]): Float64Array {
  const sizes = statistics.map((own) => standardScores(own).map(Math.abs));
  const order = sizes.map((_, s) => s).filter((s) => !Number.isNaN(sizes[s][0]))
    .sort((a, b) => sizes[b][0] - sizes[a][0]);
  const adjusted = new Float64Array(statistics.length).fill(NaN);
  if (order.length === 0) return adjusted;
  const largest = new Float64Array(statistics[0].length);
  for (const s of order.toReversed()) {
    largest.forEach((size, map) => largest[map] = Math.max(size, sizes[s][map]));
    const atLeast = largest.filter((size) => size >= sizes[s][0] - SCORE_TIE).length;
    adjusted[s] = atLeast / largest.length;
  }
  let floor = 0;
  for (const s of order) adjusted[s] = floor = Math.max(floor, adjusted[s]);
  return adjusted;
}
