/**
 * Carrying out a job, unit by unit, in this thread or on workers.
 *
 * @module
 */
import { type Job, openCounter, type PartOf, workloadOf } from "./counters.ts";
import type { Workload } from "./job.ts";
import { compileKernel } from "./load_kernel.ts";
import { checkWorkers, type PermuteOptions } from "./options.ts";
import { createPace } from "./pace.ts";
import { runOnWorkers } from "./run_on_workers.ts";

/** Work on one thread, in milliseconds, from which starting workers (some 80 ms for the first) pays. */
const WORTH_WORKERS = 300;
/** Most workers started unasked. */
const MOST_WORKERS = 8;

/**
 * Does all units of a job and returns the parts, one for each thread that worked.
 *
 * Which thread did which unit makes no difference to the parts put together. Rejects with the signal's reason
 * when aborted; all workers are ended by then.
 */
export function runJob<J extends Job>(job: J, options: PermuteOptions): Promise<PartOf<J>[]> {
  const workload = workloadOf(job);
  const workers = workersFor(workload, options.workers);
  return workers > 1 ? runOnWorkers(job, { ...options, workers }) : runHere(job, workload, options);
}

function workersFor({ units, milliseconds }: Workload, asked?: number): number {
  if (asked !== undefined) return Math.min(units, checkWorkers(asked));
  if (milliseconds < WORTH_WORKERS) return 1;
  return Math.min(units, MOST_WORKERS, navigator.hardwareConcurrency || 1);
}

async function runHere<J extends Job>(
  job: J,
  { units }: Workload,
  options: PermuteOptions,
): Promise<PartOf<J>[]> {
  const pace = createPace(options);
  const counter = openCounter(job, compileKernel());
  for (let unit = 0; unit < units; unit++) {
    for (const _ of counter.run(unit)) await pace(unit / units);
  }
  return [counter.finish() as PartOf<J>];
}
