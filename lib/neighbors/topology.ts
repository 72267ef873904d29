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
