/**
 * From the used areas to all rows of a layer, and from numbers to what JSON can hold.
 *
 * @module
 */

/** Where the used areas stand. */
export interface Places {
  /** Rows of the used areas, ascending. */
  readonly used: Uint32Array;
  /** Rows of the layer. */
  readonly count: number;
}

/** Numbers of the used rows at their rows, NaN elsewhere. */
export function spreadNumbers(values: Float64Array, { used, count }: Places): Float64Array {
  const all = new Float64Array(count).fill(NaN);
  used.forEach((row, at) => all[row] = values[at]);
  return all;
}

/** What the used rows hold at their rows, `fill` elsewhere. */
export function spread<T>(
  values: ArrayLike<T>,
  { used, count, fill }: Places & { readonly fill: T },
): T[] {
  const all = new Array<T>(count).fill(fill);
  used.forEach((row, at) => all[row] = values[at]);
  return all;
}

/** A number as JSON holds it: null where it is undefined. */
export function figure(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
