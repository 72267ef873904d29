/**
 * Which counter does which job.
 *
 * @module
 */
import type { Counter, Workload } from "./job.ts";
import {
  openRankedCounter,
  type RankedJob,
  type RankedPart,
  rankedWorkload,
} from "./ranked_job.ts";
import { openRankedKernel } from "./ranked_kernel.ts";
import {
  openShuffleCounter,
  type ShuffleJob,
  type ShufflePart,
  shuffleWorkload,
  SINGLES_FROM,
} from "./shuffle_job.ts";
import { openShuffleKernel } from "./shuffle_kernel.ts";
import { openShuffleSingles } from "./shuffle_singles.ts";
import {
  openWeighedCounter,
  type WeighedJob,
  type WeighedPart,
  weighedWorkload,
} from "./weighed_job.ts";
import { openWeighedKernel } from "./weighed_kernel.ts";

/** Every kind of work. */
export type Job = ShuffleJob | RankedJob | WeighedJob;

/** What a counter of a job hands back. */
export type PartOf<J extends Job> = J extends ShuffleJob ? ShufflePart
  : J extends RankedJob ? RankedPart
  : WeighedPart;

/** How much work a job is. */
export function workloadOf(job: Job): Workload {
  if (job.kind === "shuffle") return shuffleWorkload(job);
  return job.kind === "ranked" ? rankedWorkload(job) : weighedWorkload(job);
}

/** Opens a counter: in the kernel where there is one, else in plain TypeScript with the same result. */
export function openCounter(job: Job, kernel: WebAssembly.Module | null): Counter<PartOf<Job>> {
  switch (job.kind) {
    case "shuffle":
      if (job.z.length < SINGLES_FROM) return openShuffleCounter(job);
      return kernel ? openShuffleKernel(job, kernel) : openShuffleSingles(job);
    case "ranked":
      return kernel ? openRankedKernel(job, kernel) : openRankedCounter(job);
    case "weighed":
      return kernel ? openWeighedKernel(job, kernel) : openWeighedCounter(job);
  }
}
