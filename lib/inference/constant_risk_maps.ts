/**
 * Maps on which every person runs the same risk: the cases dealt out over the populations at random.
 *
 * @module
 */
import { poissonTable } from "../prepare/poisson_quantiles.ts";
import type { RateCounts } from "../prepare/rate_moments.ts";
import { drawBelow, drawUniform, type Stream } from "./stream.ts";

/** How far short of the cases the Poisson total falls, in its standard deviations: it is beyond on 1 map in 40. */
const SHORT = 2;

/**
 * Draws maps from the multinomial distribution of the observed number of cases over the populations, one
 * stream a map.
 *
 * The counts are first drawn as independent Poisson counts whose total is a little short of the number of cases, and then
 * single cases are added (or, now and then, taken away) at random until the total is right. Given their total, Poisson
 * counts are multinomial, and adding or removing cases at random keeps them so: the draw is exact. It uses only
 * arithmetic that rounds alike in every engine. Cost: a draw for each area and map, and some
 * 2 sqrt(cases) single ones for each map.
 *
 * @returns Counts of each map, parallel to `streams`.
 */
export function constantRiskMaps(
  { cases, population }: RateCounts,
  streams: readonly Stream[],
): Float64Array[] {
  const cumulated = runningSums(population);
  const all = cumulated[cumulated.length - 1];
  const total = cases.reduce((sum, count) => sum + count, 0);
  const rate = Math.max(0, total - SHORT * Math.sqrt(total)) / all;
  const maps = streams.map(() => new Float64Array(cases.length));
  for (let i = 0; i < cases.length; i++) {
    const { first, terms, total: whole } = poissonTable(rate * population[i]);
    const sums = runningSums(terms);
    maps.forEach((map, m) => map[i] = first + above(sums, drawUniform(streams[m]) * whole));
  }
  maps.forEach((map, m) => settleTotal(map, total, { cumulated, stream: streams[m] }));
  return maps;
}

/** Adds or takes away single cases at random until a map has `total` of them; writes into the map. */
function settleTotal(
  map: Float64Array,
  total: number,
  { cumulated, stream }: { readonly cumulated: Float64Array; readonly stream: Stream },
): void {
  const all = cumulated[cumulated.length - 1];
  const found = map.reduce((sum, count) => sum + count, 0);
  for (let missing = total - found; missing > 0; missing--) {
    map[above(cumulated, drawUniform(stream) * all)]++;
  }
  if (found > total) takeAway(map, differentNumbers(found - total, found, stream));
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
