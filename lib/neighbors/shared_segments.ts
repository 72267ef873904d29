/**
 * Areas that have a segment of boundary in common.
 *
 * @module
 */
import type { Boundaries } from "./boundaries.ts";
import { withRoom } from "./link_room.ts";
import { tableSize } from "./vertex_ids.ts";

/** What matching segments end to end found. */
export interface SharedSegments {
  /** One area of each match; the same pair may come often. */
  readonly one: Uint32Array;
  /** The other area, parallel to `one`. */
  readonly other: Uint32Array;
  /** First vertex of the matched segment, parallel to `one`. */
  readonly starts: Uint32Array;
  /** 1 for the vertex at the start of each segment that no other area has. */
  readonly loose: Uint8Array;
}

/**
 * Matches segments that have both ends in common, whatever their direction. Cost: one hash look-up a
 * segment.
 *
 * @param ids Place of each vertex.
 */
export function matchSegments({ areaOf, ends }: Boundaries, ids: Uint32Array): SharedSegments {
  const n = ids.length;
  const mask = tableSize(n) - 1;
  const heads = new Int32Array(mask + 1).fill(-1);
  const next = new Int32Array(n);
  const loose = new Uint8Array(n);
  let one: Uint32Array = new Uint32Array(n + 16), other: Uint32Array = new Uint32Array(n + 16);
  let starts: Uint32Array = new Uint32Array(n + 16), pairs = 0;
  for (let v = 0; v < n; v++) {
    if (ends[v] || ids[v] === ids[v + 1]) continue;
    const low = Math.min(ids[v], ids[v + 1]), high = Math.max(ids[v], ids[v + 1]);
    // Places are numbered as they come, so this sum keeps segments that lie side by side side by side in memory.
    const home = (5 * low + high) & mask;
    loose[v] = 1;
    for (let use = heads[home]; use >= 0; use = next[use]) {
      const same = ids[use] === low
        ? ids[use + 1] === high
        : ids[use] === high && ids[use + 1] === low;
      if (!same || areaOf[use] === areaOf[v]) continue;
      loose[v] = loose[use] = 0;
      one = withRoom(one, pairs + 1);
      other = withRoom(other, pairs + 1);
      starts = withRoom(starts, pairs + 1);
      starts[pairs] = v;
      one[pairs] = areaOf[use];
      other[pairs++] = areaOf[v];
    }
    next[v] = heads[home];
    heads[home] = v;
  }
  return {
    one: one.slice(0, pairs),
    other: other.slice(0, pairs),
    starts: starts.slice(0, pairs),
    loose,
  };
}
