/**
 * Ranks in ascending numbers.
 *
 * @module
 */

/** How many of the ascending numbers are below `value`. Cost: log of their number. */
export function lowerBound(ascending: Float64Array, value: number): number {
  let low = 0, high = ascending.length;
  while (low < high) {
    const middle = low + high >>> 1;
    if (ascending[middle] < value) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** How many of the ascending numbers are at most `value`. Cost: log of their number. */
export function upperBound(ascending: Float64Array, value: number): number {
  let low = 0, high = ascending.length;
  while (low < high) {
    const middle = low + high >>> 1;
    if (ascending[middle] <= value) low = middle + 1;
    else high = middle;
  }
  return low;
}
