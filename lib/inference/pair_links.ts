/**
 * The quadratic form behind every global statistic of products, each pair of areas once.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { putInPlace } from "./near_places.ts";

/** Pairs i < j with w_ij + w_ji, in compressed rows by i; half the memory traffic of the weights. */
export interface PairLinks {
  /** Length n + 1. */
  readonly offsets: Uint32Array;
  /** The larger area of each pair, ascending within a row. */
  readonly indices: Uint32Array;
  /** w_ij + w_ji, parallel to `indices`. */
  readonly values: Float64Array;
  /** The number that each area has in the rows, length n; null where it is its own. */
  readonly places: Uint32Array | null;
}

type Rows = Omit<PairLinks, "places">;

/**
 * Folds both directions of every link into one pair. Links in one direction only keep their weight. With `places` the
 * areas are numbered anew. Cost: a few passes over the links.
 */
export function pairLinks(weights: Weights, places: Uint32Array | null = null): PairLinks {
  const n = weights.offsets.length - 1;
  // Numbers made anew come in no order within a row; transposing twice sorts them.
  const back = transposed(places === null ? weights : renumbered(weights, places));
  const forth: Rows = places === null ? weights : transposed(back);
  const offsets = new Uint32Array(n + 1);
  const links = forth.indices.length;
  const indices = new Uint32Array(links), values = new Float64Array(links);
  let size = 0;
  for (let i = 0; i < n; i++) {
    let a = firstAbove(forth, i), b = firstAbove(back, i);
    const endA = forth.offsets[i + 1], endB = back.offsets[i + 1];
    while (a < endA || b < endB) {
      const fromA = a < endA ? forth.indices[a] : n, fromB = b < endB ? back.indices[b] : n;
      const j = Math.min(fromA, fromB);
      let sum = 0;
      if (fromA === j) sum += forth.values[a++];
      if (fromB === j) sum += back.values[b++];
      indices[size] = j;
      values[size++] = sum;
    }
    offsets[i + 1] = size;
  }
  return { offsets, indices: indices.slice(0, size), values: values.slice(0, size), places };
}

/** Σ over pairs of (w_ij + w_ji) z_i z_j, that is Σ_ij w_ij z_i z_j. Cost: one pass over the pairs. */
export function quadraticForm(pairs: PairLinks, scores: Float64Array): number {
  const { offsets, indices, values } = pairs;
  const z = putInPlace(scores, pairs.places);
  let total = 0;
  for (let i = 0; i + 1 < offsets.length; i++) {
    let row = 0;
    for (let e = offsets[i], end = offsets[i + 1]; e < end; e++) row += values[e] * z[indices[e]];
    total += row * z[i];
  }
  return total;
}

/** Position of the first neighbor of `i` with a number above `i`. */
function firstAbove({ offsets, indices }: Rows, i: number): number {
  let e = offsets[i];
  while (e < offsets[i + 1] && indices[e] < i) e++;
  return e;
}

/** The same links with area i called `places[i]`. */
function renumbered({ offsets, indices, values }: Weights, places: Uint32Array): Rows {
  const n = places.length;
  const areas = new Uint32Array(n);
  for (let i = 0; i < n; i++) areas[places[i]] = i;
  const starts = new Uint32Array(n + 1);
  const others = new Uint32Array(indices.length), weights = new Float64Array(indices.length);
  let size = 0;
  for (let place = 0; place < n; place++) {
    for (let e = offsets[areas[place]]; e < offsets[areas[place] + 1]; e++) {
      others[size] = places[indices[e]];
      weights[size++] = values[e];
    }
    starts[place + 1] = size;
  }
  return { offsets: starts, indices: others, values: weights };
}

function transposed({ offsets, indices, values }: Rows): Rows {
  const n = offsets.length - 1;
  const starts = new Uint32Array(n + 1);
  for (let e = 0; e < indices.length; e++) starts[indices[e] + 1]++;
  for (let i = 0; i < n; i++) starts[i + 1] += starts[i];
  const next = starts.slice(0, n);
  const rows = new Uint32Array(indices.length), weights = new Float64Array(indices.length);
  for (let i = 0; i < n; i++) {
    for (let e = offsets[i]; e < offsets[i + 1]; e++) {
      const place = next[indices[e]]++;
      rows[place] = i;
      weights[place] = values[e];
    }
  }
  return { offsets: starts, indices: rows, values: weights };
}
