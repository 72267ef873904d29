/**
 * Topologies from topologies: the operators `+`, `&`, `-` and the options `mutual` and `either`.
 *
 * Weights that came with the links are kept while every link of the result has one: an intersection
 * or difference keeps those of its left side, a link that `either` adds gets the weight of its
 * reverse, a union keeps none.
 *
 * @module
 */
import type { Topology } from "./topology.ts";

/** Links of `left`, of `right`, or of both. Cost: one pass over the links, none where one side has no links. */
export function union(left: Topology, right: Topology): Topology {
  if (right.indices.length === 0) return { offsets: left.offsets, indices: left.indices };
  if (left.indices.length === 0) return { offsets: right.offsets, indices: right.indices };
  const most = left.indices.length + right.indices.length;
  const { offsets, indices } = mergeRows(left, right, most, {
    left: true,
    both: true,
    right: true,
  });
  return { offsets, indices };
}

/** Links of `left` that are also links of `right`. Cost: one pass over the links. */
export function intersection(left: Topology, right: Topology): Topology {
  const most = Math.min(left.indices.length, right.indices.length);
  return mergeRows(left, right, most, { left: false, both: true, right: false });
}

/** Links of `left` that are not links of `right`. Cost: one pass over the links. */
export function difference(left: Topology, right: Topology): Topology {
  return mergeRows(left, right, left.indices.length, { left: true, both: false, right: false });
}

/** Only the links whose reverse is there too. Cost: two passes over the links. */
export function mutual(topology: Topology): Topology {
  return intersection(topology, reverse(topology));
}

/** Every link both ways. Cost: two passes over the links. */
export function either(topology: Topology): Topology {
  const reversed = reverse(topology);
  const most = 2 * topology.indices.length;
  return mergeRows(topology, reversed, most, { left: true, both: true, right: true });
}

/** Every link the other way round; rows come out ascending. Cost: two passes over the links. */
export function reverse({ offsets, indices, given }: Topology): Topology {
  const n = offsets.length - 1;
  const starts = new Uint32Array(n + 1);
  for (const to of indices) starts[to + 1]++;
  for (let i = 0; i < n; i++) starts[i + 1] += starts[i];
  const next = starts.slice(0, n);
  const reversed = new Uint32Array(indices.length);
  const weights = given && new Float64Array(indices.length);
  for (let from = 0; from < n; from++) {
    for (let link = offsets[from]; link < offsets[from + 1]; link++) {
      const at = next[indices[link]]++;
      reversed[at] = from;
      if (given && weights) weights[at] = given[link];
    }
  }
  return { offsets: starts, indices: reversed, ...(weights && { given: weights }) };
}

/** Whether a link that is in `left` only, in both, or in `right` only is kept. */
interface Kept {
  readonly left: boolean;
  readonly both: boolean;
  readonly right: boolean;
}

/** Merges two sorted rows at a time; a link in both sides has the weight of `left`. */
function mergeRows(left: Topology, right: Topology, most: number, keep: Kept): Topology {
  const n = left.offsets.length - 1;
  const offsets = new Uint32Array(n + 1);
  const indices = new Uint32Array(most);
  const weighted = left.given && (right.given || !keep.right);
  const weights = weighted ? new Float64Array(most) : undefined;
  let size = 0;
  for (let i = 0; i < n; i++) {
    let a = left.offsets[i], b = right.offsets[i];
    const endA = left.offsets[i + 1], endB = right.offsets[i + 1];
    while (a < endA || b < endB) {
      const inLeft = a < endA && (b === endB || left.indices[a] <= right.indices[b]);
      const inRight = b < endB && (a === endA || right.indices[b] <= left.indices[a]);
      if (inLeft ? (inRight ? keep.both : keep.left) : keep.right) {
        indices[size] = inLeft ? left.indices[a] : right.indices[b];
        if (weights) weights[size] = inLeft ? left.given![a] : right.given![b];
        size++;
      }
      if (inLeft) a++;
      if (inRight) b++;
    }
    offsets[i + 1] = size;
  }
  const given = weights && { given: weights.slice(0, size) };
  return { offsets, indices: indices.slice(0, size), ...given };
}
