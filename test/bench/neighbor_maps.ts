/**
 * Points and areas for the neighbor benchmarks, the same every time.
 *
 * @module
 */
import { voronoiMesh } from "../../lib/demo/cell_mesh.ts";
import { bell, stream } from "../../lib/demo/chance.ts";
import { outlineAreas } from "../../lib/demo/outline.ts";
import type { FlatGeometry } from "../../lib/layer/geometry.ts";

/** Points spread evenly over a square, one for each square unit of a thousand by a thousand meters. */
export function evenPoints(count: number): Float64Array {
  const random = stream(`even ${count}`), side = 1000 * Math.sqrt(count);
  return new Float64Array(2 * count).map(() => side * random());
}

/** Points in towns: bells of very different width around a thousand centers. */
export function clusteredPoints(count: number): Float64Array {
  const random = stream(`clustered ${count}`), side = 1000 * Math.sqrt(count);
  const towns = Array.from({ length: 1000 }, () => ({
    x: side * random(),
    y: side * random(),
    width: 0.01 * side * random() ** 3,
  }));
  const points = new Float64Array(2 * count);
  for (let i = 0; i < count; i++) {
    const { x, y, width } = towns[Math.floor(towns.length * random())];
    points[2 * i] = x + width * bell(random);
    points[2 * i + 1] = y + width * bell(random);
  }
  return points;
}

/** Voronoi polygons of a jittered lattice as flat arrays. */
export function voronoiGeometry(columns: number, rows: number): FlatGeometry {
  const random = stream(`cells ${columns} ${rows}`);
  const across = columns + 2, down = rows + 2;
  const seeds = Float64Array.from({ length: 2 * across * down }, (_, i) => {
    const cell = i >> 1;
    const place = i % 2 === 0 ? cell % across : Math.floor(cell / across);
    return 1000 * (place + 0.05 + 0.9 * random());
  });
  const mesh = voronoiMesh(seeds);
  const areaOf = Int32Array.from({ length: mesh.count }, (_, cell) => {
    const column = cell % across - 1, row = Math.floor(cell / across) - 1;
    const inside = column >= 0 && column < columns && row >= 0 && row < rows;
    return inside ? row * columns + column : -1;
  });
  return flat(outlineAreas(mesh, areaOf, columns * rows).map(([[outer]]) => outer));
}

function flat(rings: readonly (readonly (readonly number[])[])[]): FlatGeometry {
  const starts = Uint32Array.from({ length: rings.length + 1 }, (_, i) => i);
  const vertexStarts = new Uint32Array(rings.length + 1);
  rings.forEach((ring, i) => vertexStarts[i + 1] = vertexStarts[i] + ring.length);
  const xy = new Float64Array(2 * vertexStarts[rings.length]);
  rings.forEach((ring, i) =>
    ring.forEach(([x, y], v) => {
      xy[2 * (vertexStarts[i] + v)] = x;
      xy[2 * (vertexStarts[i] + v) + 1] = y;
    })
  );
  return {
    kinds: new Uint8Array(rings.length).fill(3),
    partStarts: starts,
    ringStarts: starts,
    vertexStarts,
    xy,
  };
}
