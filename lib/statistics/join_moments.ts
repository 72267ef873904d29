/**
 * Mean and variance of join counts when classes fall on the areas by chance.
 *
 * Both ways of chance need the same three facts. A count is a sum over joined pairs of areas, its
 * square a sum over pairs of pairs: a pair with itself, two that meet in one area, two that are apart. There
 * are J, D and J (J - 1) - D of them, and within each kind all have the same probability.
 *
 * @module
 */

/** What the moments need to know about the links. */
export interface JoinStructure {
  /** Areas, islands included. */
  readonly areas: number;
  /** J: joined pairs of areas. */
  readonly joins: number;
  /** D = Σ M_i (M_i - 1): ordered pairs of joins that meet in an area, M_i the joins of area i. */
  readonly meetings: number;
}

/** Moments of one join count. */
export interface JoinMoments {
  /** Mean of the count, in joins. */
  readonly expected: number;
  /** Variance of the count; 0 where it cannot vary. */
  readonly variance: number;
  /** (joins - expected) / sqrt(variance); NaN where the variance is 0. */
  readonly z: number;
}

/**
 * Moments over all orders of the classes found ("nonfree" sampling, without replacement; Cliff & Ord
 * 1981, pp. 19-20). `first` and `second` are the numbers of areas of the two classes; `second` is null for
 * joins within one class. Exact, as enumeration shows. Cost: constant.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // A row of three areas, two of them of one class: joined in 2 of the 3 ways to choose them.
 * const { expected, variance } = nonfreeMoments(1, { areas: 3, joins: 2, meetings: 2 }, 2, null);
 * assert.ok(Math.abs(expected - 2 / 3) < 1e-15 && Math.abs(variance - 2 / 9) < 1e-15);
 * ```
 */
export function nonfreeMoments(
  joins: number,
  structure: JoinStructure,
  first: number,
  second: number | null,
): JoinMoments {
  const n = structure.areas;
  const ofTwo = n * (n - 1), ofThree = ofTwo * (n - 2), ofFour = ofThree * (n - 3);
  if (second === null) {
    const two = first * (first - 1), three = two * (first - 2), four = three * (first - 3);
    return momentsOf(joins, structure, two / ofTwo, share(three, ofThree), share(four, ofFour));
  }
  const both = first * second;
  return momentsOf(
    joins,
    structure,
    2 * both / ofTwo,
    share(both * (first + second - 2), ofThree),
    share(4 * both * (first - 1) * (second - 1), ofFour),
  );
}

/**
 * Moments when each area draws its class independently ("free" sampling, with replacement; Cliff & Ord
 * 1981, pp. 19-20). `first` and `second` are the probabilities of the two classes; `second` is null for
 * joins within one class. Exact where the probabilities are known beforehand; with shares taken from the
 * same map it overstates the variance. Cost: constant.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // One joined pair, two classes at even odds: both areas of the first class in 1 case of 4.
 * const { expected, variance } = freeMoments(1, { areas: 2, joins: 1, meetings: 0 }, 0.5, null);
 * assert.deepEqual([expected, variance], [1 / 4, 3 / 16]);
 * ```
 */
export function freeMoments(
  joins: number,
  structure: JoinStructure,
  first: number,
  second: number | null,
): JoinMoments {
  if (second === null) {
    return momentsOf(joins, structure, first ** 2, first ** 3, first ** 4);
  }
  const both = first * second;
  return momentsOf(joins, structure, 2 * both, both * (first + second), 4 * both * both);
}

/** Moments from the probabilities of one join, of two that meet, and of two that are apart. */
function momentsOf(
  joins: number,
  { joins: all, meetings }: JoinStructure,
  one: number,
  meeting: number,
  apart: number,
): JoinMoments {
  const expected = all * one;
  // Around the square of the mean first: the large terms cancel here and nowhere else.
  const terms = [
    all * (one - apart),
    meetings * (meeting - apart),
    all * all * (apart - one * one),
  ];
  const sum = terms[0] + terms[1] + terms[2];
  const variance = sum > 1e-12 * Math.max(...terms.map(Math.abs)) ? sum : 0;
  return { expected, variance, z: variance > 0 ? (joins - expected) / Math.sqrt(variance) : NaN };
}

/** On two or three areas there are no two joins apart (or meeting), so their probability is not needed. */
function share(ways: number, allWays: number): number {
  return allWays === 0 ? 0 : ways / allWays;
}
