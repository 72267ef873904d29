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
