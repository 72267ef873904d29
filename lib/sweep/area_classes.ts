/**
 * What one definition says about each area, as small numbers that can be compared quickly.
 *
 * @module
 */
import type { Quadrant } from "../statistics/quadrant.ts";

/** Classes an area of the test can have; a class number is a position in this list. */
export const TESTED_CLASSES = [
  "high among high",
  "low among low",
  "high among low",
  "low among high",
  "no evidence",
  "alone",
] as const;

/** Class numbers of {@link TESTED_CLASSES}. */
export const CLASS = {
  highHigh: 0,
  lowLow: 1,
  highLow: 2,
  lowHigh: 3,
  noEvidence: 4,
  alone: 5,
} as const;

const CLASS_OF: Readonly<Record<Quadrant, number>> = {
  HH: CLASS.highHigh,
  LL: CLASS.lowLow,
  HL: CLASS.highLow,
  LH: CLASS.lowHigh,
};

/**
 * Class number of each area: `alone` without neighbors, its quadrant where significant, else `no evidence`.
 *
 * @param offsets Row starts of the weights, length n + 1; an empty row is an area alone.
 * @param found For each area whether its adjusted p is at most the level, and its quadrant.
 */
export function areaClasses(
  offsets: Uint32Array,
  found: { readonly sig: ArrayLike<number>; readonly quad: readonly (Quadrant | null)[] },
): Uint8Array {
  return Uint8Array.from(found.quad, (quad, i) => {
    if (offsets[i] === offsets[i + 1]) return CLASS.alone;
    return found.sig[i] && quad ? CLASS_OF[quad] : CLASS.noEvidence;
  });
}

/** Whether a class is a finding about the area. */
export function isFlagged(classNumber: number): boolean {
  return classNumber < CLASS.noEvidence;
}
