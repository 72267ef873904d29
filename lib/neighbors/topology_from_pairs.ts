/**
 * Compressed rows from lists of links in any order.
 *
 * @module
 */
import type { Topology } from "./topology.ts";
import { reverse } from "./combine.ts";

/**
 * A topology from directed links in any order. A repeated link is kept once, a link of an area with itself
 * not at all. Cost: three passes over the links.
 *
 * @param count Number of areas.
 * @param from Where each link starts.
 * @param to Where it ends, parallel to `from`.
 */
export function topologyFromLinks(count: number, from: Uint32Array, to: Uint32Array): Topology {
  const starts = new Uint32Array(count + 1);
  for (const i of from) starts[i + 1]++;
  for (let i = 0; i < count; i++) starts[i + 1] += starts[i];
  const next = starts.slice(0, count);
  const rows = new Uint32Array(to.length);
  for (let link = 0; link < to.length; link++) rows[next[from[link]]++] = to[link];
  return withoutRepeats(reverse(reverse({ offsets: starts, indices: rows })));
}

/** The same with every link in both directions. */
export function topologyFromPairs(count: number, one: Uint32Array, other: Uint32Array): Topology {
  const from = new Uint32Array(2 * one.length), to = new Uint32Array(2 * one.length);
  from.set(one);
  from.set(other, one.length);
  to.set(other);
  to.set(one, one.length);
  return topologyFromLinks(count, from, to);
}

/** Drops repeats and self-links from ascending rows. */
function withoutRepeats({ offsets, indices }: Topology): Topology {
  const n = offsets.length - 1;
  const starts = new Uint32Array(n + 1);
  const kept = new Uint32Array(indices.length);
  let size = 0;
  for (let i = 0; i < n; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      const repeated = link > offsets[i] && indices[link] === indices[link - 1];
      if (!repeated && indices[link] !== i) kept[size++] = indices[link];
    }
    starts[i + 1] = size;
  }
  return { offsets: starts, indices: kept.slice(0, size) };
}
