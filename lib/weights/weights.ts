/**
 * How much each neighbor counts: a topology with a number on every link.
 *
 * @module
 */

/** Spatial weights of `n` areas in compressed rows; layout as in `Topology`, values finite and not 0. */
export interface Weights {
  /** Length n + 1. */
  readonly offsets: Uint32Array;
  /** Neighbor positions, ascending within a row, never the row itself. */
  readonly indices: Uint32Array;
  /** Weight of each link, parallel to `indices`. */
  readonly values: Float64Array;
  /** Whether every row's weights are equal among themselves (then local inference is a rank). */
  readonly equalInRows: boolean;
}
