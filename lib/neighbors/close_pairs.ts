/**
 * All pairs of points within a distance of each other.
 *
 * @module
 */
import { MOST_LINKS, withRoom } from "./link_room.ts";
import { type PointIndex, rangeSearch, STACK } from "./point_index.ts";

/** Pairs of tree positions a < b, the partners b of each a one after the other. */
export interface ClosePairs {
  /** Number of pairs. */
  readonly pairs: number;
  /** Number of partners of each point, by tree order. */
  readonly counts: Uint32Array;
  /** All partners; cut short when there are more than fit. */
  readonly partners: Uint32Array;
}

/**
 * Finds each pair no more than `reach` apart once. The points of a leaf search together: one walk of the
 * tree finds the ranges that are near the leaf and come after it, then each point goes through them.
 *
 * Cost: about 0.2 µs for each point and its pairs at 4 pairs a point. Beyond 100 million pairs they are
 * counted but not kept.
 */
export function closePairs(index: PointIndex, reach: number): ClosePairs {
  const { count, xy, leaf } = index;
  const square = reach * reach;
  const most = MOST_LINKS / 2;
  const counts = new Uint32Array(count);
  let partners: Uint32Array = new Uint32Array(4 * count + 16);
  let pairs = 0;

  /** Keeps the points from … to that come after a and are within reach of it. */
  function compare(a: number, from: number, to: number): void {
    if (pairs <= most) partners = withRoom(partners, pairs + to - from + 1);
    const x = xy[2 * a], y = xy[2 * a + 1], before = pairs;
    for (let b = a < from ? from : a + 1; b <= to; b++) {
      const dx = xy[2 * b] - x, dy = xy[2 * b + 1] - y;
      if (dx * dx + dy * dy <= square) partners[pairs++] = b;
    }
    counts[a] += pairs - before;
  }

  const lefts = new Int32Array(STACK), rights = new Int32Array(STACK), axes = new Uint8Array(STACK);
  const ranges: number[] = [];

  /** Collects the ranges near the leaf first … last, from the leaf itself on. */
  function collectRanges(first: number, last: number): void {
    const [west, south, east, north] = boxOf(xy, first, last, reach);
    ranges.length = 0;
    lefts[0] = 0;
    rights[0] = count - 1;
    axes[0] = 0;
    for (let top = 1; top > 0;) {
      top--;
      let left = lefts[top], right = rights[top], axis = axes[top];
      while (right - left > leaf && right >= first) {
        const middle = (left + right) >> 1;
        const border = xy[2 * middle + axis];
        const below = border >= (axis === 0 ? west : south);
        const above = border <= (axis === 0 ? east : north);
        axis = 1 - axis;
        if (below && above) {
          if (middle > last) ranges.push(middle, middle);
          lefts[top] = middle + 1;
          rights[top] = right;
          axes[top] = axis;
          top++;
        }
        if (below) right = middle - 1;
        else left = middle + 1;
      }
      if (right >= first) ranges.push(left, right);
    }
  }

  const { found, around } = rangeSearch(index);

  function searchRange(first: number, last: number): void {
    if (last - first <= leaf) {
      collectRanges(first, last);
      for (let a = first; a <= last; a++) {
        for (let r = 0; r < ranges.length; r += 2) compare(a, ranges[r], ranges[r + 1]);
      }
      return;
    }
    const middle = (first + last) >> 1;
    searchRange(first, middle - 1);
    const size = around(xy[2 * middle], xy[2 * middle + 1], reach);
    for (let f = 0; f < size; f++) compare(middle, found[f], found[f]);
    searchRange(middle + 1, last);
  }

  searchRange(0, count - 1);
  return { pairs, counts, partners };
}

/** The box around points first … last, with a margin: west, south, east, north. */
function boxOf(
  xy: Float64Array,
  first: number,
  last: number,
  margin: number,
): [number, number, number, number] {
  let west = Infinity, south = Infinity, east = -Infinity, north = -Infinity;
  for (let at = first; at <= last; at++) {
    west = Math.min(west, xy[2 * at]);
    east = Math.max(east, xy[2 * at]);
    south = Math.min(south, xy[2 * at + 1]);
    north = Math.max(north, xy[2 * at + 1]);
  }
  return [west - margin, south - margin, east + margin, north + margin];
}
