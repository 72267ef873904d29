/**
 * From any text to the integer that seeds every stream of random numbers.
 *
 * @module
 */
import seedrandom from "seedrandom";

/** A 64-bit integer as two unsigned 32-bit halves. */
export interface Seed {
  readonly low: number;
  readonly high: number;
}

/**
 * The 64-bit seed that stands for `text`: the first two 32-bit words that npm `seedrandom` gives for it.
 * Equal texts give equal seeds on every machine; any text will do, the empty one included.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.deepEqual(seedFromText("nearkin"), { low: 3323314642, high: 2982103277 });
 * ```
 */
export function seedFromText(text: string): Seed {
  const words = seedrandom(text);
  const low = words.int32() >>> 0;
  return { low, high: words.int32() >>> 0 };
}
