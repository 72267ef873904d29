/**
 * From counts of permutations to p-values and their intervals.
 *
 * @module
 */
import { inverseIncompleteBeta } from "./incomplete_beta.ts";

/** How many permutations were at least and at most the observed value, ties in both. */
export interface TailCounts {
  readonly atLeast: number;
  readonly atMost: number;
  /** Permutations drawn, or orders enumerated; 0 where there was nothing to permute. */
  readonly permutations: number;
  /** True where every order was counted, the observed one among them. */
  readonly enumerated: boolean;
  /** True where sampling stopped early because both tails had enough (Besag & Clifford 1991). */
  readonly stopped?: boolean;
}

/** Which departures from the null count. */
export type Alternative = "two-sided" | "greater" | "less";

/**
 * Two-sided permutation p: twice the smaller tail, at most 1.
 *
 * Sampled: 2 (min(r) + 1) / (m + 1), never 0 (Phipson & Smyth 2010); its floor is 2 / (m + 1).
 * Enumerated: 2 min(r) / m. Stopped early: 2 min(r) / m at the draw where the rarer tail had enough
 * (Besag & Clifford 1991). NaN for no permutations.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const counts = { atLeast: 4, atMost: 995, permutations: 999, enumerated: false };
 * assert.equal(twoSidedP(counts), 0.01);
 * ```
 */
export function twoSidedP(counts: TailCounts): number {
  return Math.min(1, 2 * tailP(Math.min(counts.atLeast, counts.atMost), counts));
}

/**
 * Permutation p for an alternative: `greater` asks how often at least the observed value came up, `less`
 * how often at most. Not for counts that stopped early, which are two-sided by design.
 *
 * @throws RangeError for one-sided p of counts that stopped early.
 */
export function permutationP(counts: TailCounts, alternative: Alternative): number {
  if (alternative === "two-sided") return twoSidedP(counts);
  if (counts.stopped) {
    throw new RangeError(
      "Cannot give a one-sided p for draws that stopped when both tails had enough",
    );
  }
  return tailP(alternative === "greater" ? counts.atLeast : counts.atMost, counts);
}

/**
 * Smallest two-sided p that `permutations` sampled draws can give.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.equal(floorOfP(999_999), 2e-6);
 * ```
 */
export function floorOfP(permutations: number): number {
  return 2 / (permutations + 1);
}

function tailP(count: number, { permutations, enumerated, stopped }: TailCounts): number {
  if (permutations === 0) return NaN;
  return enumerated || stopped ? count / permutations : (count + 1) / (permutations + 1);
}

/**
 * Interval of Clopper & Pearson (1934) for a probability of which `hits` of `draws` independent draws
 * were seen: it covers the truth with at least the given confidence.
 *
 * @throws RangeError unless 0 <= hits <= draws, both whole, and 0 < confidence < 1.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const [low, high] = clopperPearson(0, 999);
 * assert.equal(low, 0);
 * assert.ok(Math.abs(high - (1 - 0.005 ** (1 / 999))) < 1e-12);
 * ```
 */
export function clopperPearson(hits: number, draws: number, confidence = 0.99): [number, number] {
  if (
    !(Number.isInteger(hits) && Number.isInteger(draws) && hits >= 0 && hits <= draws && draws > 0)
  ) {
    throw new RangeError(`Cannot give an interval for ${hits} hits in ${draws} draws`);
  }
  if (!(confidence > 0 && confidence < 1)) {
    throw new RangeError(
      `Cannot give an interval of confidence ${confidence}; it lies between 0 and 1`,
    );
  }
  const tail = (1 - confidence) / 2;
  return [
    hits === 0 ? 0 : inverseIncompleteBeta(tail, hits, draws - hits + 1),
    hits === draws ? 1 : inverseIncompleteBeta(1 - tail, hits + 1, draws - hits),
  ];
}

/**
 * 99 % interval of the two-sided p: twice that of the smaller tail, at most 1. Null where p is exact (enumerated) or
 * undefined.
 *
 * After a fixed number of draws it is the interval of Clopper & Pearson; where drawing stopped at a hit of the rarer tail,
 * that of the draws it takes to get so many hits (negative binomial), exact in the same sense.
 */
export function intervalOfP(counts: TailCounts): [number, number] | null {
  if (counts.enumerated || counts.permutations === 0) return null;
  const tail = Math.min(counts.atLeast, counts.atMost);
  const [low, high] = counts.stopped
    ? intervalAtHit(tail, counts.permutations)
    : clopperPearson(tail, counts.permutations);
  return [Math.min(1, 2 * low), Math.min(1, 2 * high)];
}

/** 99 % interval of a probability whose last of `hits` came at draw number `draws`. */
function intervalAtHit(hits: number, draws: number): [number, number] {
  if (hits === draws) return [inverseIncompleteBeta(0.005, hits, 1), 1];
  return [
    inverseIncompleteBeta(0.005, hits, draws - hits + 1),
    inverseIncompleteBeta(0.995, hits, draws - hits),
  ];
}
