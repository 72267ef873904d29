/**
 * Points at the same place, taken as one.
 *
 * @module
 */
import { refuseTooMany, sortRow } from "./link_room.ts";
import { locatedPoints, type RoundedPoints, roundPoints } from "./rounded_points.ts";
import type { Topology } from "./topology.ts";
import { vertexIds } from "./vertex_ids.ts";

/** The different places of some points. */
export interface Places {
  /** x and y of each place, in the order of the first point there. */
  readonly xy: Float64Array;
  /** First point of each place in `members`, one more than places. */
  readonly starts: Uint32Array;
  /** Points by place, ascending within a place; points without a place are in none. */
  readonly members: Uint32Array;
}

/** Sorts points by place; two points are at the same place when both rounded coordinates are equal. */
export function distinctPlaces({ xy, perUnit }: RoundedPoints): Places {
  const located = locatedPoints(xy);
  const grains = new Float64Array(2 * located.length);
  for (let at = 0; at < located.length; at++) {
    grains[2 * at] = Math.round(xy[2 * located[at]] * perUnit);
    grains[2 * at + 1] = Math.round(xy[2 * located[at] + 1] * perUnit);
  }
  const { ids, count } = vertexIds(grains, 0);
  const starts = new Uint32Array(count + 1);
  for (let at = 0; at < ids.length; at++) starts[ids[at] + 1]++;
  for (let id = 0; id < count; id++) starts[id + 1] += starts[id];
  const next = starts.slice(0, count);
  const members = new Uint32Array(located.length);
  for (let at = 0; at < ids.length; at++) members[next[ids[at]]++] = located[at];
  const places = new Float64Array(2 * count);
  for (let id = 0; id < count; id++) {
    places[2 * id] = xy[2 * members[starts[id]]];
    places[2 * id + 1] = xy[2 * members[starts[id]] + 1];
  }
  return { xy: places, starts, members };
}

/** How many points share their place with another one. */
export function countSharingPlaces(points: Float64Array): number {
  const { starts } = distinctPlaces(roundPoints(points));
  let sharing = 0;
  for (let place = 0; place + 1 < starts.length; place++) {
    const here = starts[place + 1] - starts[place];
    if (here > 1) sharing += here;
  }
  return sharing;
}

/**
 * Links points as their places are linked, and points at the same place with each other.
 *
 * @param points Number of points, located or not.
 * @throws {UnfitDataError} beyond 200 million links.
 */
export function linkAtPlaces(
  { starts, members }: Places,
  topology: Topology,
  points: number,
): Topology {
  const sizes = starts.slice(1).map((end, id) => end - starts[id]);
  const reached = sizes.slice();
  topology.offsets.subarray(1).forEach((end, id) => {
    for (let link = topology.offsets[id]; link < end; link++) {
      reached[id] += sizes[topology.indices[link]];
    }
  });
  const offsets = new Uint32Array(points + 1);
  let links = 0;
  reached.forEach((count, id) => {
    links += sizes[id] * (count - 1);
    for (let at = starts[id]; at < starts[id + 1]; at++) offsets[members[at] + 1] = count - 1;
  });
  refuseTooMany(links, "a graph of points at the same place", "spread those points");
  for (let i = 0; i < points; i++) offsets[i + 1] += offsets[i];
  const indices = new Uint32Array(links);
  reached.forEach((_, id) => {
    for (let at = starts[id]; at < starts[id + 1]; at++) {
      let write = offsets[members[at]];
      const add = (place: number) => {
        for (let m = starts[place]; m < starts[place + 1]; m++) {
          if (members[m] !== members[at]) indices[write++] = members[m];
        }
      };
      add(id);
      for (let link = topology.offsets[id]; link < topology.offsets[id + 1]; link++) {
        add(topology.indices[link]);
      }
      sortRow(indices, offsets[members[at]], write);
    }
  });
  return { offsets, indices };
}
