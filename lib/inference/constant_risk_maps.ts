/**
 * Maps on which every person runs the same risk: the cases dealt out over the populations at random.
 *
 * @module
 */
import { countTable } from "../prepare/count_table.ts";
import type { RateCounts } from "../prepare/rate_moments.ts";
import { drawBelow, drawUniform, type Stream } from "./stream.ts";

/** How far short of the cases the Poisson total falls, in its standard deviations: it is beyond on 1 map in 40. */
const SHORT = 2;

/**
 * Draws maps from the multinomial distribution of the observed number of cases over the populations, one
 * stream a map. For a share, nobody counts twice: the distribution is multivariate hypergeometric.
 *
 * The counts are first drawn as independent Poisson (for a share binomial) counts whose total is a little short
 * of the number of cases, and then single cases are added (or, now and then, taken away) at random until the
 * total is right. Given their total, such counts have the distribution wanted, and adding or removing cases at
 * random keeps them so: the draw is exact. It uses only arithmetic that rounds alike in every engine. Cost: a draw for
 * each area and map, and some 2 sqrt(cases) single ones for each map.
 *
 * @returns Counts of each map, parallel to `streams`.
 */
export function constantRiskMaps(
  counts: RateCounts,
  streams: readonly Stream[],
): Float64Array[] {
  const { cases, population } = counts;
  const cumulated = runningSums(population);
  const all = cumulated[cumulated.length - 1];
  const total = cases.reduce((sum, count) => sum + count, 0);
  const rate = Math.max(0, total - SHORT * Math.sqrt(total)) / all;
  const maps = streams.map(() => new Float64Array(cases.length));
  for (let i = 0; i < cases.length; i++) {
    const { first, terms, total: whole } = countTable(counts, i, rate);
    const sums = runningSums(terms);
    maps.forEach((map, m) => map[i] = first + above(sums, drawUniform(streams[m]) * whole));
  }
  maps.forEach((map, m) => {
    const found = map.reduce((sum, count) => sum + count, 0);
    if (found > total) takeAway(map, differentNumbers(found - total, found, streams[m]));
    else addCases(map, total - found, { counts, cumulated, stream: streams[m] });
  });
  return maps;
}

/** Gives each of so many new cases to a person at random, of a share to one who is no case yet; writes into the map. */
function addCases(
  map: Float64Array,
  missing: number,
  { counts: { population, share }, cumulated, stream }: {
    readonly counts: RateCounts;
    readonly cumulated: Float64Array;
    readonly stream: Stream;
  },
): void {
  const all = cumulated[cumulated.length - 1];
  for (let left = missing; left > 0;) {
    const area = above(cumulated, drawUniform(stream) * all);
    if (share && drawUniform(stream) * population[area] < map[area]) continue;
    map[area]++;
    left--;
  }
}

/** `size` different whole numbers below `bound`, ascending, all sets equally likely. */
function differentNumbers(size: number, bound: number, stream: Stream): number[] {
  const chosen = new Set<number>();
  while (chosen.size < size) chosen.add(drawBelow(stream, bound));
  return [...chosen].sort((a, b) => a - b);
}

/** Takes away the cases with these numbers, all cases counted from area to area; writes into the map. */
function takeAway(map: Float64Array, numbers: readonly number[]): void {
  let end = 0, next = 0;
  for (let i = 0; i < map.length && next < numbers.length; i++) {
    end += map[i];
    for (; numbers[next] < end; next++) map[i]--;
  }
}

/** Position of the first entry above `x`; the last one where rounding leaves none. */
function above(ascending: Float64Array, x: number): number {
  let low = 0, high = ascending.length - 1;
  while (low < high) {
    const middle = low + high >> 1;
    if (ascending[middle] > x) high = middle;
    else low = middle + 1;
  }
  return low;
}

function runningSums(terms: Float64Array): Float64Array {
  let sum = 0;
  return terms.map((term) => sum += term);
}
