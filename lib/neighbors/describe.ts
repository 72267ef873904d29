/**
 * What a topology looks like, in numbers.
 *
 * @module
 */
import { mutual } from "./combine.ts";
import { findComponents } from "./components.ts";
import { linkDistances } from "./distances.ts";
import type { Topology } from "./topology.ts";

/** Neighbor diagnostics, as they stand in `results.json`. */
export interface NeighborSummary {
  /** The neighbor rule in nearkin's grammar. */
  rule: string;
  /** Unordered pairs of linked areas. */
  pairs: number;
  /** Directed links. */
  links: number;
  /** Areas without a neighbor. */
  islands: number;
  /** Connected pieces, islands included; direction does not matter. */
  components: number;
  /** Links per area; null where there is no area. */
  meanNeighbors: number | null;
  minNeighbors: number;
  maxNeighbors: number;
  /** Links whose reverse is missing. */
  oneWayLinks: number;
  /** In meters (or map units with a planar metric); null without distances. */
  longestLink: number | null;
  /** Directed links as a share of all there could be; null with fewer than two areas. */
  density: number | null;
  /** How many areas have how many neighbors, ascending. */
  neighborCounts: { neighbors: number; areas: number }[];
}

/** What is known besides the links. */
export interface DescribeOptions {
  /** The rule as text. @default "" */
  readonly rule?: string;
  /** Distance between two areas by position, for the longest link. @default null */
  readonly distance?: ((i: number, j: number) => number) | null;
}

/** Describes a topology. Cost: a few passes over the links. */
export function describeTopology(
  topology: Topology,
  { rule = "", distance = null }: DescribeOptions = {},
): NeighborSummary {
  const areas = topology.offsets.length - 1;
  const links = topology.indices.length;
  const bothWays = mutual(topology).indices.length;
  const neighborCounts = countNeighbors(topology);
  return {
    rule,
    pairs: links - bothWays / 2,
    links,
    islands: neighborCounts[0]?.neighbors === 0 ? neighborCounts[0].areas : 0,
    components: findComponents(topology).count,
    meanNeighbors: areas > 0 ? links / areas : null,
    minNeighbors: neighborCounts[0]?.neighbors ?? 0,
    maxNeighbors: neighborCounts.at(-1)?.neighbors ?? 0,
    oneWayLinks: links - bothWays,
    longestLink: distance && longest(linkDistances(topology, distance)),
    density: areas > 1 ? links / (areas * (areas - 1)) : null,
    neighborCounts,
  };
}

function countNeighbors({ offsets }: Topology): { neighbors: number; areas: number }[] {
  const areas = new Map<number, number>();
  for (let i = 0; i + 1 < offsets.length; i++) {
    const neighbors = offsets[i + 1] - offsets[i];
    areas.set(neighbors, (areas.get(neighbors) ?? 0) + 1);
  }
  return [...areas].sort(([a], [b]) => a - b).map(([neighbors, areas]) => ({ neighbors, areas }));
}

/** The largest distance that is known, or null. */
function longest(distances: Float64Array): number | null {
  let most = -Infinity;
  for (const distance of distances) if (distance > most) most = distance;
  return most >= 0 ? most : null;
}
