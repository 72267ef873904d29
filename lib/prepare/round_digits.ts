/**
 * Numbers that come out the same in every JavaScript engine.
 *
 * @module
 */

/** Digits that all engines agree on, although their `log` and `pow` differ in the last bits. */
const DIGITS = 13;

/** Values rounded to 13 significant digits, as all values made by a transform are before they are tested. */
export function roundDigits(values: Float64Array): Float64Array {
  return values.map((value) => Number(value.toPrecision(DIGITS)));
}
