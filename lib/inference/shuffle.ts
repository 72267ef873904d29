/**
 * One random order of the values (Fisher & Yates, in the form of Durstenfeld 1964).
 *
 * @module
 */
import { drawBelow, type Stream } from "./stream.ts";

/** Any array of numbers that can be shuffled in place. */
export type Shuffled = Float64Array | Float32Array | Uint32Array;

/**
 * Fills `target` with `source` in a random order; all n! orders are equally likely. Both have the same
 * length. Cost: one pass.
 */
export function shuffleInto(target: Shuffled, source: Shuffled, stream: Stream): void {
  target.set(source);
  for (let left = target.length; left > 1; left--) {
    const chosen = drawBelow(stream, left);
    const kept = target[left - 1];
    target[left - 1] = target[chosen];
    target[chosen] = kept;
  }
}
