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

/**
 * A counter for areas with scores `z`, for subsets whose smaller side has at most `largest` areas.
 *
 * All sums of subsets of all n areas are listed and sorted once for each size. For one area i, subsets
 * without i are all subsets less those with i, and those are the subsets one smaller without i whose sum
 * lacks z_i; written out, N(k, x) = Σ_j (-1)^j R(k - j, x - j z_i) with R the rank in the sorted list of that
 * size. Where more than half of the others are chosen, those left out are counted instead. Cost: a sort of
 * C(n, largest) sums; then `largest` searches an area.
 */
export function createSubsetCounter(z: Float64Array, largest: number): SubsetCounter {
  const lists: Float64Array[] = [];
  for (let size = 0; size <= largest; size++) lists.push(subsetSums(z, size).sort());
  const total = z.reduce((sum, value) => sum + value, 0);

  function without(
    own: number,
    size: number,
    rankOf: (list: Float64Array, shift: number) => number,
  ) {
    let count = 0;
    for (let j = 0; j <= size; j++) count += (j % 2 ? -1 : 1) * rankOf(lists[size - j], j * own);
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

/** Sums of all subsets of `size` values, in no particular order. */
function subsetSums(values: Float64Array, size: number): Float64Array {
  const sums = new Float64Array(subsetsOf(values.length, size));
  let found = 0;
  const choose = (from: number, left: number, sum: number): void => {
    if (left === 0) {
      sums[found++] = sum;
      return;
    }
    for (let i = from; i <= values.length - left; i++) choose(i + 1, left - 1, sum + values[i]);
  };
  choose(0, size, 0);
  return sums;
}
