/**
 * One definition's statistic over all maps, made comparable with the other definitions'.
 *
 * Throughout the sweep a "map" is the observed arrangement (position 0) or one of the arrangements drawn
 * under the null (positions 1 … P). The same position is the same arrangement in every definition.
 *
 * @module
 */
import { twoSidedP } from "../inference/p_value.ts";

/** Scores closer than this count as equal, in standard deviations. */
export const SCORE_TIE = 1e-10;

/** A statistic whose standard deviation over the maps is smaller does not depend on the arrangement. */
const CONSTANT = 1e-12;

/**
 * Standard scores z(p) = (I(p) - mean) / sd over all P + 1 maps, the observed one included (divisor
 * P + 1). Including it keeps the maps exchangeable, so ranks taken among the scores are exact.
 *
 * @param statistics P + 1 values, the observed one first.
 * @returns P + 1 scores; all NaN when the statistic is undefined or the same on every map (everyone a
 * neighbor of everyone, or nobody of anybody): such a definition has nothing to say.
 */
export function standardScores(statistics: Float64Array): Float64Array {
  const mean = statistics.reduce((sum, value) => sum + value, 0) / statistics.length;
  const squares = statistics.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  const sd = Math.sqrt(squares / statistics.length);
  const speaks = sd > CONSTANT;
  return statistics.map((value) => speaks ? (value - mean) / sd : NaN);
}

/**
 * Two-sided p of every map's score among all of them: 2 × the smaller tail count / (P + 1), at most 1.
 * Entry 0 is the definition's own p; the others are what each permuted map would have been told.
 *
 * @param scores P + 1 scores. NaN throughout gives NaN throughout.
 * @returns P + 1 values in [2 / (P + 1), 1]. Cost: one sort.
 */
export function twoSidedRanks(scores: Float64Array): Float64Array {
  if (Number.isNaN(scores[0])) return scores.slice();
  const sorted = scores.toSorted();
  return scores.map((score) => {
    const below = firstNotBelow(sorted, score - SCORE_TIE);
    const atMost = firstNotBelow(sorted, score + SCORE_TIE);
    return rankP(scores.length - below, atMost, scores.length);
  });
}

/** Two-sided p of the observed map alone: entry 0 of {@link twoSidedRanks}, without the sort. */
export function observedRank(scores: Float64Array): number {
  const [observed] = scores;
  if (Number.isNaN(observed)) return NaN;
  let atLeast = 0, atMost = 0;
  for (const score of scores) {
    if (score >= observed - SCORE_TIE) atLeast++;
    if (score <= observed + SCORE_TIE) atMost++;
  }
  return rankP(atLeast, atMost, scores.length);
}

/** The observed map is among those counted, which is what "enumerated" means for a p-value. */
function rankP(atLeast: number, atMost: number, maps: number): number {
  return twoSidedP({ atLeast, atMost, permutations: maps, enumerated: true });
}

/** Number of entries of an ascending array that are smaller than `bound`. */
function firstNotBelow(sorted: Float64Array, bound: number): number {
  let low = 0, high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (sorted[middle] < bound) low = middle + 1;
    else high = middle;
  }
  return low;
}
