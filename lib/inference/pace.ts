/**
 * Keeping a long computation in this thread cancellable and on speaking terms with its caller.
 *
 * @module
 */
import type { PermuteOptions } from "./options.ts";

/** Called between pieces of work with the share done so far. */
export type Pace = (share: number) => Promise<void> | void;

/** Longest stretch without a pause, in milliseconds; what is asked for is 100. */
const STRETCH = 40;

/**
 * Options for one of several pieces of work in turn: its progress from 0 to 1 is told as a share between `from` and
 * `to` of the whole, so that what the caller is told never falls.
 */
export function stageOf<O extends PermuteOptions>(options: O, from: number, to: number): O {
  const { onProgress } = options;
  if (onProgress === undefined) return options;
  return { ...options, onProgress: (share) => onProgress(from + share * (to - from)) };
}

/**
 * A pace that, whenever {@link STRETCH} has passed, reports progress and lets the event loop turn, so that
 * timers run and an abort can arrive.
 *
 * The returned function throws the signal's reason once it is aborted; it returns nothing to wait for as
 * long as no pause is due, which keeps short pieces of work cheap.
 */
export function createPace({ signal, onProgress }: PermuteOptions): Pace {
  let last = performance.now();
  signal?.throwIfAborted();
  return (share) => {
    if (performance.now() - last < STRETCH) return;
    return pause(share);
  };

  async function pause(share: number): Promise<void> {
    onProgress?.(share);
    await new Promise((resolve) => setTimeout(resolve, 0));
    signal?.throwIfAborted();
    last = performance.now();
  }
}
