/**
 * The rings of a layer as one long run of vertices.
 *
 * @module
 */
import { type FlatGeometry, GEOMETRY_KINDS } from "../layer/geometry.ts";

/** Vertices of all rings, and whose they are. A segment runs from a vertex to the next one of its ring. */
export interface Boundaries {
  /** Number of areas. */
  readonly areas: number;
  /** x and y of each vertex. */
  readonly xy: Float64Array;
  /** Area of each vertex. */
  readonly areaOf: Uint32Array;
  /** 1 at the last vertex of each ring, where no segment starts. */
  readonly ends: Uint8Array;
  /** 1 for each area that has an inside: polygons. */
  readonly solid: Uint8Array;
}

/** Lays out the vertices of a geometry. Cost: one pass. */
export function boundariesOf(geometry: FlatGeometry): Boundaries {
  const { kinds, partStarts, ringStarts, vertexStarts, xy } = geometry;
  const areaOf = new Uint32Array(xy.length / 2);
  const ends = new Uint8Array(xy.length / 2);
  for (let area = 0; area < kinds.length; area++) {
    const firstRing = ringStarts[partStarts[area]], lastRing = ringStarts[partStarts[area + 1]];
    areaOf.fill(area, vertexStarts[firstRing], vertexStarts[lastRing]);
  }
  for (let ring = 1; ring < vertexStarts.length; ring++) {
    if (vertexStarts[ring] > vertexStarts[ring - 1]) ends[vertexStarts[ring] - 1] = 1;
  }
  const polygon = GEOMETRY_KINDS.indexOf("polygon");
  const solid = kinds.map((kind) => kind === polygon ? 1 : 0);
  return { areas: kinds.length, xy, areaOf, ends, solid };
}
