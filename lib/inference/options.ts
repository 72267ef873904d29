/**
 * What every permutation test can be told.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";

/** Options of every permutation test. */
export interface PermuteOptions {
  /** Permutations to draw, 99 to 9,999,999. */
  readonly permutations?: number;
  /**
   * Any text; equal texts give equal results.
   * @default "nearkin"
   */
  readonly seed?: string;
  /**
   * Workers to share the work among; 1 keeps it in this thread. The result is the same for any number.
   * @default as many as there are processors where that saves time, else 1
   */
  readonly workers?: number;
  /** Cancels the run: it rejects with the signal's reason within about 100 ms. */
  readonly signal?: AbortSignal;
  /** Told the share of the work done, 0 to 1, at least about every 100 ms; it never falls. */
  readonly onProgress?: (share: number) => void;
  /**
   * Starts a worker that runs `lib/inference/count_worker.ts`.
   * @default a web worker on that file
   */
  readonly startWorker?: () => Worker;
}

/** Fewest permutations that make a p-value. */
export const FEWEST_PERMUTATIONS = 99;
/** Most permutations, also the number of the second draw of areas at the floor. */
export const MOST_PERMUTATIONS = 9_999_999;

/**
 * Makes sure that a number of permutations can be drawn, and returns it.
 *
 * @throws UsageError for a number that is not whole, below 99 or above 9,999,999.
 */
export function checkPermutations(permutations: number): number {
  if (
    Number.isInteger(permutations) && permutations >= FEWEST_PERMUTATIONS &&
    permutations <= MOST_PERMUTATIONS
  ) return permutations;
  throw new UsageError(
    `Cannot draw ${permutations} permutations; give a whole number from ${FEWEST_PERMUTATIONS} to ` +
      `${MOST_PERMUTATIONS}`,
  );
}

/**
 * Makes sure that a number of workers can be started, and returns it.
 *
 * @throws UsageError for a number that is not whole or below 1.
 */
export function checkWorkers(workers: number): number {
  if (Number.isInteger(workers) && workers >= 1) return workers;
  throw new UsageError(`Cannot start ${workers} workers; give a whole number of at least 1`);
}
