/**
 * Exact local counts for rows of equal weights: every subset of the other areas instead of a sample.
 *
 * @module
 */
import { TIE } from "../statistics/standardize.ts";
import { lowerBound, upperBound } from "./sorted.ts";

/** Number of ways to choose `k` of `n`; Infinity beyond what a double can count. */
export function subsetsOf(n: number, k: number): number {
  let ways = 1;
  for (let i = 1; i <= Math.min(k, n - k); i++) ways = Math.round(ways * (n - i + 1) / i);
  return ways <= Number.MAX_SAFE_INTEGER ? ways : Infinity;
}

/** The rest of an area's subset: as many areas, or those left out where they are fewer. */
export function smallerSide(n: number, k: number): number {
  return Math.min(k, n - 1 - k);
}

/** Counts subsets of the other areas for one area. */
export interface SubsetCounter {
  /** Subsets of `k` others of `area` whose sum is at least and at most `observed`, ties in both. */
  count(area: number, k: number, observed: number): { atLeast: number; atMost: number };
}

/** Sums sorted at a time; sorting more would keep the caller waiting. */
const CHUNK = 2 ** 18;

/**
 * A counter for areas with scores `z`, for subsets whose smaller side has at most `largest` areas; pauses while it
 * is being made, so that the caller can look up.
 *
 * All sums of subsets of all n areas are listed and sorted once for each size. For one area i, subsets
 * without i are all subsets less those with i, and those are the subsets one smaller without i whose sum
 * lacks z_i; written out, N(k, x) = Σ_j (-1)^j R(k - j, x - j z_i) with R the rank among the sums of that
 * size. Where more than half of the others are chosen, those left out are counted instead. Cost: a sort of
 * C(n, largest) sums; then `largest` searches an area in each list of 262,144 sums.
 */
export function* openSubsetCounter(
  z: Float64Array,
  largest: number,
): Generator<void, SubsetCounter> {
  const sums: Float64Array[][] = [];
  for (let size = 0; size <= largest; size++) {
    const lists: Float64Array[] = [];
    for (const list of subsetSums(z, size)) {
      lists.push(list.sort());
      yield;
    }
    sums.push(lists);
  }
  const total = z.reduce((sum, value) => sum + value, 0);

  /** Alternating sum of ranks: `rankIn` is asked for each list of each size, with what x is to lack. */
  function without(
    own: number,
    size: number,
    rankIn: (list: Float64Array, shift: number) => number,
  ): number {
    let count = 0;
    for (let j = 0; j <= size; j++) {
      for (const list of sums[size - j]) count += (j % 2 ? -1 : 1) * rankIn(list, j * own);
    }
    return count;
  }

  function countSums(own: number, size: number, observed: number) {
    return {
      atLeast: without(
        own,
        size,
        (list, shift) => list.length - lowerBound(list, observed - shift - TIE),
      ),
      atMost: without(own, size, (list, shift) => upperBound(list, observed - shift + TIE)),
    };
  }

  return {
    count(area, k, observed) {
      const own = z[area];
      const leftOut = z.length - 1 - k;
      if (k <= leftOut) return countSums(own, k, observed);
      const { atLeast, atMost } = countSums(own, leftOut, total - own - observed);
      return { atLeast: atMost, atMost: atLeast };
    },
  };
}

/** Sums of all subsets of `size` values, in lists of at most {@link CHUNK}, in no particular order. */
function* subsetSums(values: Float64Array, size: number): Generator<Float64Array> {
  const n = values.length;
  // Places of the values chosen, ascending, and the sum of those before each place.
  const chosen = Uint32Array.from({ length: size }, (_, level) => level);
  const before = new Float64Array(size + 1);
  let left = subsetsOf(n, size), list = new Float64Array(Math.min(left, CHUNK)), found = 0;
  for (let level = 0;;) {
    for (; level < size; level++) before[level + 1] = before[level] + values[chosen[level]];
    list[found++] = before[size];
    left--;
    if (found === list.length) {
      yield list;
      list = new Float64Array(Math.min(left, CHUNK));
      found = 0;
    }
    if (left === 0) return;
    level = size - 1;
    while (chosen[level] === n - size + level) level--;
    chosen[level]++;
    for (let next = level + 1; next < size; next++) chosen[next] = chosen[next - 1] + 1;
  }
}
