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

/** Where the link from one area to another stands in `indices`, or -1. Cost: a binary search in the row. */
export function linkAt({ offsets, indices }: Topology, from: number, to: number): number {
  let low = offsets[from], high = offsets[from + 1];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (indices[middle] < to) low = middle + 1;
    else high = middle;
  }
  return low < offsets[from + 1] && indices[low] === to ? low : -1;
}

/** Whether an area has the neighbor `to`. */
export function isLinked(topology: Topology, from: number, to: number): boolean {
  return linkAt(topology, from, to) >= 0;
}
