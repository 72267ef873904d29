/**
 * Straight distance in the plane.
 *
 * @module
 */

/**
 * Distance of points p and q, in the units of `xy`. A square root of a sum of squares gives the same bits in
 * every JavaScript engine; `Math.hypot` does not.
 */
export function distanceBetween(xy: Float64Array, p: number, q: number): number {
  const dx = xy[2 * p] - xy[2 * q], dy = xy[2 * p + 1] - xy[2 * q + 1];
  return Math.sqrt(dx * dx + dy * dy);
}
