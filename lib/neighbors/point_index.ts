/**
 * Points sorted into a k-d tree, for every question about who is near.
 *
 * The tree is implicit (Bentley 1975; medians by Floyd & Rivest 1975, in the `kdbush` package): the middle
 * point of a range of positions splits it, by x at even depths and by y at odd ones.
 *
 * @module
 */
import KDBush from "kdbush";
import { distanceBetween } from "./distance_between.ts";
import { locatedPoints, type RoundedPoints } from "./rounded_points.ts";

/** Points in a leaf, less one; from 5 to 23 makes little difference to searches of a million points. */
const LEAF = 15;

/** Entries for a stack that walks any tree: one a level, and no tree is deeper. */
export const STACK = 64;

/** Located points in tree order. */
export interface PointIndex {
  /** Number of points. */
  readonly count: number;
  /** Position of each point in the list it came from, by tree order. */
  readonly ids: Uint32Array;
  /** x and y by tree order. */
  readonly xy: Float64Array;
  /** Ranges whose last position is at most this far from the first are not split. */
  readonly leaf: number;
  /** Grains in a unit; see `RoundedPoints`. */
  readonly perUnit: number;
}

/** Sorts points into a tree, those without a place left out. Cost: n log n. */
export function indexPoints({ xy, perUnit }: RoundedPoints): PointIndex {
  const located = locatedPoints(xy);
  const count = located.length;
  const tree = new KDBush(count, LEAF, Float64Array);
  for (let at = 0; at < count; at++) tree.add(xy[2 * located[at]], xy[2 * located[at] + 1]);
  tree.finish();
  const ids = new Uint32Array(count);
  for (let at = 0; at < count; at++) ids[at] = located[tree.ids[at]];
  return {
    count,
    ids,
    xy: tree.coords as Float64Array,
    leaf: tree.nodeSize,
    perUnit,
  };
}

/** Distance of two points by tree order, in whole grains. */
export function grainsBetween({ xy, perUnit }: PointIndex, a: number, b: number): number {
  return Math.round(distanceBetween(xy, a, b) * perUnit);
}

/** Finds points around a place; what it found stands in `found` until the next call. */
export interface RangeSearch {
  /** Tree positions, in no order. */
  readonly found: Uint32Array;
  /** How many points lie within `reach` of (x, y), the border included. */
  readonly around: (x: number, y: number, reach: number) => number;
}

/** Prepares searches within a distance. Cost of each: log n, and the points found. */
export function rangeSearch({ count, xy, leaf }: PointIndex): RangeSearch {
  const found = new Uint32Array(count);
  const lefts = new Int32Array(STACK), rights = new Int32Array(STACK), axes = new Uint8Array(STACK);
  function around(x: number, y: number, reach: number): number {
    const square = reach * reach;
    let size = 0, top = 1;
    lefts[0] = 0;
    rights[0] = count - 1;
    axes[0] = 0;
    while (top > 0) {
      top--;
      let left = lefts[top], right = rights[top], axis = axes[top];
      while (right - left > leaf) {
        const middle = (left + right) >> 1;
        const dx = xy[2 * middle] - x, dy = xy[2 * middle + 1] - y;
        if (dx * dx + dy * dy <= square) found[size++] = middle;
        const gap = axis === 0 ? dx : dy;
        axis = 1 - axis;
        if (gap < -reach) left = middle + 1;
        else if (gap > reach) right = middle - 1;
        else {
          lefts[top] = middle + 1;
          rights[top] = right;
          axes[top] = axis;
          top++;
          right = middle - 1;
        }
      }
      for (let at = left; at <= right; at++) {
        const dx = xy[2 * at] - x, dy = xy[2 * at + 1] - y;
        if (dx * dx + dy * dy <= square) found[size++] = at;
      }
    }
    return size;
  }
  return { found, around };
}
