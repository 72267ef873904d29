/**
 * Neighbors of neighbors: the options `order` and `upto`.
 *
 * @module
 */
import { MOST_LINKS, refuseTooMany, sortRow, withRoom } from "./link_room.ts";
import type { Topology } from "./topology.ts";

/**
 * Links between areas whose shortest way along the links takes from `fewest` to `most` steps: 2 and 2
 * give the neighbors of neighbors that are no neighbors themselves, 1 and 2 both rings together.
 * Weights that came with the links are dropped, since a way of several links has none.
 *
 * Cost: a breadth-first walk of `most` rings from each area.
 *
 * @throws {UnfitDataError} beyond 200 million links.
 */
export function stepsApart(topology: Topology, fewest: number, most: number): Topology {
  const n = topology.offsets.length - 1;
  const walk = ringWalk(topology, fewest, most);
  const offsets = new Uint32Array(n + 1);
  let indices: Uint32Array = new Uint32Array(4 * topology.indices.length);
  let size = 0;
  for (let start = 0; start < n; start++) {
    const reached = walk(start);
    if (size + reached.length > MOST_LINKS) {
      refuseTooMany(countAll(n, walk), `${most} steps`, "take fewer steps");
    }
    indices = withRoom(indices, size + reached.length);
    indices.set(reached, size);
    sortRow(indices, size, size + reached.length);
    size += reached.length;
    offsets[start + 1] = size;
  }
  return { offsets, indices: indices.slice(0, size) };
}

type Walk = (start: number) => Uint32Array;

function countAll(n: number, walk: Walk): number {
  let count = 0;
  for (let start = 0; start < n; start++) count += walk(start).length;
  return count;
}

/** The areas reached in `fewest` to `most` steps; the list is overwritten by the next walk. */
function ringWalk({ offsets, indices }: Topology, fewest: number, most: number): Walk {
  const n = offsets.length - 1;
  const seenFrom = new Int32Array(n).fill(-1);
  const queue = new Uint32Array(n);
  return (start) => {
    seenFrom[start] = start;
    queue[0] = start;
    let ringStart = 0, end = 1, first = 1;
    for (let step = 1; step <= most && ringStart < end; step++) {
      const ringEnd = end;
      for (let q = ringStart; q < ringEnd; q++) {
        for (let link = offsets[queue[q]]; link < offsets[queue[q] + 1]; link++) {
          const next = indices[link];
          if (seenFrom[next] === start) continue;
          seenFrom[next] = start;
          queue[end++] = next;
        }
      }
      ringStart = ringEnd;
      if (step < fewest) first = end;
    }
    return queue.subarray(Math.min(first, end), end);
  };
}
