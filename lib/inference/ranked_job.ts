/**
 * Local counts where a row's weights are equal: all areas share one set of draws, sorted once.
 *
 * With equal weights the neighbors' sum of an area depends only on how many neighbors it has. So one
 * draws, for each permutation, as many distinct areas as the largest number of neighbors k needs (and
 * one more), takes the sum of the first k values for each k that occurs, and sorts these sums; the count
 * of permutations at least as large as an area's own sum is then a rank. Where the area itself is among its
 * first k draws, it is taken out and draw k + 1 put in, which makes the sample exactly "k of the
 * other n - 1". Cost: P draws of kmax + 1, one sort of P sums for each distinct k, one search an area.
 *
 * @module
 */
import { TIE } from "../statistics/standardize.ts";
import { BLOCK, createDealer } from "./dealer.ts";
import type { Counter, Workload } from "./job.ts";
import type { Seed } from "./seed.ts";
import { lowerBound, upperBound } from "./sorted.ts";
import { openStream } from "./stream.ts";

/**
 * What the draws need to know; plain data that can be posted to a worker. Areas are renumbered: those to be
 * tested first, in the order of `orderAreas`; the rest follow and only lend their values.
 */
export interface RankedJob {
  readonly kind: "ranked";
  readonly seed: Seed;
  readonly permutations: number;
  /** Standard scores in the new order, length n. */
  readonly z: Float64Array;
  /** Sum of the neighbors' scores of each tested area. */
  readonly observed: Float64Array;
  /** The distinct neighbor counts, ascending. */
  readonly degrees: Uint32Array;
  /** Tested areas `starts[d]` … `starts[d + 1] - 1` have `degrees[d]` neighbors; length degrees + 1. */
  readonly starts: Uint32Array;
}

/** Permutations with a sum at least and at most the observed one, for each tested area in the new order. */
export interface RankedPart {
  readonly atLeast: Uint32Array;
  readonly atMost: Uint32Array;
}

/** Most sums held at a time; 16 MB. */
const MOST_SUMS = 2 ** 21;
/** Longest slice in blocks: long enough to spread the search of a million areas, short enough to pause. */
const MOST_BLOCKS = 64;

/** Permutations in a unit: whole blocks, fewer where many distinct neighbor counts need many sums. */
export function rankedSlice({ degrees }: RankedJob): number {
  const blocks = Math.floor(MOST_SUMS / BLOCK / degrees.length);
  return BLOCK * Math.max(4, Math.min(MOST_BLOCKS, blocks));
}

/** First and one past the last permutation of a unit. */
export function rankedPermutationsOf(job: RankedJob, unit: number): [from: number, to: number] {
  const slice = rankedSlice(job);
  return [unit * slice, Math.min(job.permutations, (unit + 1) * slice)];
}

/** Distinct areas that a permutation draws: one more than the largest neighbor count, to replace itself. */
export function drawsOf({ degrees }: RankedJob): number {
  return degrees[degrees.length - 1] + 1;
}

/** See {@link Workload}; the rates were measured on one core of 2026. */
export function rankedWorkload(job: RankedJob): Workload {
  const units = Math.ceil(job.permutations / rankedSlice(job));
  const perPermutation = drawsOf(job) * 1e-5 + job.degrees.length * 3e-5;
  return {
    units,
    milliseconds: job.permutations * perPermutation + units * job.observed.length * 2e-5,
  };
}

/** Counts a {@link RankedJob} in plain TypeScript. */
export function openRankedCounter(job: RankedJob): Counter<RankedPart> {
  const { z, observed, degrees, starts, seed } = job;
  const atLeast = new Uint32Array(observed.length), atMost = new Uint32Array(observed.length);
  const columns = degrees.map((_, d) => d);
  const draws = drawsOf(job);
  const dealer = createDealer(z.length, draws);
  const degreeOf = degreeOfEach(job);
  const prefix = new Float64Array(draws + 1);
  const slice = rankedSlice(job);
  const sums = new Float64Array(Math.min(slice, job.permutations) * degrees.length);

  function drawBlock(block: number, from: number, to: number, stride: number): void {
    dealer.open(openStream(seed, "rankedBlock", block));
    for (let p = 0; p < Math.min(BLOCK, to - block * BLOCK); p++) {
      dealer.deal();
      for (let m = 0; m < draws; m++) prefix[m + 1] = prefix[m] + z[dealer.drawn[m]];
      for (const d of columns) sums[d * stride + block * BLOCK - from + p] = prefix[degrees[d]];
      for (let m = 0; m + 1 < draws; m++) replaceItself(dealer.drawn[m], m);
    }
  }

  /** Where a tested area was drawn for its own neighbors, its count has to be that of the next draw. */
  function replaceItself(area: number, draw: number): void {
    const degree = degreeOf[area];
    if (draw >= degree) return;
    const own = observed[area];
    const sum = prefix[degree];
    const replaced = sum - z[area] + z[dealer.drawn[degree]];
    atLeast[area] += Number(replaced >= own - TIE) - Number(sum >= own - TIE);
    atMost[area] += Number(replaced <= own + TIE) - Number(sum <= own + TIE);
  }

  function rank(sorted: Float64Array, d: number): void {
    for (let area = starts[d]; area < starts[d + 1]; area++) {
      atLeast[area] += sorted.length - lowerBound(sorted, observed[area] - TIE);
      atMost[area] += upperBound(sorted, observed[area] + TIE);
    }
  }

  return {
    *run(unit) {
      const [from, to] = rankedPermutationsOf(job, unit);
      const stride = to - from;
      for (let block = from / BLOCK; block * BLOCK < to; block++) {
        drawBlock(block, from, to, stride);
        yield;
      }
      for (const d of columns) {
        rank(sums.slice(d * stride, (d + 1) * stride).sort(), d);
        yield;
      }
    },
    finish: () => ({ atLeast, atMost }),
  };
}

/** Neighbor count of each area in the new order; 0 for those that are not tested. */
export function degreeOfEach({ z, degrees, starts }: RankedJob): Uint32Array {
  const degreeOf = new Uint32Array(z.length);
  degrees.forEach((degree, d) => degreeOf.fill(degree, starts[d], starts[d + 1]));
  return degreeOf;
}
