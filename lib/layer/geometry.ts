/**
 * Geometry of a whole layer in five flat arrays.
 *
 * Areas hold parts, parts hold rings, rings hold vertices. A point is a part of one ring of one vertex; a line is
 * a part of one ring that does not close. The first ring of a polygon part is its outer boundary, the
 * others are holes. Polygon rings repeat their first vertex at the end, as stored.
 *
 * @module
 */

/** What a feature is: `none` for a null or empty geometry. */
export const GEOMETRY_KINDS = ["none", "point", "line", "polygon"] as const;

/** Flat coordinates and offsets of `n` features. */
export interface FlatGeometry {
  /** Kind of each feature as an index into {@link GEOMETRY_KINDS}, length n. */
  readonly kinds: Uint8Array;
  /** First part of each feature, length n + 1. */
  readonly partStarts: Uint32Array;
  /** First ring of each part, length parts + 1. */
  readonly ringStarts: Uint32Array;
  /** First vertex of each ring, length rings + 1. */
  readonly vertexStarts: Uint32Array;
  /** x0, y0, x1, y1, … in the layer's own coordinates, length 2 × vertices. */
  readonly xy: Float64Array;
}

/** Smallest box around coordinates: [west, south, east, north], or null where there are none. */
export type Box = readonly [west: number, south: number, east: number, north: number];

/** Box around all vertices of a geometry; null when it has none. Cost: one pass over the vertices. */
export function boundsOf(geometry: FlatGeometry): Box | null {
  const { xy } = geometry;
  let west = Infinity, south = Infinity, east = -Infinity, north = -Infinity;
  for (let v = 0; v < xy.length; v += 2) {
    if (xy[v] < west) west = xy[v];
    if (xy[v] > east) east = xy[v];
    if (xy[v + 1] < south) south = xy[v + 1];
    if (xy[v + 1] > north) north = xy[v + 1];
  }
  return west <= east ? [west, south, east, north] : null;
}

/**
 * Geometry of some features, in the order of `rows`. All rows in order give the same record back.
 * Cost: one copy of the picked coordinates.
 */
export function pickFeatures(geometry: FlatGeometry, rows: Uint32Array): FlatGeometry {
  const { kinds, partStarts, ringStarts, vertexStarts, xy } = geometry;
  if (rows.length === kinds.length && rows.every((row, at) => row === at)) return geometry;
  const partCount = total(rows, (row) => partStarts[row + 1] - partStarts[row]);
  const ringOf = (row: number) => ringStarts[partStarts[row]];
  const ringCount = total(rows, (row) => ringOf(row + 1) - ringOf(row));
  const vertexOf = (row: number) => vertexStarts[ringOf(row)];
  const vertexCount = total(rows, (row) => vertexOf(row + 1) - vertexOf(row));
  const picked = {
    kinds: new Uint8Array(rows.length),
    partStarts: new Uint32Array(rows.length + 1),
    ringStarts: new Uint32Array(partCount + 1),
    vertexStarts: new Uint32Array(ringCount + 1),
    xy: new Float64Array(2 * vertexCount),
  };
  let part = 0, ring = 0, vertex = 0;
  rows.forEach((row, at) => {
    picked.kinds[at] = kinds[row];
    for (let p = partStarts[row]; p < partStarts[row + 1]; p++) {
      for (let r = ringStarts[p]; r < ringStarts[p + 1]; r++) {
        picked.xy.set(xy.subarray(2 * vertexStarts[r], 2 * vertexStarts[r + 1]), 2 * vertex);
        vertex += vertexStarts[r + 1] - vertexStarts[r];
        picked.vertexStarts[++ring] = vertex;
      }
      picked.ringStarts[++part] = ring;
    }
    picked.partStarts[at + 1] = part;
  });
  return picked;
}

/** Coordinates of each ring of a feature: x0, y0, x1, y1, … These are views, not copies. */
export function ringsOf(geometry: FlatGeometry, row: number): Float64Array[] {
  const { partStarts, ringStarts, vertexStarts, xy } = geometry;
  const first = ringStarts[partStarts[row]];
  const count = ringStarts[partStarts[row + 1]] - first;
  return Array.from(
    { length: count },
    (_, r) => xy.subarray(2 * vertexStarts[first + r], 2 * vertexStarts[first + r + 1]),
  );
}

function total(rows: Uint32Array, of: (row: number) => number): number {
  let sum = 0;
  for (const row of rows) sum += of(row);
  return sum;
}
