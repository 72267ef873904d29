/**
 * Putting neighbors next to each other in memory.
 *
 * @module
 */
import type { Topology } from "../neighbors/topology.ts";

/** Links that reach farther than so many areas on average miss the caches, where an area takes 32 bytes. */
const FAR = 8192;

/**
 * Where to put each area so that neighbors lie close to each other: areas in the order in which a walk through the
 * links, nearest first, comes to them (Cuthill & McKee 1969). Null where the links are short enough as they are.
 *
 * It matters for many areas numbered without regard to where they are: on a million numbered at random, a pass over the
 * links takes ten times as long as on a million numbered row by row. Cost: a pass over the links; a second one
 * where they are long, some 0.1 µs a link.
 *
 * @param links An area's neighbors; links may go one way only.
 * @returns The place of each area, length n, or null.
 */
export function nearPlaces(links: Topology, far: number = FAR): Uint32Array | null {
  return meanReach(links) > far ? placesByWalk(links) : null;
}

function meanReach({ offsets, indices }: Topology): number {
  let sum = 0;
  for (let i = 0; i + 1 < offsets.length; i++) {
    for (let e = offsets[i]; e < offsets[i + 1]; e++) sum += Math.abs(indices[e] - i);
  }
  return indices.length === 0 ? 0 : sum / indices.length;
}

function placesByWalk({ offsets, indices }: Topology): Uint32Array {
  const n = offsets.length - 1;
  const places = new Uint32Array(n).fill(UNSEEN), walk = new Uint32Array(n);
  let seen = 0;
  const see = (area: number) => {
    places[area] = seen;
    walk[seen++] = area;
  };
  for (let start = 0, at = 0; start < n; start++) {
    if (places[start] !== UNSEEN) continue;
    for (see(start); at < seen; at++) {
      const area = walk[at];
      for (let e = offsets[area]; e < offsets[area + 1]; e++) {
        if (places[indices[e]] === UNSEEN) see(indices[e]);
      }
    }
  }
  return places;
}

const UNSEEN = 2 ** 32 - 1;

/** The values at their places: entry `places[i]` is `values[i]`. Cost: one pass. */
export function putInPlace<A extends Float64Array | Float32Array>(
  values: A,
  places: Uint32Array | null,
): A {
  if (places === null) return values;
  const arranged = values.slice() as A;
  for (let i = 0; i < places.length; i++) arranged[places[i]] = values[i];
  return arranged;
}
