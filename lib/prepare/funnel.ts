/**
 * Which areas lie outside what chance alone would give a population of their size.
 *
 * @module
 */
import { type CountTable, countTable, tableQuantiles } from "./count_table.ts";
import { type RateCounts, rateMoments } from "./rate_moments.ts";

/** Where a count lies against the funnel limits, from high to low. */
export const FUNNEL_WORDS = [
  "above 99.8",
  "above 95",
  "inside",
  "below 95",
  "below 99.8",
] as const;
/** See {@link FUNNEL_WORDS}. */
export type FunnelWord = typeof FUNNEL_WORDS[number];

/** Funnel limits of a count: the range that chance leaves with at most 2.5 % and 0.1 % on each side. */
export interface FunnelLimits {
  readonly low998: number;
  readonly low95: number;
  readonly high95: number;
  readonly high998: number;
}

/**
 * Exact limits of a count at 95 % and 99.8 %, as in the funnel plot of Spiegelhalter 2005 (Statistics in
 * Medicine 24, 1185–1202), without interpolation: each limit is the smallest count whose cumulated probability
 * reaches 0.001, 0.025, 0.975 or 0.999. A count on a limit is inside.
 */
export function funnelLimits(table: CountTable): FunnelLimits {
  const [low998, low95, high95, high998] = tableQuantiles(table, [0.001, 0.025, 0.975, 0.999]);
  return { low998, low95, high95, high998 };
}

/**
 * The word of each area: its count against what the overall rate would give its population, Poisson, or binomial for a
 * share. Cost: about 18 sqrt(expected count) steps an area.
 */
export function funnelWords(counts: RateCounts): FunnelWord[] {
  const { rate } = rateMoments(counts);
  return Array.from(
    counts.cases,
    (count, i) => funnelWord(count, funnelLimits(countTable(counts, i, rate))),
  );
}

function funnelWord(count: number, limits: FunnelLimits): FunnelWord {
  if (count > limits.high998) return "above 99.8";
  if (count > limits.high95) return "above 95";
  if (count < limits.low998) return "below 99.8";
  return count < limits.low95 ? "below 95" : "inside";
}
