/**
 * Pieces of a map that hang together.
 *
 * @module
 */
import { joinSets, rootOf, singleSets } from "./disjoint_sets.ts";
import type { Topology } from "./topology.ts";

/** Connected pieces of a topology. */
export interface Components {
  /** Number of pieces, areas without a neighbor included. */
  readonly count: number;
  /** Piece of each area, numbered in order of their first area. */
  readonly of: Uint32Array;
}

/**
 * Finds the pieces that hang together, whatever the direction of the links (weakly connected).
 * Cost: one pass over the links.
 */
export function findComponents({ offsets, indices }: Topology): Components {
  const n = offsets.length - 1;
  const parents = singleSets(n);
  for (let i = 0; i < n; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) joinSets(parents, i, indices[link]);
  }
  const of = new Uint32Array(n);
  let count = 0;
  for (let i = 0; i < n; i++) {
    const root = rootOf(parents, i);
    of[i] = root === i ? count++ : of[root];
  }
  return { count, of };
}
