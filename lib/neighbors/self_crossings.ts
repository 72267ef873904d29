/**
 * Rings that cross themselves: a digitizing error that makes inside and outside unclear.
 *
 * @module
 */
import Flatbush from "flatbush";
import { type FlatGeometry, GEOMETRY_KINDS } from "../layer/geometry.ts";

/** Rings with more segments than this are searched through an R-tree instead of pair by pair. */
const MANY = 64;

/**
 * The polygons of which a ring crosses itself, ascending. Their neighbors are found as those of any other area;
 * it is area and centroid that cannot be trusted. Rings that only touch themselves are not meant, nor rings
 * that cross other rings.
 *
 * Cost: for each ring its segments squared up to 64, n log n beyond.
 */
export function findSelfCrossings(geometry: FlatGeometry): Uint32Array {
  const { kinds, partStarts, ringStarts, vertexStarts, xy } = geometry;
  const polygon = GEOMETRY_KINDS.indexOf("polygon");
  const crossing: number[] = [];
  for (let area = 0; area < kinds.length; area++) {
    if (kinds[area] !== polygon) continue;
    const last = ringStarts[partStarts[area + 1]];
    for (let ring = ringStarts[partStarts[area]]; ring < last; ring++) {
      const points = xy.subarray(2 * vertexStarts[ring], 2 * vertexStarts[ring + 1]);
      if (!crossesItself(points)) continue;
      crossing.push(area);
      break;
    }
  }
  return Uint32Array.from(crossing);
}

function crossesItself(ring: Float64Array): boolean {
  const segments = ring.length / 2 - 1;
  if (segments > MANY) return crossesSomewhere(ring, segments);
  for (let s = 0; s < segments; s++) {
    for (let t = s + 2; t < segments; t++) if (cross(ring, s, t)) return true;
  }
  return false;
}

function crossesSomewhere(ring: Float64Array, segments: number): boolean {
  const tree = new Flatbush(segments);
  const boxOf = (s: number): [number, number, number, number] => [
    Math.min(ring[2 * s], ring[2 * s + 2]),
    Math.min(ring[2 * s + 1], ring[2 * s + 3]),
    Math.max(ring[2 * s], ring[2 * s + 2]),
    Math.max(ring[2 * s + 1], ring[2 * s + 3]),
  ];
  for (let s = 0; s < segments; s++) tree.add(...boxOf(s));
  tree.finish();
  for (let s = 0; s < segments; s++) {
    if (tree.search(...boxOf(s), (t) => t > s + 1 && cross(ring, s, t)).length > 0) return true;
  }
  return false;
}

/** Whether two segments of a ring cross between their ends. */
function cross(ring: Float64Array, s: number, t: number): boolean {
  return side(ring, s, t) * side(ring, s, t + 1) < 0 && side(ring, t, s) * side(ring, t, s + 1) < 0;
}

/** Above 0 where vertex v lies to the left of segment s, below 0 to the right, 0 on its line. */
function side(ring: Float64Array, s: number, v: number): number {
  const ux = ring[2 * s + 2] - ring[2 * s], uy = ring[2 * s + 3] - ring[2 * s + 1];
  return ux * (ring[2 * v + 1] - ring[2 * s + 1]) - uy * (ring[2 * v] - ring[2 * s]);
}
