/**
 * The Voronoi cells of a set of points, as a mesh whose corners are shared by number.
 *
 * Regions built from whole cells of one mesh share their border vertices exactly, because a corner is stored
 * once and every outline refers to it.
 *
 * @module
 */
import Delaunator from "delaunator";

/**
 * Cells of `count` points. The sides of cell i are `offsets[i]` … `offsets[i + 1] - 1`, in no
 * particular order; each runs from corner `from` to corner `to` with the neighboring cell on its far side. All
 * cells are walked in the same sense of rotation.
 */
export interface CellMesh {
  readonly count: number;
  /** First side of each cell, length count + 1. */
  readonly offsets: Uint32Array;
  /** The cell across each side. */
  readonly neighbors: Uint32Array;
  /** Corner at which each side starts. */
  readonly from: Uint32Array;
  /** Corner at which each side ends. */
  readonly to: Uint32Array;
  /** x0, y0, x1, y1, … of the points the cells belong to, length 2 × count. */
  readonly points: Float64Array;
  /** x0, y0, x1, y1, … of the corners, in the units of the points. */
  readonly corners: Float64Array;
  /** 1 where a cell lies on the hull and so has no closed outline, length count. */
  readonly open: Uint8Array;
}

/** The parts of a finished triangulation that the mesh is read from. */
interface Triangulation {
  readonly triangles: Uint32Array;
  readonly halfedges: Int32Array;
  readonly hull: Uint32Array;
}

/**
 * Voronoi mesh of points `x0, y0, x1, y1, …`.
 *
 * Uses only `+ - * /` and `sqrt`, which every engine rounds alike, so the same points give the same bits
 * everywhere. Cost: n log n.
 *
 * @throws RangeError for fewer than 3 points or points on one line, which have no triangle.
 */
export function voronoiMesh(points: Float64Array): CellMesh {
  const { triangles, halfedges, hull }: Triangulation = new Delaunator(points);
  if (triangles.length === 0) {
    throw new RangeError(
      `Cannot build cells of ${points.length / 2} points as they span no triangle`,
    );
  }
  const count = points.length / 2;
  const open = new Uint8Array(count);
  for (const point of hull) open[point] = 1;
  const corners = circumcenters(points, triangles);
  return { count, points, corners, open, ...sidesOfCells(count, triangles, halfedges) };
}

/**
 * Turns every half-edge with a twin into one side: the cell of its start point meets the cell of its end
 * point between the centers of the two triangles.
 */
function sidesOfCells(
  count: number,
  triangles: Uint32Array,
  halfedges: Int32Array,
): Pick<CellMesh, "offsets" | "neighbors" | "from" | "to"> {
  const offsets = new Uint32Array(count + 1);
  for (let e = 0; e < halfedges.length; e++) if (halfedges[e] >= 0) offsets[triangles[e] + 1]++;
  for (let cell = 0; cell < count; cell++) offsets[cell + 1] += offsets[cell];

  const fill = offsets.slice(0, count);
  const neighbors = new Uint32Array(offsets[count]);
  const from = new Uint32Array(offsets[count]);
  const to = new Uint32Array(offsets[count]);
  for (let e = 0; e < halfedges.length; e++) {
    if (halfedges[e] < 0) continue;
    const side = fill[triangles[e]]++;
    neighbors[side] = triangles[e % 3 === 2 ? e - 2 : e + 1];
    from[side] = Math.floor(e / 3);
    to[side] = Math.floor(halfedges[e] / 3);
  }
  return { offsets, neighbors, from, to };
}

/** Center of the circle through the corners of each triangle. */
function circumcenters(points: Float64Array, triangles: Uint32Array): Float64Array {
  const centers = new Float64Array(triangles.length / 3 * 2);
  for (let t = 0; t < triangles.length / 3; t++) {
    const [a, b, c] = [triangles[3 * t], triangles[3 * t + 1], triangles[3 * t + 2]];
    const [ax, ay] = [points[2 * a], points[2 * a + 1]];
    const [bx, by] = [points[2 * b] - ax, points[2 * b + 1] - ay];
    const [cx, cy] = [points[2 * c] - ax, points[2 * c + 1] - ay];
    const bb = bx * bx + by * by, cc = cx * cx + cy * cy;
    const twice = 2 * (bx * cy - by * cx);
    centers[2 * t] = ax + (cy * bb - by * cc) / twice;
    centers[2 * t + 1] = ay + (bx * cc - cx * bb) / twice;
  }
  return centers;
}

/**
 * Number of steps from the nearest of the `sources` (cells with a 1) to every cell, walking from cell to
 * neighboring cell; -1 where no source can be reached. Cost: one pass over the sides.
 */
export function stepsFrom(mesh: CellMesh, sources: Uint8Array): Int32Array {
  const steps = new Int32Array(mesh.count).fill(-1);
  const queue: number[] = [];
  for (let cell = 0; cell < mesh.count; cell++) {
    if (sources[cell] === 1) steps[cell] = 0, queue.push(cell);
  }
  for (let head = 0; head < queue.length; head++) {
    const cell = queue[head];
    for (let s = mesh.offsets[cell]; s < mesh.offsets[cell + 1]; s++) {
      const next = mesh.neighbors[s];
      if (steps[next] < 0) steps[next] = steps[cell] + 1, queue.push(next);
    }
  }
  return steps;
}
