/**
 * Sharing the units of a job among workers.
 *
 * @module
 */
import { type Job, type PartOf, workloadOf } from "./counters.ts";
import { compileKernel } from "./load_kernel.ts";
import type { PermuteOptions } from "./options.ts";

/** What a worker is told: first a job, then units of it one by one, at last to hand back its part. */
export type Order =
  | { readonly job: Job; readonly kernel: WebAssembly.Module | null }
  | { readonly unit: number }
  | { readonly finish: true };

/** What a worker answers. */
export type Answer =
  | { readonly done: number }
  | { readonly part: PartOf<Job> }
  | { readonly fault: string };

/** Units that wait at a worker, so that it need not wait for the next. */
const QUEUE = 2;
/** How often progress is told, in milliseconds; what is asked for is 100. */
const REPORT = 80;

/**
 * Does all units of a job on `workers` new workers, each taking the next unit when it has done one, and returns
 * their parts. The workers are ended whatever happens.
 */
export async function runOnWorkers<J extends Job>(
  job: J,
  options: PermuteOptions & { readonly workers: number },
): Promise<PartOf<J>[]> {
  const { signal, onProgress, startWorker = startWebWorker } = options;
  signal?.throwIfAborted();
  const { units } = workloadOf(job);
  const kernel = compileKernel(); // once, so that all workers run the same optimized code
  const started: Worker[] = [];
  const aborted = Promise.withResolvers<never>();
  const abort = () => aborted.reject(signal?.reason);
  signal?.addEventListener("abort", abort);
  let next = 0, done = 0;
  const takeUnit = () => next < units ? next++ : null;
  const report = setInterval(() => onProgress?.(done / units), REPORT);
  try {
    const parts = Array.from({ length: options.workers }, () => {
      const worker = startWorker();
      started.push(worker);
      return serve(worker, { job, kernel }, { takeUnit, onDone: () => done++ });
    });
    return await Promise.race([Promise.all(parts), aborted.promise]) as PartOf<J>[];
  } finally {
    clearInterval(report);
    signal?.removeEventListener("abort", abort);
    for (const worker of started) worker.terminate();
  }
}

/** Keeps one worker busy until no unit is left, and resolves to its part. */
function serve(
  worker: Worker,
  work: Extract<Order, { job: Job }>,
  { takeUnit, onDone }: { takeUnit: () => number | null; onDone: () => void },
): Promise<PartOf<Job>> {
  const { promise, resolve, reject } = Promise.withResolvers<PartOf<Job>>();
  const order = (message: Order) => worker.postMessage(message);
  let waiting = 0;
  const orderNext = () => {
    const unit = takeUnit();
    if (unit !== null) {
      waiting++;
      order({ unit });
    } else if (waiting === 0) order({ finish: true });
  };
  worker.onerror = (event) => {
    event.preventDefault();
    reject(new Error(`A worker failed: ${event.message}`));
  };
  worker.onmessage = ({ data }: MessageEvent<Answer>) => {
    if ("fault" in data) return reject(new Error(`A worker failed: ${data.fault}`));
    if ("part" in data) return resolve(data.part);
    waiting--;
    onDone();
    orderNext();
  };
  order(work);
  for (let i = 0; i < QUEUE; i++) orderNext();
  return promise;
}

function startWebWorker(): Worker {
  return new Worker(new URL("./count_worker.ts", import.meta.url), { type: "module" });
}
