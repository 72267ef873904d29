/**
 * How large the largest of many Gi may be by chance.
 *
 * @module
 */
import { normalCritical } from "./normal_tail.ts";

/**
 * The value that the largest of `areas` independent standardized Gi exceeds with the chance `level`:
 * Φ⁻¹((1 - level)^(1/areas)), the reasoning of the percentile table of Ord & Getis 1995. One-sided; for
 * low values take it negative. Neighboring Gi are not independent, which makes it a cautious limit.
 * Cost: constant.
 *
 * @throws RangeError for fewer than 1 area and a level that is not between 0 and 1.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.ok(Math.abs(giCritical(1, 0.05) - 1.6448536269514722) < 1e-12);
 * assert.ok(giCritical(100, 0.05) > 3.28);
 * ```
 */
export function giCritical(areas: number, level: number): number {
  if (!(areas >= 1 && level > 0 && level < 1)) {
    throw new RangeError(`Cannot find the limit of the largest of ${areas} at the level ${level}`);
  }
  return normalCritical(-Math.expm1(Math.log1p(-level) / areas));
}
