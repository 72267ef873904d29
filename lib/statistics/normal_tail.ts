/**
 * Tails of the standard normal distribution.
 *
 * @module
 */

/**
 * Chance that a standard normal number is above `z`: 1 for -Infinity, 1/2 for 0, down to 0.
 *
 * Below 2.5 the series of Marsaglia 2004 (Journal of Statistical Software 11(4)), beyond it the continued
 * fraction of Laplace, so that small tails keep about 14 digits. NaN for NaN. Cost: below 100
 * multiplications.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.ok(Math.abs(normalUpperTail(1.959963984540054) - 0.025) < 1e-15);
 * ```
 */
export function normalUpperTail(z: number): number {
  if (z < 0) return 1 - normalUpperTail(-z);
  if (z === Infinity) return 0;
  return z < 2.5 ? 0.5 - density(z) * seriesFromCenter(z) : density(z) / fractionBeyond(z);
}

/**
 * The number that a standard normal number exceeds with the chance `tail`, 0 < tail < 1; within 1e-12
 * for tails down to 1e-300. Cost: a few evaluations of the tail.
 *
 * @throws RangeError for a chance that is not between 0 and 1.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.ok(Math.abs(normalCritical(0.025) - 1.959963984540054) < 1e-12);
 * ```
 */
export function normalCritical(tail: number): number {
  if (!(tail > 0 && tail < 1)) {
    throw new RangeError(`Cannot find the normal number exceeded with chance ${tail}`);
  }
  if (tail > 0.5) return -normalCritical(1 - tail);
  let low = 0, high = 40;
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (normalUpperTail(middle) > tail) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

function density(z: number): number {
  return Math.exp(-z * z / 2) / Math.sqrt(2 * Math.PI);
}

/** z + z³/3 + z⁵/(3·5) + …, the area from 0 to z over the density at z. */
function seriesFromCenter(z: number): number {
  let term = z, sum = z;
  for (let odd = 3; term > 1e-17 * sum; odd += 2) {
    term *= z * z / odd;
    sum += term;
  }
  return sum;
}

/** z + 1/(z + 2/(z + 3/(z + …))), the density at z over the area beyond. */
function fractionBeyond(z: number): number {
  let fraction = z;
  for (let level = 90; level >= 1; level--) fraction = z + level / fraction;
  return fraction;
}
