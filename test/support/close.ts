/**
 * Assertions on numbers that cannot be equal to the last bit.
 *
 * @module
 */
import assert from "node:assert/strict";

/** Fails unless `actual` is within `relative` of `expected` (absolutely, where `expected` is 0). */
export function assertClose(
  actual: number,
  expected: number,
  relative = 1e-9,
  what = "value",
): void {
  const allowed = relative * (Math.abs(expected) || 1);
  assert.ok(
    Math.abs(actual - expected) <= allowed,
    `${what} is ${actual}, not ${expected} (within ${relative})`,
  );
}
