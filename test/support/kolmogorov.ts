/**
 * Distance from uniform.
 *
 * @module
 */

/** Largest distance between the shares of `numbers` below a point and the point itself, in [0, 1]. */
export function kolmogorovSmirnov(numbers: readonly number[]): number {
  const sorted = [...numbers].sort((a, b) => a - b);
  return sorted.reduce(
    (largest, value, i) =>
      Math.max(
        largest,
        Math.abs(value - i / sorted.length),
        Math.abs(value - (i + 1) / sorted.length),
      ),
    0,
  );
}
