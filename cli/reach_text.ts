/**
 * Distances that should reach.
 *
 * @module
 */

/** A distance rounded up in the fourth digit, so that the printed length still reaches. */
export function reachText(length: number, unit: string): string {
  if (length === 0) return `0 ${unit}`;
  const step = 10 ** (Math.floor(Math.log10(length)) - 3);
  return `${Number((Math.ceil(length / step) * step).toPrecision(4))} ${unit}`;
}
