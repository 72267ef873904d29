/**
 * Which corner of the Moran scatterplot an area falls in.
 *
 * @module
 */
import { TIE } from "./standardize.ts";

/** Own value, then neighbors' value: high or low against the mean. */
export type Quadrant = "HH" | "LL" | "HL" | "LH";

/**
 * Quadrant of an area by sign alone, whatever its p.
 *
 * `z` is the area's standard score and `lag` the row-standardized lag of standard scores (any positive
 * multiple of it will do). Null where either is 0 (within the tie tolerance) or undefined: such an area
 * is in no quadrant.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.equal(quadrantOf(1.5, -0.2), "HL");
 * assert.equal(quadrantOf(0, 2), null);
 * ```
 */
export function quadrantOf(z: number, lag: number): Quadrant | null {
  if (!(Math.abs(z) > TIE && Math.abs(lag) > TIE)) return null;
  if (z > 0) return lag > 0 ? "HH" : "HL";
  return lag > 0 ? "LH" : "LL";
}
