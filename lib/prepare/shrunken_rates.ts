/**
 * Rates moved toward the rate of a larger whole, the more so the smaller the population.
 *
 * @module
 */
import { type RateCounts, type RateMoments, rateMoments } from "./rate_moments.ts";

/** Who is whose neighbor, in compressed rows; a topology and weights both fit. */
export interface Neighborhoods {
  /** Length n + 1. */
  readonly offsets: Uint32Array;
  readonly indices: Uint32Array;
}

/**
 * Empirical Bayes rates of Marshall 1991 (Applied Statistics 40, 283–294): b + (r_i - b) a / (a + b / n_i), with
 * the overall rate b and the variance a between areas. Cases per one of the population, between b and
 * the raw rate. Where a is 0 every area gets b. Cost: a few passes.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // b 0.2, a 0.008, b / n 0.002: each rate keeps 0.8 of its distance from 0.2.
 * const counts = { cases: Float64Array.of(10, 30), population: Float64Array.of(100, 100) };
 * const [low, high] = shrunkenRates(counts);
 * assert.ok(Math.abs(low - 0.12) < 1e-12 && Math.abs(high - 0.28) < 1e-12);
 * ```
 */
export function shrunkenRates(counts: RateCounts): Float64Array {
  const moments = rateMoments(counts);
  return counts.cases.map((_, i) => shrunk(counts, i, moments));
}

/**
 * The local form of Marshall 1991: the same with b, a and n̄ of each area's neighborhood, that is its
 * neighbors and itself. NaN for an area without neighbors. Where a neighborhood has no cases the rate is 0. Cost:
 * two passes over the links.
 */
export function localShrunkenRates(
  counts: RateCounts,
  { offsets, indices }: Neighborhoods,
): Float64Array {
  return counts.cases.map((_, i) => {
    const neighbors = indices.subarray(offsets[i], offsets[i + 1]);
    return neighbors.length === 0 ? NaN : shrunk(counts, i, rateMoments(counts, [...neighbors, i]));
  });
}

function shrunk(
  { cases, population }: RateCounts,
  i: number,
  { rate, between }: RateMoments,
): number {
  if (between === 0) return rate;
  return rate + (cases[i] / population[i] - rate) * between / (between + rate / population[i]);
}
