/**
 * The Gabriel graph (Gabriel & Sokal 1969).
 *
 * @module
 */
import { distanceBetween } from "./distance_between.ts";
import type { Edges } from "./triangulate.ts";

export { distanceBetween as distance } from "./distance_between.ts";

/**
 * Keeps the edges whose circle, with the edge as diameter, holds no third place, neither inside nor on the
 * circle: d²(p,q) < d²(p,c) + d²(q,c) for every c. A place within a grain of the circle is on it. So the square
 * lattice keeps its sides and loses its diagonals, and the result does not depend on which triangulation
 * was taken: of all places, a corner that faces the edge sees it under the widest angle.
 *
 * Cost: one pass over the edges.
 *
 * @param grain Length of a grain in units of `xy`.
 */
export function gabrielEdges(xy: Float64Array, edges: Edges, grain: number): Edges {
  return keepEdges(
    edges,
    (p, q, corners) =>
      corners.every((c) =>
        c < 0 || beyondCircle(xy, p, q, c) > 2 * grain * distanceBetween(xy, p, q)
      ),
  );
}

/** (p - c) · (q - c): the square of c's distance from the circle's center less that of the radius. */
function beyondCircle(xy: Float64Array, p: number, q: number, c: number): number {
  return (xy[2 * p] - xy[2 * c]) * (xy[2 * q] - xy[2 * c]) +
    (xy[2 * p + 1] - xy[2 * c + 1]) * (xy[2 * q + 1] - xy[2 * c + 1]);
}

/** The edges for which `keeps` is true, given both ends and the corners that face the edge. */
export function keepEdges(
  { one, other, facing }: Edges,
  keeps: (p: number, q: number, corners: readonly [number, number]) => boolean,
): Edges {
  const kept: number[] = [];
  for (let e = 0; e < one.length; e++) {
    if (keeps(one[e], other[e], [facing[2 * e], facing[2 * e + 1]])) kept.push(e);
  }
  return {
    one: Uint32Array.from(kept, (e) => one[e]),
    other: Uint32Array.from(kept, (e) => other[e]),
    facing: Int32Array.from(
      { length: 2 * kept.length },
      (_, f) => facing[2 * kept[f >> 1] + (f & 1)],
    ),
  };
}
