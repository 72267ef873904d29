/**
 * Who is whose neighbor, and nothing else: directed links in compressed rows.
 *
 * @module
 */

/**
 * Links between `n` areas. Area i's neighbors are `indices[offsets[i]]` … `indices[offsets[i + 1] - 1]`,
 * ascending, never i itself, no repeats. A symmetric rule stores both directions.
 */
export interface Topology {
  /** Length n + 1. */
  readonly offsets: Uint32Array;
  /** Length = number of directed links. */
  readonly indices: Uint32Array;
  /** Weights that came with the links (`links:FILE` with a weight column), parallel to `indices`. */
  readonly given?: Float64Array;
}

/** Whether area `from` has the neighbor `to`. Cost: a binary search in its row. */
export function isLinked({ offsets, indices }: Topology, from: number, to: number): boolean {
  let low = offsets[from], high = offsets[from + 1];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (indices[middle] < to) low = middle + 1;
    else high = middle;
  }
  return low < offsets[from + 1] && indices[low] === to;
}
