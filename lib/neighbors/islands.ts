/**
 * The option `islands=nearest`: nobody stays alone.
 *
 * @module
 */
import { union } from "./combine.ts";
import type { Topology } from "./topology.ts";
import { topologyFromPairs } from "./topology_from_pairs.ts";

/**
 * Links each area that has no neighbor with its nearest area, in both directions. Weights that came with
 * the links are dropped once a link is added, since that one has none. An area without a point stays alone.
 *
 * @param nearest Makes the topology of the one nearest area of each; called only when somebody is alone.
 */
export function linkIslands(topology: Topology, nearest: () => Topology): Topology {
  const islands = aloneIn(topology);
  if (islands.length === 0) return topology;
  const { offsets, indices } = nearest();
  const linked = islands.filter((i) => offsets[i] < offsets[i + 1]);
  const partners = linked.map((i) => indices[offsets[i]]);
  const n = topology.offsets.length - 1;
  return union(topology, topologyFromPairs(n, linked, partners));
}

/** Areas without a neighbor of their own, ascending. */
function aloneIn({ offsets }: Topology): Uint32Array {
  const alone: number[] = [];
  for (let i = 0; i + 1 < offsets.length; i++) if (offsets[i] === offsets[i + 1]) alone.push(i);
  return Uint32Array.from(alone);
}
