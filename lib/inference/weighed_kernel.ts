/**
 * Weighed local counts in the WebAssembly kernel; same counts as `openWeighedCounter`.
 *
 * @module
 */
import { TIE } from "../statistics/standardize.ts";
import { BLOCK } from "./dealer.ts";
import type { Counter } from "./job.ts";
import { planMemory, STREAM_BYTES } from "./kernel_memory.ts";
import { startKernel } from "./load_kernel.ts";
import { largestTerm } from "./pair_term.ts";
import { PURPOSES } from "./stream.ts";
import {
  AREAS_PER_UNIT,
  drawsOfRows,
  rowsOf,
  TAIL_HITS,
  type Tally,
  tallyAtStart,
  tallyBlock,
  type WeighedJob,
  type WeighedPart,
  weighedUnit,
  weighedWorkload,
} from "./weighed_job.ts";

/** 32-bit words of a row in the kernel: two doubles, two singles, start, length, two counts. */
const ROW_WORDS = 10;
const OBSERVED = 0, OWN = 2; // both doubles
const ABOVE = 4, BELOW = 5, START = 6, LENGTH = 7, AT_LEAST = 8, AT_MOST = 9;
/** 32-bit words of the kernel's layout. */
const LAYOUT_WORDS = 17;
/** Rows counted in one call, so that calls stay short. */
const ROWS_PER_CALL = 256;

