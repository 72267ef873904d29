/**
 * From the used areas to all rows of a layer, and from numbers to what JSON can hold.
 *
 * @module
 */

/** Numbers of the used rows at their rows, NaN elsewhere. */
export function spreadNumbers(
  values: Float64Array,
  used: Uint32Array,
  count: number,
): Float64Array {
  const all = new Float64Array(count).fill(NaN);
  used.forEach((row, at) => all[row] = values[at]);
  return all;
}

/** What the used rows hold at their rows, `fill` elsewhere. */
export function spread<T>(
  values: ArrayLike<T>,
  { used, count, fill }: { readonly used: Uint32Array; readonly count: number; readonly fill: T },
): T[] {
  const all = new Array<T>(count).fill(fill);
  used.forEach((row, at) => all[row] = values[at]);
  return all;
}

/** A number as JSON holds it: null where it is undefined. */
export function figure(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
