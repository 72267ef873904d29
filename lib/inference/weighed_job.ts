/**
 * Local counts where a row's weights differ: all areas weigh the same draws, and areas far out draw on.
 *
 * Each permutation draws as many distinct areas as the longest row needs (and one more); every area
 * gives the first of them its own weights. Where the area itself is among them, the next draw takes its place. With a stopping
 * rule, an area stops at the draw where both tails have {@link TAIL_HITS} (Besag & Clifford 1991).
 * Cost: P draws, and one multiplication for each permutation and link.
 *
 * @module
 */
import { TIE } from "../statistics/standardize.ts";
import { BLOCK, createDealer } from "./dealer.ts";
import type { Counter, Workload } from "./job.ts";
import { type PairTerm, pairTerm } from "./pair_term.ts";
import type { Seed } from "./seed.ts";
import { openStream } from "./stream.ts";

/** What the draws need to know; plain data that can be posted to a worker. */
export interface WeighedJob {
  readonly kind: "weighed";
  readonly seed: Seed;
  /** Permutations from `from` (whole blocks) to before `to` are drawn, fewer where an area stops. */
  readonly from: number;
  readonly to: number;
  /** True: an area stops as soon as both tails have enough, counts before `from` included. */
  readonly stopping: boolean;
  /** Standard scores, length n. */
  readonly z: Float64Array;
  /** What a neighbor adds to the sum, before its weight. */
  readonly term: PairTerm;
  /** The areas to count, and for each its row of weights in `offsets`, scaled to a largest of 1. */
  readonly areas: Uint32Array;
  readonly offsets: Uint32Array;
  readonly weights: Float64Array;
  /** Weighted sum of the neighbors' terms with these weights. */
  readonly observed: Float64Array;
  /** Counts of each area before `from`. */
  readonly atLeast: Uint32Array;
  readonly atMost: Uint32Array;
}

/** Counts of some areas, by their place in the job. */
export type WeighedPart = readonly {
  readonly unit: number;
  readonly atLeast: Uint32Array;
  readonly atMost: Uint32Array;
  /** Permutations drawn for each area. */
  readonly drawn: Uint32Array;
  /** 1 where the area stopped before the last permutation. */
  readonly stopped: Uint8Array;
}[];

/** Hits in the rarer tail that let an area stop: its p is then known to about a fifth. */
export const TAIL_HITS = 25;

/** Areas in a unit: enough to make the cost of drawing small beside that of weighing. */
export const AREAS_PER_UNIT = 1024;

/** See {@link Workload}; the rates were measured on one core of 2026. */
export function weighedWorkload({ areas, from, to, weights }: WeighedJob): Workload {
  return {
    units: Math.ceil(areas.length / AREAS_PER_UNIT),
    milliseconds: (to - from) * weights.length * 1e-7,
  };
}

/** Distinct areas that a permutation draws: one more than the longest row, to replace the area itself. */
export function drawsOfRows({ offsets }: WeighedJob): number {
  let longest = 0;
  for (let a = 0; a + 1 < offsets.length; a++) {
    longest = Math.max(longest, offsets[a + 1] - offsets[a]);
  }
  return longest + 1;
}

/** Areas drawn in a block: those of draw m begin at 1,024 m, permutation after permutation. */
export interface DealtBlock {
  readonly dealt: Uint32Array;
  /** First permutation of the block, and how many there are. */
  readonly first: number;
  readonly count: number;
}

/** Counts of one area as they stand after some permutations. */
export interface Tally {
  readonly atLeast: number;
  readonly atMost: number;
  /** Permutations drawn so far. */
  readonly drawn: number;
  readonly stopped: boolean;
}

/** Counts one area through a block, in double precision, up to the draw at which it stops. */
export function tallyBlock(job: WeighedJob, row: number, block: DealtBlock, before: Tally): Tally {
  const observed = job.observed[row];
  let { atLeast, atMost } = before;
  for (let p = 0; p < block.count; p++) {
    const sum = weighedSum(job, row, block.dealt, p);
    if (sum >= observed - TIE) atLeast++;
    if (sum <= observed + TIE) atMost++;
    if (job.stopping && atLeast >= TAIL_HITS && atMost >= TAIL_HITS) {
      return { atLeast, atMost, drawn: block.first + p + 1, stopped: true };
    }
  }
  return { atLeast, atMost, drawn: block.first + block.count, stopped: false };
}

/** Weighted sum of the terms drawn for an area; where it drew itself, the draw after its last takes over. */
function weighedSum(job: WeighedJob, row: number, dealt: Uint32Array, p: number): number {
  const start = job.offsets[row], length = job.offsets[row + 1] - start;
  const area = job.areas[row], own = job.z[area];
  let sum = 0;
  for (let m = 0; m < length; m++) {
    const drawn = dealt[m * BLOCK + p];
    const other = job.z[drawn === area ? dealt[length * BLOCK + p] : drawn];
    sum += job.weights[start + m] * pairTerm(job.term, own, other);
  }
  return sum;
}

/** First and one past the last row of a unit. */
export function rowsOf(job: WeighedJob, unit: number): [first: number, last: number] {
  const first = unit * AREAS_PER_UNIT;
  return [first, Math.min(job.areas.length, first + AREAS_PER_UNIT)];
}

/** Where an area stands before the first permutation of the job. */
export function tallyAtStart(job: WeighedJob, row: number): Tally {
  return { atLeast: job.atLeast[row], atMost: job.atMost[row], drawn: job.from, stopped: false };
}

/** A unit's tallies as arrays. */
export function weighedUnit(unit: number, tallies: readonly Tally[]): WeighedPart[number] {
  return {
    unit,
    atLeast: Uint32Array.from(tallies, (tally) => tally.atLeast),
    atMost: Uint32Array.from(tallies, (tally) => tally.atMost),
    drawn: Uint32Array.from(tallies, (tally) => tally.drawn),
    stopped: Uint8Array.from(tallies, (tally) => tally.stopped ? 1 : 0),
  };
}

/** Counts a {@link WeighedJob} in plain TypeScript with 64-bit numbers. */
export function openWeighedCounter(job: WeighedJob): Counter<WeighedPart> {
  const part: WeighedPart[number][] = [];
  const draws = drawsOfRows(job);
  const dealer = createDealer(job.z.length, draws);
  const dealt = new Uint32Array(BLOCK * draws);

  function dealBlock(block: number): DealtBlock {
    const first = block * BLOCK, count = Math.min(BLOCK, job.to - first);
    dealer.open(openStream(job.seed, "weighedBlock", block));
    for (let p = 0; p < count; p++) {
      dealer.deal();
      for (let m = 0; m < draws; m++) dealt[m * BLOCK + p] = dealer.drawn[m];
    }
    return { dealt, first, count };
  }

  return {
    *run(unit) {
      const [first, last] = rowsOf(job, unit);
      const tallies = Array.from({ length: last - first }, (_, a) => tallyAtStart(job, first + a));
      for (let block = job.from / BLOCK; block * BLOCK < job.to; block++) {
        if (tallies.every((tally) => tally.stopped)) break;
        const drawn = dealBlock(block);
        for (let a = 0; a < tallies.length; a++) {
          if (!tallies[a].stopped) tallies[a] = tallyBlock(job, first + a, drawn, tallies[a]);
          if (a % 64 === 63) yield;
        }
        yield;
      }
      part.push(weighedUnit(unit, tallies));
    },
    finish: () => part,
  };
}
