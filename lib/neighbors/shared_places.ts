/**
 * Areas that have a vertex in common.
 *
 * @module
 */
import type { Boundaries } from "./boundaries.ts";
import { sortRow, withRoom } from "./link_room.ts";
import type { Topology } from "./topology.ts";

/**
 * Links areas that have a vertex at the same place. Cost: one pass over vertices, and the pairs they make.
 *
 * @param ids Place of each vertex.
 * @param count Number of places.
 */
export function linkSharedPlaces(
  { areas, areaOf }: Boundaries,
  ids: Uint32Array,
  count: number,
): Topology {
  const { starts, owners } = areasAtPlaces(areaOf, ids, count);
  const offsets = new Uint32Array(areas + 1);
  let indices: Uint32Array = new Uint32Array(8 * areas + 16), size = 0;
  const seenBy = new Int32Array(areas).fill(-1);
  let vertex = 0;
  for (let area = 0; area < areas; area++) {
    seenBy[area] = area;
    for (; vertex < ids.length && areaOf[vertex] === area; vertex++) {
      for (let at = starts[ids[vertex]]; at < starts[ids[vertex] + 1]; at++) {
        if (seenBy[owners[at]] === area) continue;
        seenBy[owners[at]] = area;
        indices = withRoom(indices, size + 1);
        indices[size++] = owners[at];
      }
    }
    sortRow(indices, offsets[area], size);
    offsets[area + 1] = size;
  }
  return { offsets, indices: indices.slice(0, size) };
}

/** For each place, the areas of its vertices (with repeats), in compressed rows. */
function areasAtPlaces(
  areaOf: Uint32Array,
  ids: Uint32Array,
  count: number,
): { starts: Uint32Array; owners: Uint32Array } {
  const starts = new Uint32Array(count + 1);
  for (const id of ids) starts[id + 1]++;
  for (let id = 0; id < count; id++) starts[id + 1] += starts[id];
  const next = starts.slice(0, count);
  const owners = new Uint32Array(ids.length);
  for (let v = 0; v < ids.length; v++) owners[next[ids[v]]++] = areaOf[v];
  return { starts, owners };
}
