/**
 * What a neighbor adds to an area's sum.
 *
 * @module
 */

/**
 * The term that a weight multiplies: the neighbor's `score`, as in local Moran's I and in Gi, or the `squaredDifference`
 * of the two scores, as in local Geary's c.
 */
export type PairTerm = "score" | "squaredDifference";

/** The term of an area with score `own` and a neighbor with score `other`; 0 or more for squared differences. */
export function pairTerm(term: PairTerm, own: number, other: number): number {
  if (term === "score") return other;
  const difference = other - own;
  return difference * difference;
}

/** Largest size of a term of an area with score `own` when no score is larger in size than `farthest`. */
export function largestTerm(term: PairTerm, own: number, farthest: number): number {
  return term === "score" ? farthest : (Math.abs(own) + farthest) ** 2;
}
