/**
 * Rounding that makes ties ties in every JavaScript engine.
 *
 * @module
 */

/**
 * Rounds every number to `digits` after the decimal point (before it where negative). Sines and
 * logarithms differ in their last bits between engines; what is compared must not.
 */
export function roundAll(values: Float64Array, digits: number): Float64Array {
  const scale = Number(`1e${digits}`);
  return values.map((value) => Math.round(value * scale) / scale);
}
