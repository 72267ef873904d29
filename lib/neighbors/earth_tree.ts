/**
 * Points of the Earth's surface in a k-d tree of three dimensions, searched by straight lines through the Earth.
 *
 * The tree is implicit (Bentley 1975): the middle point of a range of positions splits it, by x, y and z in turn.
 * A straight line is never longer than the geodesic, so what it leaves out is out, and what it lets in is measured.
 *
 * @module
 */

/** Ranges of at most this many points are not split. */
const LEAF = 8;

/** Positions in tree order and their coordinates. */
export interface EarthTree {
  readonly count: number;
  /** Position of each point in the list it came from. */
  readonly ids: Uint32Array;
  /** x, y and z in meters, by tree order. */
  readonly xyz: Float64Array;
}

/** A range of tree positions, first … last, split by `axis` where it is long enough. */
export interface Branch {
  readonly first: number;
  readonly last: number;
  readonly axis: number;
}

/**
 * Sorts points into a tree. Cost: n log² n.
 *
 * @param ids Positions of the points that have a place.
 * @param xyz Coordinates of all points, 3 each.
 */
export function plantEarthTree(ids: Uint32Array, xyz: Float64Array): EarthTree {
  const sorted = ids.slice();
  function plant({ first, last, axis }: Branch): void {
    if (last - first < LEAF) return;
    sorted.subarray(first, last + 1).sort((p, q) => xyz[3 * p + axis] - xyz[3 * q + axis]);
    for (const half of halvesOf({ first, last, axis })) plant(half);
  }
  plant({ first: 0, last: sorted.length - 1, axis: 0 });
  const ordered = new Float64Array(3 * sorted.length);
  sorted.forEach((id, at) => ordered.set(xyz.subarray(3 * id, 3 * id + 3), 3 * at));
  return { count: sorted.length, ids: sorted, xyz: ordered };
}

/** What lies before and after the middle of a branch. */
function halvesOf({ first, last, axis }: Branch): [Branch, Branch] {
  const middle = (first + last) >> 1, next = (axis + 1) % 3;
  return [{ first, last: middle - 1, axis: next }, { first: middle + 1, last, axis: next }];
}

/**
 * Visits the points around one, near branches first.
 *
 * @param from Tree position of the point in the middle; it is visited too.
 * @param reachOf Straight length beyond which nothing is wanted; asked again as the search goes on.
 * @param visit Called with each tree position that may be near, and its straight length.
 * @param skips Branches to leave out. @default none
 */
export function visitAround(
  tree: EarthTree,
  from: number,
  { reachOf, visit, skips = () => false }: {
    readonly reachOf: () => number;
    readonly visit: (at: number, straight: number) => void;
    readonly skips?: (branch: Branch) => boolean;
  },
): void {
  const { xyz } = tree;
  function offer(at: number): void {
    const straight = straightBetween(tree, from, at);
    if (straight <= reachOf()) visit(at, straight);
  }
  function search(branch: Branch): void {
    const { first, last, axis } = branch;
    if (first > last || skips(branch)) return;
    if (last - first < LEAF) {
      for (let at = first; at <= last; at++) offer(at);
      return;
    }
    const middle = (first + last) >> 1;
    const gap = xyz[3 * from + axis] - xyz[3 * middle + axis];
    const [before, after] = halvesOf(branch);
    search(gap < 0 ? before : after);
    if (Math.abs(gap) > reachOf()) return;
    offer(middle);
    search(gap < 0 ? after : before);
  }
  search({ first: 0, last: tree.count - 1, axis: 0 });
}

/** Length of the straight line between two tree positions, in meters. */
export function straightBetween({ xyz }: EarthTree, p: number, q: number): number {
  const dx = xyz[3 * p] - xyz[3 * q], dy = xyz[3 * p + 1] - xyz[3 * q + 1];
  const dz = xyz[3 * p + 2] - xyz[3 * q + 2];
  return Math.sqrt(dx * dx + dy * dy + dz * dz);
}

/**
 * Marks each branch whose points all bear one number with it, by its middle position; -1 where they differ.
 *
 * @param numberOf Number of the point at a tree position, 0 or more.
 */
export function uniformBranches(tree: EarthTree, numberOf: (at: number) => number): Int32Array {
  const marks = new Int32Array(tree.count).fill(-1);
  function mark(branch: Branch): number {
    const { first, last } = branch;
    const middle = (first + last) >> 1;
    let common = numberOf(middle);
    if (last - first < LEAF) {
      for (let at = first; at <= last; at++) if (numberOf(at) !== common) common = -1;
      return marks[middle] = common;
    }
    for (const half of halvesOf(branch)) if (mark(half) !== common) common = -1;
    return marks[middle] = common;
  }
  if (tree.count > 0) mark({ first: 0, last: tree.count - 1, axis: 0 });
  return marks;
}