/** Counts a {@link WeighedJob} in the kernel. Memory: 16 bytes an area, and tables of 8 KB a draw. */
export function openWeighedKernel(
  job: WeighedJob,
  module: WebAssembly.Module,
): Counter<WeighedPart> {
  const { z, seed } = job;
  const n = z.length, draws = drawsOfRows(job), mostLinks = linksOfLargestUnit(job);
  const plan = planMemory();
  const layoutAt = plan.reserve(LAYOUT_WORDS * 4);
  const scoresAt = plan.reserve(n * 8);
  const rowsAt = plan.reserve(AREAS_PER_UNIT * ROW_WORDS * 4);
  const weightsAt = plan.reserve(mostLinks * 8);
  const singlesAt = plan.reserve(mostLinks * 4);
  const rowOfAt = plan.reserve(n * 4);
  const dealtAt = plan.reserve(BLOCK * draws * 4);
  const tableAt = plan.reserve(BLOCK * draws * 4);
  const streamAt = plan.reserve(STREAM_BYTES);
  const drawnAt = plan.reserve(draws * 4);
  const marksAt = plan.reserve(n * 4);
  const pairedAt = plan.reserve(draws * 8);
  const listAt = plan.reserve(AREAS_PER_UNIT * 4);
  const { kernel, memory } = startKernel(module, plan.size);
  const words = new Uint32Array(memory, rowsAt, AREAS_PER_UNIT * ROW_WORDS);
  const singles = new Float32Array(memory, rowsAt, AREAS_PER_UNIT * ROW_WORDS);
  const doubles = new Float64Array(memory, rowsAt, AREAS_PER_UNIT * ROW_WORDS / 2);
  const rowOf = new Uint32Array(memory, rowOfAt, n), marks = new Uint32Array(memory, marksAt, n);
  const list = new Uint32Array(memory, listAt, AREAS_PER_UNIT);
  const dealt = new Uint32Array(memory, dealtAt, BLOCK * draws);
  new Float64Array(memory, scoresAt, n).set(z);
  new Uint32Array(memory, layoutAt, LAYOUT_WORDS).set([
    seed.low,
    seed.high,
    PURPOSES.weighedBlock,
    scoresAt,
    n,
    rowsAt,
    weightsAt,
    singlesAt,
    rowOfAt,
    draws,
    dealtAt,
    tableAt,
    streamAt,
    drawnAt,
    marksAt,
    pairedAt,
    job.term === "squaredDifference" ? 1 : 0,
  ]);
  const farthest = z.reduce((most, score) => Math.max(most, Math.abs(score)), 0);
  const part: WeighedPart[number][] = [];

  function fillRows(first: number, last: number): void {
    rowOf.fill(0);
    marks.fill(0);
    const origin = job.offsets[first];
    const weights = job.weights.subarray(origin, job.offsets[last]);
    new Float64Array(memory, weightsAt, weights.length).set(weights);
    new Float32Array(memory, singlesAt, weights.length).set(weights);
    for (let a = 0; a < last - first; a++) {
      const start = job.offsets[first + a], end = job.offsets[first + a + 1];
      const observed = job.observed[first + a], own = z[job.areas[first + a]];
      const term = largestTerm(job.term, own, farthest);
      const slack = singleError(job.weights.subarray(start, end), observed, term);
      doubles[(a * ROW_WORDS + OBSERVED) / 2] = observed;
      doubles[(a * ROW_WORDS + OWN) / 2] = own;
      singles[a * ROW_WORDS + ABOVE] = observed + slack;
      singles[a * ROW_WORDS + BELOW] = observed - slack;
      words[a * ROW_WORDS + START] = start - origin;
      words[a * ROW_WORDS + LENGTH] = end - start;
      rowOf[job.areas[first + a]] = a + 1;
    }
  }

  function* countBlock(block: number, active: number): Generator<void> {
    const count = Math.min(BLOCK, job.to - block * BLOCK);
    kernel.dealBlock(layoutAt, block, count);
    for (let a = 0; a < active; a++) {
      words.fill(0, list[a] * ROW_WORDS + AT_LEAST, list[a] * ROW_WORDS + AT_MOST + 1);
    }
    for (let a = 0; a < active; a += ROWS_PER_CALL) {
      kernel.weighBlock(layoutAt, listAt + a * 4, Math.min(ROWS_PER_CALL, active - a), count, TIE);
      yield;
    }
    kernel.takeOwnAreasOut(layoutAt, count, TIE);
  }

  /** The tally after a block, gone through again draw by draw where the area stops inside it. */
  function tallyAfter(row: number, a: number, block: number, before: Tally): Tally {
    const first = block * BLOCK, count = Math.min(BLOCK, job.to - first);
    const atLeast = before.atLeast + words[a * ROW_WORDS + AT_LEAST];
    const atMost = before.atMost + words[a * ROW_WORDS + AT_MOST];
    if (job.stopping && atLeast >= TAIL_HITS && atMost >= TAIL_HITS) {
      return tallyBlock(job, row, { dealt, first, count }, before);
    }
    return { atLeast, atMost, drawn: first + count, stopped: false };
  }

  return {
    *run(unit) {
      const [first, last] = rowsOf(job, unit);
      fillRows(first, last);
      const tallies = Array.from({ length: last - first }, (_, a) => tallyAtStart(job, first + a));
      let active = last - first;
      for (let a = 0; a < active; a++) list[a] = a;
      for (let block = job.from / BLOCK; active > 0 && block * BLOCK < job.to; block++) {
        yield* countBlock(block, active);
        let left = 0;
        for (let at = 0; at < active; at++) {
          const a = list[at];
          tallies[a] = tallyAfter(first + a, a, block, tallies[a]);
          if (tallies[a].stopped) words[a * ROW_WORDS + LENGTH] = 0;
          else list[left++] = a;
        }
        active = left;
      }
      part.push(weighedUnit(unit, tallies));
    },
    finish: () => part,
  };
}

/**
 * Distance from the observed sum beyond which a sum in single precision is on the right side for certain: its
 * error is at most a part in 2^24 for each of its roundings of the sizes added (one for each addition, and up to
 * seven in a squared difference and its product), and ties count as equal.
 */
function singleError(weights: Float64Array, observed: number, largest: number): number {
  const sizes = weights.reduce((sum, weight) => sum + Math.abs(weight), 0) * largest;
  const error = (weights.length + 12) * 2 ** -24 * sizes + TIE;
  return error + (Math.abs(observed) + error) * 2 ** -22;
}

function linksOfLargestUnit(job: WeighedJob): number {
  let most = 0;
  for (let unit = 0; unit < weighedWorkload(job).units; unit++) {
    const [first, last] = rowsOf(job, unit);
    most = Math.max(most, job.offsets[last] - job.offsets[first]);
  }
  return most;
}
