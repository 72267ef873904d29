/**
 * Drawing areas without putting them back, permutation after permutation.
 *
 * @module
 */
import { drawBelow, type Stream } from "./stream.ts";

/** Permutations that share a stream; also what worker counts and slices may not cut through. */
export const BLOCK = 1024;

/** Deals distinct area numbers, like cards, from a deck that is whole again for each permutation. */
export interface Dealer {
  /** The area numbers of the permutation last dealt, in the order drawn. */
  readonly drawn: Uint32Array;
  /** Goes on with another stream. */
  open(stream: Stream): void;
  /** Draws for the next permutation of the stream. */
  deal(): void;
}

/**
 * A dealer of `count` distinct numbers below `n`, each sequence equally likely.
 *
 * A number that was already drawn is passed over. Cost: a little over `count` draws, more as `count` nears `n`.
 */
export function createDealer(n: number, count: number): Dealer {
  const drawn = new Uint32Array(count);
  const seenIn = new Uint32Array(n);
  let permutation = 0;
  let stream: Stream = new Uint32Array(11);

  return {
    drawn,
    open(next) {
      stream = next;
    },
    deal() {
      permutation++;
      for (let m = 0; m < count;) {
        const area = drawBelow(stream, n);
        if (seenIn[area] === permutation) continue;
        seenIn[area] = permutation;
        drawn[m++] = area;
      }
    },
  };
}
