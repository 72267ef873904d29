/**
 * The hypergeometric distribution: drawing without putting back.
 *
 * @module
 */

/** A population of which some are marked, and how many are drawn from it. */
export interface Draw {
  /** All that can be drawn. */
  readonly population: number;
  /** Those among them that are marked. */
  readonly marked: number;
  /** How many are drawn, without putting back. */
  readonly drawn: number;
}

/**
 * Chance that at least `least` of those drawn are marked, between 0 and 1.
 *
 * Works with ratios of neighboring probabilities from the most likely count outward, in plain
 * arithmetic: nothing overflows, small tails keep their digits, and every engine gives the same bits.
 * Cost: at most one step for each count that is possible.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * // Two of four, one of them marked: drawn in half of the cases.
 * assert.equal(hypergeometricUpperTail(1, { population: 4, marked: 1, drawn: 2 }), 0.5);
 * ```
 */
export function hypergeometricUpperTail(
  least: number,
  { population, marked, drawn }: Draw,
): number {
  const fewest = Math.max(0, drawn + marked - population), most = Math.min(drawn, marked);
  if (least <= fewest) return 1;
  if (least > most) return 0;
  const mode = Math.floor((drawn + 1) * (marked + 1) / (population + 2));
  /** P(count + 1) / P(count). */
  const rise = (count: number) =>
    (marked - count) * (drawn - count) /
    ((count + 1) * (population - marked - drawn + count + 1));
  let inside = 0, outside = 0;
  const add = (count: number, size: number) => {
    if (count >= least) inside += size;
    else outside += size;
  };
  add(mode, 1);
  for (let count = mode, size = 1; count < most && size > 0; count++) {
    size *= rise(count);
    add(count + 1, size);
  }
  for (let count = mode, size = 1; count > fewest && size > 0; count--) {
    size /= rise(count - 1);
    add(count - 1, size);
  }
  return inside / (inside + outside);
}
