/**
 * Delaunay triangulation of places (Delaunay 1934), as edges.
 *
 * @module
 */
import Delaunator from "delaunator";
import type { RoundedPoints } from "./rounded_points.ts";

/** Edges of a triangulation, each once. */
export interface Edges {
  /** One end of each edge. */
  readonly one: Uint32Array;
  /** The other end, parallel to `one`. */
  readonly other: Uint32Array;
  /** The corners that face the edge, two entries an edge, -1 where there is none. */
  readonly facing: Int32Array;
}

/**
 * Triangulates places. Where four or more lie on one circle with none inside, several triangulations
 * are right; which one comes out depends on the order of the places but never on chance. Places on one
 * line are linked along it, and those that lie on the outer border but for the rounding are on it: there is no
 * edge past them.
 *
 * Cost: n log n, about 1 s for a million places.
 *
 * @param places All different, each with a place.
 */
export function triangulate({ xy, perUnit }: RoundedPoints): Edges {
  if (xy.length === 0) return pathEdges(new Uint32Array(0));
  const { triangles, halfedges, hull } = new Delaunator(xy);
  if (triangles.length === 0) return pathEdges(hull);
  const peeled = peelSlivers(xy, { triangles, halfedges }, 2 / perUnit);
  const most = (triangles.length + hull.length) / 2;
  const one = new Uint32Array(most), other = new Uint32Array(most);
  const facing = new Int32Array(2 * most).fill(-1);
  let size = 0;
  for (let half = 0; half < triangles.length; half++) {
    const twin = halfedges[half];
    if (twin > half || peeled[half]) continue;
    one[size] = triangles[half];
    other[size] = triangles[nextHalf(half)];
    facing[2 * size] = triangles[lastHalf(half)];
    if (twin >= 0) facing[2 * size + 1] = triangles[lastHalf(twin)];
    size++;
  }
  return {
    one: one.slice(0, size),
    other: other.slice(0, size),
    facing: facing.slice(0, 2 * size),
  };
}

/** Triangles as half-edges: three in a row make one, `halfedges` holds the twin of each or -1. */
interface HalfEdges {
  readonly triangles: Uint32Array;
  readonly halfedges: Int32Array;
}

/**
 * Marks edges of the outer border (both halves) that pass a corner by no more than `thin`, from the outside
 * in: taking one away lays its triangle's other sides open.
 */
function peelSlivers(
  xy: Float64Array,
  { triangles, halfedges }: HalfEdges,
  thin: number,
): Uint8Array {
  const peeled = new Uint8Array(triangles.length);
  const open: number[] = [];
  for (let half = 0; half < halfedges.length; half++) if (halfedges[half] < 0) open.push(half);
  while (open.length > 0) {
    const half = open.pop()!;
    const p = triangles[half], q = triangles[nextHalf(half)], corner = triangles[lastHalf(half)];
    if (peeled[half] || !liesOn(xy, corner, p, q, thin)) continue;
    peeled[half] = 1;
    if (halfedges[half] >= 0) peeled[halfedges[half]] = 1;
    for (const side of [nextHalf(half), lastHalf(half)]) {
      if (halfedges[side] >= 0 && !peeled[side]) open.push(halfedges[side]);
    }
  }
  return peeled;
}

/** Whether a corner is between p and q and at most `thin` off the line through them. */
function liesOn(xy: Float64Array, corner: number, p: number, q: number, thin: number): boolean {
  const ux = xy[2 * q] - xy[2 * p], uy = xy[2 * q + 1] - xy[2 * p + 1];
  const vx = xy[2 * corner] - xy[2 * p], vy = xy[2 * corner + 1] - xy[2 * p + 1];
  const square = ux * ux + uy * uy, along = ux * vx + uy * vy;
  return along > 0 && along < square && Math.abs(ux * vy - uy * vx) <= thin * Math.sqrt(square);
}

function nextHalf(half: number): number {
  return half % 3 === 2 ? half - 2 : half + 1;
}

function lastHalf(half: number): number {
  return half % 3 === 0 ? half + 2 : half - 1;
}

/** Edges along a line, from its places in order. */
function pathEdges(path: Uint32Array): Edges {
  const count = Math.max(0, path.length - 1);
  return {
    one: path.slice(0, count),
    other: path.slice(1),
    facing: new Int32Array(2 * count).fill(-1),
  };
}
