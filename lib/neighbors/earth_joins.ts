/**
 * The shortest distance at which all points of the Earth hang together.
 *
 * @module
 */
import { joinSets, rootOf, singleSets } from "./disjoint_sets.ts";
import { type EarthTree, uniformBranches, visitAround } from "./earth_tree.ts";

/**
 * The longest edge of the minimum spanning tree (Borůvka 1926): in each round every piece is joined with the
 * piece nearest to it, until one is left.
 *
 * Cost: at most log n rounds of one search for each point.
 *
 * @param distance Between points by their positions in the input; never shorter than the straight line.
 * @returns Meters; NaN with fewer than two points.
 */
export function longestJoin(
  tree: EarthTree,
  distance: (i: number, j: number) => number,
): number {
  if (tree.count < 2) return NaN;
  const parents = singleSets(tree.count);
  let pieces = tree.count, longest = 0;
  while (pieces > 1) {
    for (const { from, to, length } of shortestJoins(tree, parents, distance)) {
      if (!joinSets(parents, from, to)) continue;
      longest = Math.max(longest, length);
      pieces--;
    }
  }
  return longest;
}

/** Two tree positions of different pieces. */
interface Join {
  readonly from: number;
  readonly to: number;
  readonly length: number;
}

/** For each piece its shortest way to another, the shortest of all first. */
function shortestJoins(
  tree: EarthTree,
  parents: Uint32Array,
  distance: (i: number, j: number) => number,
): Join[] {
  const pieceOf = Uint32Array.from(parents, (_, at) => rootOf(parents, at));
  const uniform = uniformBranches(tree, (at) => pieceOf[at]);
  const shortest = new Map<number, Join>();
  for (let from = 0; from < tree.count; from++) {
    const piece = pieceOf[from];
    visitAround(tree, from, {
      reachOf: () => shortest.get(piece)?.length ?? Infinity,
      skips: ({ first, last }) => uniform[(first + last) >> 1] === piece,
      visit: (to) => {
        if (pieceOf[to] === piece) return;
        const length = distance(tree.ids[from], tree.ids[to]);
        if (!(length >= (shortest.get(piece)?.length ?? Infinity))) {
          shortest.set(piece, { from, to, length });
        }
      },
    });
  }
  return [...shortest.values()].sort((a, b) => a.length - b.length);
}
