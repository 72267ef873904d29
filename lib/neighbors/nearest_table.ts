/**
 * The nearest others of every point at once.
 *
 * @module
 */
import { nearestAtPlaces } from "./nearest_at_places.ts";
import { type PointIndex, STACK } from "./point_index.ts";

/** The nearest points of every point, nearest first. */
export interface NearestTable {
  /** Nearest points held for each point. */
  readonly width: number;
  /** Their tree positions: `width` entries for each point, points in tree order. */
  readonly near: Uint32Array;
}

/**
 * Finds the `width` nearest others of every point. Points at the same distance, in whole grains, come in
 * the order of the input.
 *
 * Cost: about 1.3 µs for each point at a width of 8, whether the points lie evenly or in clusters; where
 * very many share a place, they are searched for once a place.
 *
 * @param width At most the number of points less one.
 */
export function nearestTable(index: PointIndex, width: number): NearestTable {
  const near = longestCrowd(index) > CROWD
    ? nearestAtPlaces(index, width, searchTree)
    : searchTree(index, width);
  return { width, near };
}

/** A function that finds tables of at least a width; the widest so far is kept, and narrower ones read it. */
export function nearestTables(index: PointIndex): (width: number) => NearestTable {
  let table: NearestTable = { width: 0, near: new Uint32Array(0) };
  return (width) => {
    if (width > table.width) table = nearestTable(index, width);
    return table;
  };
}

/** Points at one place that are searched for one by one; with more, each search there would be slow. */
const CROWD = 64;

/** The longest run of equal points in tree order; a large crowd fills whole branches of the tree. */
function longestCrowd({ count, xy }: PointIndex): number {
  let longest = 0, start = 0;
  for (let at = 1; at <= count; at++) {
    const same = at < count && xy[2 * at] === xy[2 * at - 2] && xy[2 * at + 1] === xy[2 * at - 1];
    if (same) continue;
    longest = Math.max(longest, at - start);
    start = at;
  }
  return longest;
}

/**
 * Walks the tree once. At each leaf, every point starts with the points beside it, which are nearly the
 * nearest already, and then climbs: at each level the other half is entered only if its border is nearer
 * than the last of the list.
 */
function searchTree(index: PointIndex, width: number): Uint32Array {
  const { count, ids, xy, leaf, perUnit } = index;
  const near = new Uint32Array(count * width);

  // The list of the point that asks: tree positions, nearest first, with their distances in grains.
  const best = new Uint32Array(width + 1), grains = new Float64Array(width + 1);
  let asking = 0, x = 0, y = 0, found = 0, reach = Infinity;

  function offer(first: number, last: number): void {
    for (let at = first; at <= last; at++) {
      const dx = xy[2 * at] - x, dy = xy[2 * at + 1] - y;
      const square = dx * dx + dy * dy;
      if (square > reach || at === asking) continue;
      const distance = Math.round(Math.sqrt(square) * perUnit);
      const id = ids[at];
      let slot = found < width ? found++ : width;
      while (
        slot > 0 &&
        (grains[slot - 1] > distance ||
          (grains[slot - 1] === distance && ids[best[slot - 1]] > id))
      ) {
        grains[slot] = grains[slot - 1];
        best[slot] = best[slot - 1];
        slot--;
      }
      grains[slot] = distance;
      best[slot] = at;
      if (found === width) {
        const limit = (grains[width - 1] + 1) / perUnit;
        reach = limit * limit;
      }
    }
  }

  const lefts = new Int32Array(STACK), rights = new Int32Array(STACK);
  const axes = new Uint8Array(STACK), gaps = new Float64Array(STACK);

  /** Searches a range from its root, the nearer half of each split first. */
  function descend(first: number, last: number, firstAxis: number): void {
    lefts[0] = first;
    rights[0] = last;
    axes[0] = firstAxis;
    gaps[0] = 0;
    for (let top = 1; top > 0;) {
      top--;
      if (gaps[top] > reach) continue;
      let left = lefts[top], right = rights[top], axis = axes[top];
      while (right - left > leaf) {
        const middle = (left + right) >> 1;
        const gap = (axis === 0 ? x : y) - xy[2 * middle + axis];
        const square = gap * gap;
        axis = 1 - axis;
        if (square <= reach) {
          offer(middle, middle);
          lefts[top] = gap <= 0 ? middle + 1 : left;
          rights[top] = gap <= 0 ? right : middle - 1;
          axes[top] = axis;
          gaps[top] = square;
          top++;
        }
        if (gap <= 0) right = middle - 1;
        else left = middle + 1;
      }
      offer(left, right);
    }
  }

  const firsts = new Int32Array(STACK), lasts = new Int32Array(STACK);

  /** Fills the row of a point, given the range it belongs to, `depth` levels down. */
  function ask(point: number, first: number, last: number, depth: number): void {
    asking = point;
    x = xy[2 * point];
    y = xy[2 * point + 1];
    found = 0;
    reach = Infinity;
    if (last - first <= leaf) offer(first, last);
    else {
      descend(first, point - 1, (depth + 1) % 2);
      descend(point + 1, last, (depth + 1) % 2);
    }
    for (let level = depth - 1; level >= 0; level--) {
      const middle = (firsts[level] + lasts[level]) >> 1;
      const gap = xy[2 * point + level % 2] - xy[2 * middle + level % 2];
      if (gap * gap > reach) continue;
      offer(middle, middle);
      if (point < middle) descend(middle + 1, lasts[level], (level + 1) % 2);
      else descend(firsts[level], middle - 1, (level + 1) % 2);
    }
    for (let slot = 0; slot < width; slot++) near[point * width + slot] = best[slot];
  }

  function visit(first: number, last: number, depth: number): void {
    if (last - first <= leaf) {
      for (let point = first; point <= last; point++) ask(point, first, last, depth);
      return;
    }
    const middle = (first + last) >> 1;
    ask(middle, first, last, depth);
    firsts[depth] = first;
    lasts[depth] = last;
    visit(first, middle - 1, depth + 1);
    visit(middle + 1, last, depth + 1);
  }

  visit(0, count - 1, 0);
  return near;
}
