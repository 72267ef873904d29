/**
 * Global statistics of shuffled maps in single precision, in plain TypeScript: what the kernel does eight
 * permutations abreast, one at a time.
 *
 * @module
 */
import type { Counter } from "./job.ts";
import { putInPlace } from "./near_places.ts";
import type { PairLinks } from "./pair_links.ts";
import { shuffleInto } from "./shuffle.ts";
import {
  ROWS_PER_BLOCK,
  settleDoubts,
  type ShuffleJob,
  type ShufflePart,
  shufflesOf,
} from "./shuffle_job.ts";
import { openStream } from "./stream.ts";

/** Counts a {@link ShuffleJob} with 32-bit numbers; the same sums as the kernel's to the last bit. */
export function openShuffleSingles(job: ShuffleJob): Counter<ShufflePart> {
  const values = Float32Array.from(job.z), shuffled = new Float32Array(values.length);
  const weights = job.definitions.map((pairs) => Float32Array.from(pairs.values));
  const part: ShufflePart[number][] = [];
  return {
    *run(unit) {
      const [from, to] = shufflesOf(job, unit);
      const sums = job.definitions.map(() => new Float64Array(to - from));
      for (let p = from; p < to; p++) {
        shuffleInto(shuffled, values, openStream(job.seed, "permutation", p));
        for (const [d, pairs] of job.definitions.entries()) {
          sums[d][p - from] = formInSingles(pairs, weights[d], putInPlace(shuffled, pairs.places));
          yield;
        }
      }
      part.push({ unit, sums: yield* settleDoubts(job, unit, sums) });
    },
    finish: () => part,
  };
}

/** Every addition and product is rounded to single precision, but for the sum over blocks of rows. */
function formInSingles(pairs: PairLinks, weights: Float32Array, z: Float32Array): number {
  const { offsets, indices } = pairs;
  const n = offsets.length - 1;
  let total = 0;
  for (let i = 0; i < n;) {
    const until = Math.min(i + ROWS_PER_BLOCK, n);
    let block = 0;
    for (; i < until; i++) {
      let row = 0;
      for (let e = offsets[i]; e < offsets[i + 1]; e++) {
        row = Math.fround(row + Math.fround(weights[e] * z[indices[e]]));
      }
      block = Math.fround(block + Math.fround(row * z[i]));
    }
    total += block;
  }
  return total;
}
