/**
 * Ranked local counts in the WebAssembly kernel; same counts as `openRankedCounter`.
 *
 * @module
 */
import { TIE } from "../statistics/standardize.ts";
import { BLOCK } from "./dealer.ts";
import type { Counter } from "./job.ts";
import { planMemory, SORT_BYTES, STREAM_BYTES } from "./kernel_memory.ts";
import { startKernel } from "./load_kernel.ts";
import {
  degreeOfEach,
  drawsOf,
  type RankedJob,
  type RankedPart,
  rankedPermutationsOf,
  rankedSlice,
} from "./ranked_job.ts";
import { PURPOSES } from "./stream.ts";

/** 32-bit words of an area in the kernel: z and observed as doubles, degree, two counts, one unused. */
const AREA_WORDS = 8;
const DEGREE = 4, AT_LEAST = 5, AT_MOST = 6;

/** Counts a {@link RankedJob} in the kernel. Memory: 36 bytes an area and the sums of one unit. */
export function openRankedKernel(job: RankedJob, module: WebAssembly.Module): Counter<RankedPart> {
  const { z, observed, degrees, starts, seed } = job;
  const n = z.length, draws = drawsOf(job);
  const stride = Math.min(rankedSlice(job), job.permutations);
  const plan = planMemory();
  const layoutAt = plan.reserve(64);
  const areasAt = plan.reserve(n * AREA_WORDS * 4);
  const degreesAt = plan.reserve(degrees.byteLength);
  const sumsAt = plan.reserve(stride * degrees.length * 8);
  const otherAt = plan.reserve(stride * 8);
  const countersAt = plan.reserve(SORT_BYTES);
  const streamAt = plan.reserve(STREAM_BYTES);
  const drawnAt = plan.reserve(BLOCK * draws * 4);
  const runningAt = plan.reserve(BLOCK * (draws + 1) * 8);
  const marksAt = plan.reserve(n * 4);
  const { kernel, memory } = startKernel(module, plan.size);

  const words = new Uint32Array(memory, areasAt, n * AREA_WORDS);
  const doubles = new Float64Array(memory, areasAt, n * AREA_WORDS / 2);
  const degreeOf = degreeOfEach(job);
  for (let area = 0; area < n; area++) {
    doubles[area * AREA_WORDS / 2] = z[area];
    words[area * AREA_WORDS + DEGREE] = degreeOf[area];
  }
  for (let area = 0; area < observed.length; area++) {
    doubles[area * AREA_WORDS / 2 + 1] = observed[area];
  }
  new Uint32Array(memory, degreesAt, degrees.length).set(degrees);
  new Uint32Array(memory, layoutAt, 14).set([
    seed.low,
    seed.high,
    PURPOSES.rankedBlock,
    areasAt,
    n,
    degreesAt,
    degrees.length,
    draws,
    sumsAt,
    stride,
    streamAt,
    drawnAt,
    runningAt,
    marksAt,
  ]);

  return {
    *run(unit) {
      const [from, to] = rankedPermutationsOf(job, unit);
      for (let block = from / BLOCK; block * BLOCK < to; block++) {
        const count = Math.min(BLOCK, to - block * BLOCK);
        kernel.drawRankedBlock(layoutAt, block, count, block * BLOCK - from, TIE);
        yield;
      }
      for (let d = 0; d < degrees.length; d++) {
        const column = sumsAt + d * stride * 8;
        kernel.sortDoubles(column, to - from, otherAt, countersAt);
        kernel.rankAreas(areasAt, starts[d], starts[d + 1], column, to - from, TIE);
        yield;
      }
    },
    finish() {
      const countsAt = (word: number) => {
        const counts = new Uint32Array(observed.length);
        for (let area = 0; area < counts.length; area++) {
          counts[area] = words[area * AREA_WORDS + word];
        }
        return counts;
      };
      return { atLeast: countsAt(AT_LEAST), atMost: countsAt(AT_MOST) };
    },
  };
}
