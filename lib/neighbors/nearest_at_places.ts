/**
 * The nearest others of every point where crowds of points share a place.
 *
 * @module
 */
import { distinctPlaces, type Places } from "./places.ts";
import { grainsBetween, indexPoints, type PointIndex } from "./point_index.ts";
import type { RoundedPoints } from "./rounded_points.ts";

/** `width` tree positions for each point of an index, points in tree order, nearest first. */
type Near = Uint32Array;

/**
 * Searches once for each place instead of each point. The `width` nearest places hold the `width` nearest
 * points among the first `width` of each, ties in the order of the input included, as places are numbered by
 * their first point.
 *
 * @param search Searches an index of places, which are all different.
 */
export function nearestAtPlaces(
  index: PointIndex,
  width: number,
  search: (index: PointIndex, width: number) => Near,
): Near {
  const { points, treeOf } = inInputOrder(index);
  const places = distinctPlaces(points);
  const placeIndex = indexPoints({ xy: places.xy, perUnit: index.perUnit });
  const placeWidth = Math.min(width, placeIndex.count - 1);
  const nearPlaces = search(placeIndex, placeWidth);
  const near = new Uint32Array(index.count * width);
  const { starts, members } = places;
  for (let at = 0; at < placeIndex.count; at++) {
    const others = nearPlaces.subarray(at * placeWidth, (at + 1) * placeWidth);
    const ranked = nearestMembers(places, placeIndex, { at, others, most: width + 1 });
    const place = placeIndex.ids[at];
    for (let m = starts[place]; m < starts[place + 1]; m++) {
      let write = treeOf[members[m]] * width;
      const end = write + width;
      for (let r = 0; write < end; r++) {
        if (ranked[r] !== members[m]) near[write++] = treeOf[ranked[r]];
      }
    }
  }
  return near;
}

/** Enough points of a place and of its nearest places, by distance and then in the order of the input. */
function nearestMembers(
  { starts, members }: Places,
  index: PointIndex,
  { at, others, most }: {
    readonly at: number;
    readonly others: Uint32Array;
    readonly most: number;
  },
): number[] {
  const ids: number[] = [], grains: number[] = [];
  for (let o = -1; o < others.length; o++) {
    const other = o < 0 ? at : others[o];
    const place = index.ids[other], distance = grainsBetween(index, at, other);
    const end = Math.min(starts[place + 1], starts[place] + most);
    for (let m = starts[place]; m < end; m++) {
      ids.push(members[m]);
      grains.push(distance);
    }
  }
  // Places come in order already, and so do their points where each place has one.
  if (ids.length === others.length + 1) return ids;
  const order = ids.map((_, r) => r);
  return order.sort((a, b) => grains[a] - grains[b] || ids[a] - ids[b]).map((r) => ids[r]);
}

/** The points of an index by their positions in the input, and where each stands in the tree. */
function inInputOrder(
  { count, ids, xy, perUnit }: PointIndex,
): { points: RoundedPoints; treeOf: Uint32Array } {
  let last = 0;
  for (const id of ids) if (id > last) last = id;
  const treeOf = new Uint32Array(last + 1);
  const inOrder = new Float64Array(2 * treeOf.length).fill(NaN);
  for (let at = 0; at < count; at++) {
    treeOf[ids[at]] = at;
    inOrder[2 * ids[at]] = xy[2 * at];
    inOrder[2 * ids[at] + 1] = xy[2 * at + 1];
  }
  return { points: { xy: inOrder, perUnit }, treeOf };
}
