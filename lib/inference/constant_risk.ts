/**
 * Two questions to a map of rates: is it more variable than chance, and is it more clustered than a map without
 * any difference in risk would be?
 *
 * @module
 */
import type { RateCounts } from "../prepare/rate_moments.ts";
import { overdispersion } from "../statistics/overdispersion.ts";
import { TIE } from "../statistics/standardize.ts";
import { weightSums } from "../weights/sums.ts";
import type { Weights } from "../weights/weights.ts";
import { constantRiskMaps } from "./constant_risk_maps.ts";
import { type NullModel, visitNullMaps } from "./null_maps.ts";
import type { PermuteOptions } from "./options.ts";
import { permutationP, type TailCounts, twoSidedP } from "./p_value.ts";
import { type PairLinks, pairLinks, quadraticForm } from "./pair_links.ts";

/** Options of {@link checkConstantRisk}; `permutations` is the number of maps, 999 by default. */
export interface ConstantRiskOptions
  extends Pick<PermuteOptions, "permutations" | "seed" | "signal" | "onProgress"> {
  /** From counts to the values that are tested; applied anew to each map. */
  readonly valuesOf: (counts: RateCounts) => Float64Array;
}

/** What the maps of constant risk say. */
export interface ConstantRisk {
  /** Maps drawn. */
  readonly maps: number;
  /** Moran's I of the observed values against that of the maps. */
  readonly moran: {
    readonly observed: number;
    /** Mean over the maps. */
    readonly mean: number;
    readonly atLeast: number;
    readonly atMost: number;
    /** Two-sided. */
    readonly p: number;
  };
  /** Index of Potthoff & Whittinghill 1966. */
  readonly overdispersion: {
    /** 1 where the counts vary as chance would make them. */
    readonly index: number;
    readonly atLeast: number;
    /** One-sided: more variable than chance. NaN for fewer than 2 cases. */
    readonly p: number;
  };
}

/**
 * Compares a map with maps on which as many cases fell on the populations at one risk for all
 * (Waller & Gotway 2004, section 7.4). On each map the values are made anew, and with them mean and variance. A map
 * whose values are all equal counts in both tails. p = (r + 1) / (m + 1), two-sided for I and for more
 * variation only for the index.
 *
 * @throws {UsageError} for a number of maps below 99 or above 9,999,999. Rejects with the signal's reason when aborted. Cost: for
 * each map one draw an area, one transform and one pass over the pairs.
 */
export async function checkConstantRisk(
  counts: RateCounts,
  weights: Weights,
  options: ConstantRiskOptions,
): Promise<ConstantRisk> {
  const pairs = pairLinks(weights), { s0 } = weightSums(weights);
  const moranOf = (map: RateCounts) => plainMoran(options.valuesOf(map), pairs, s0);
  const moran = tally(moranOf(counts)), index = tally(overdispersion(counts));
  const constantRisk: NullModel<RateCounts> = (streams) =>
    constantRiskMaps(counts, streams).map((cases) => ({ ...counts, cases }));
  const maps = await visitNullMaps(constantRisk, (map) => {
    moran.add(moranOf(map));
    index.add(overdispersion(map));
  }, options);
  return resultOf(maps, moran.seen(), index.seen());
}

/** I of values; NaN where all are equal. */
function plainMoran(values: Float64Array, pairs: PairLinks, s0: number): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const deviations = values.map((value) => value - mean);
  const squares = deviations.reduce((sum, deviation) => sum + deviation ** 2, 0);
  // Equal values leave a variance of rounding, not of 0.
  if (!(squares > 1e-20 * values.length)) return NaN;
  return values.length / s0 * quadraticForm(pairs, deviations) / squares;
}

interface Seen {
  readonly observed: number;
  readonly mean: number;
  readonly atLeast: number;
  readonly atMost: number;
}

/** Counts draws on both sides of what was observed, ties and undefined draws in both. */
function tally(observed: number): { add(drawn: number): void; seen(): Seen } {
  let atLeast = 0, atMost = 0, sum = 0, defined = 0;
  return {
    add: (drawn) => {
      if (!(drawn < observed - TIE)) atLeast++;
      if (!(drawn > observed + TIE)) atMost++;
      if (Number.isNaN(drawn)) return;
      sum += drawn;
      defined++;
    },
    seen: () => ({ observed, atLeast, atMost, mean: sum / defined }),
  };
}

function resultOf(maps: number, moran: Seen, index: Seen): ConstantRisk {
  const tails = ({ atLeast, atMost }: Seen): TailCounts => ({
    atLeast,
    atMost,
    permutations: maps,
    enumerated: false,
  });
  const undefinedIndex = Number.isNaN(index.observed);
  return {
    maps,
    moran: { ...moran, p: twoSidedP(tails(moran)) },
    overdispersion: {
      index: index.observed,
      atLeast: index.atLeast,
      p: undefinedIndex ? NaN : permutationP(tails(index), "greater"),
    },
  };
}
