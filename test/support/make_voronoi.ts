/**
 * Layers of Voronoi polygons for benchmarks: any size, the same bytes every time.
 *
 * @module
 */
import { voronoiMesh } from "../../lib/demo/cell_mesh.ts";
import { pick, type Random, stream } from "../../lib/demo/chance.ts";
import { noiseField } from "../../lib/demo/noise_field.ts";
import { outlineAreas } from "../../lib/demo/outline.ts";

/**
 * One GeoJSON feature a line: `columns` × `rows` polygons in degrees around 12° E, 45° N that share
 * their border vertices, with `id`, `name`, `cases` (counts without pattern), `pop` and `rate` (a pattern of hills
 * with noise).
 */
export function* voronoiFeatures(columns: number, rows: number): Generator<string> {
  const random = stream(`voronoi ${columns} ${rows}`);
  const mesh = voronoiMesh(jitteredLattice(columns + 2, rows + 2, random));
  const areaOf = Int32Array.from({ length: mesh.count }, (_, cell) => {
    const column = cell % (columns + 2) - 1, row = Math.floor(cell / (columns + 2)) - 1;
    const inside = column >= 0 && column < columns && row >= 0 && row < rows;
    return inside ? row * columns + column : -1;
  });
  const hills = noiseField(random, 8, 3);
  const outlines = outlineAreas(mesh, areaOf, columns * rows);
  for (let id = 0; id < outlines.length; id++) {
    const height = hills((id % columns) / columns, Math.floor(id / columns) / rows);
    const properties = {
      id,
      name: `zone ${id}`,
      cases: pick(random, 30),
      pop: 500 + pick(random, 5000),
      rate: Math.round(100 * (50 + 20 * height + 20 * random())) / 100,
    };
    const coordinates = outlines[id][0].map((ring) => ring.map(([x, y]) => toDegrees(x, y)));
    const geometry = { type: "Polygon", coordinates };
    yield JSON.stringify({ type: "Feature", properties, geometry }) + "\n";
  }
}

/** Points of a lattice of 1,000 units, each moved by up to 0.45 of that; the outermost ring only closes the cells. */
function jitteredLattice(columns: number, rows: number, random: Random): Float64Array {
  return Float64Array.from({ length: 2 * columns * rows }, (_, i) => {
    const cell = Math.floor(i / 2);
    const place = i % 2 === 0 ? cell % columns : Math.floor(cell / columns);
    return 1000 * (place + 0.05 + 0.9 * random());
  });
}

/** 1,000 units are 0.004°: about the 300 m between neighboring city blocks. */
function toDegrees(x: number, y: number): readonly [number, number] {
  const degrees = (units: number) => Math.round(units * 4e-6 * 1e8) / 1e8;
  return [12 + degrees(x), 45 + degrees(y)];
}
