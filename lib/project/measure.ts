/**
 * Planar area, perimeter and centroid of the features of a layer, in its own coordinates.
 *
 * Each ring is measured from its own first vertex, so that nothing is lost where coordinates are
 * large and areas small. Outer rings count as positive and holes as negative whatever way they run.
 * Parts that overlap count twice.
 *
 * @module
 */
import { type FlatGeometry, GEOMETRY_KINDS } from "../layer/geometry.ts";

const LINE = GEOMETRY_KINDS.indexOf("line");
const POLYGON = GEOMETRY_KINDS.indexOf("polygon");

/** Below this share of perimeter² a polygon has no area that rounding has not made. */
const NO_AREA = 1e-14;

/**
 * Area of a polygon feature, holes taken out; 0 for points, lines and empty features. Cost: its
 * vertices.
 */
export function areaOf(geometry: FlatGeometry, row: number): number {
  if (geometry.kinds[row] !== POLYGON) return 0;
  let area = 0;
  forRings(geometry, row, (from, to, sign) => area += sign * ringMoments(geometry.xy, from, to)[0]);
  return area;
}

/**
 * Length of all boundaries of a feature, holes included: the perimeter of a polygon, the length of
 * a line, 0 for points. Cost: its vertices.
 */
export function perimeterOf(geometry: FlatGeometry, row: number): number {
  let length = 0;
  forRings(geometry, row, (from, to) => length += ringLength(geometry.xy, from, to));
  return length;
}

/**
 * Center of mass of a feature as `[x, y]`: of its area for a polygon (parts weighted by area, holes
 * taken out), of its length for a line, of its vertices for points. A polygon without area or a
 * line without length gets the mean of its vertices; an empty feature `[NaN, NaN]`. The centroid of
 * a crescent or an archipelago may lie outside of it. Cost: its vertices.
 */
export function centroidOf(geometry: FlatGeometry, row: number): [x: number, y: number] {
  const kind = geometry.kinds[row];
  if (kind === POLYGON) return areaCentroid(geometry, row) ?? vertexMean(geometry, row);
  if (kind === LINE) return lengthCentroid(geometry, row) ?? vertexMean(geometry, row);
  return vertexMean(geometry, row);
}

type RingVisit = (from: number, to: number, sign: 1 | -1) => void;

/** Calls `visit` with the vertex range of each ring, sign -1 for the holes of polygons. */
function forRings(
  { kinds, partStarts, ringStarts, vertexStarts }: FlatGeometry,
  row: number,
  visit: RingVisit,
) {
  const holes = kinds[row] === POLYGON ? -1 : 1;
  for (let part = partStarts[row]; part < partStarts[row + 1]; part++) {
    for (let ring = ringStarts[part]; ring < ringStarts[part + 1]; ring++) {
      visit(vertexStarts[ring], vertexStarts[ring + 1], ring === ringStarts[part] ? 1 : holes);
    }
  }
}

/** Unsigned area of a ring and its centroid relative to the ring's first vertex. */
function ringMoments(
  xy: Float64Array,
  from: number,
  to: number,
): [area: number, dx: number, dy: number] {
  const x0 = xy[2 * from], y0 = xy[2 * from + 1];
  let twice = 0, momentX = 0, momentY = 0;
  let ax = 0, ay = 0;
  for (let v = from + 1; v < to; v++) {
    const bx = xy[2 * v] - x0, by = xy[2 * v + 1] - y0;
    const cross = ax * by - bx * ay;
    twice += cross;
    momentX += cross * (ax + bx);
    momentY += cross * (ay + by);
    ax = bx;
    ay = by;
  }
  if (twice === 0) return [0, 0, 0];
  return [Math.abs(twice) / 2, momentX / (3 * twice), momentY / (3 * twice)];
}

function ringLength(xy: Float64Array, from: number, to: number): number {
  let length = 0;
  for (let v = from + 1; v < to; v++) length += segmentLength(xy, v);
  return length;
}

/**
 * Distance from the vertex before `v` to `v`; `Math.hypot` is not the same to the last bit
 * everywhere.
 */
function segmentLength(xy: Float64Array, v: number): number {
  const dx = xy[2 * v] - xy[2 * v - 2], dy = xy[2 * v + 1] - xy[2 * v - 1];
  return Math.sqrt(dx * dx + dy * dy);
}

function areaCentroid(geometry: FlatGeometry, row: number): [number, number] | null {
  const { xy } = geometry;
  const [originX, originY] = firstVertex(geometry, row);
  let area = 0, momentX = 0, momentY = 0, perimeter = 0;
  forRings(geometry, row, (from, to, sign) => {
    const [ringArea, dx, dy] = ringMoments(xy, from, to);
    area += sign * ringArea;
    momentX += sign * ringArea * (dx + (xy[2 * from] - originX));
    momentY += sign * ringArea * (dy + (xy[2 * from + 1] - originY));
    perimeter += ringLength(xy, from, to);
  });
  if (!(area > NO_AREA * perimeter * perimeter)) return null;
  return [originX + momentX / area, originY + momentY / area];
}

function lengthCentroid(geometry: FlatGeometry, row: number): [number, number] | null {
  const { xy } = geometry;
  const [originX, originY] = firstVertex(geometry, row);
  let length = 0, momentX = 0, momentY = 0;
  forRings(geometry, row, (from, to) => {
    for (let v = from + 1; v < to; v++) {
      const step = segmentLength(xy, v);
      length += step;
      momentX += step * ((xy[2 * v - 2] - originX) + (xy[2 * v] - originX)) / 2;
      momentY += step * ((xy[2 * v - 1] - originY) + (xy[2 * v + 1] - originY)) / 2;
    }
  });
  return length > 0 ? [originX + momentX / length, originY + momentY / length] : null;
}

/** Mean of the vertices; the vertex that closes a ring is not counted again. */
function vertexMean(geometry: FlatGeometry, row: number): [number, number] {
  const { xy } = geometry;
  const [originX, originY] = firstVertex(geometry, row);
  let count = 0, sumX = 0, sumY = 0;
  forRings(geometry, row, (from, to) => {
    const end = to - from > 1 && isClosed(xy, from, to) ? to - 1 : to;
    for (let v = from; v < end; v++) {
      sumX += xy[2 * v] - originX;
      sumY += xy[2 * v + 1] - originY;
    }
    count += end - from;
  });
  return count > 0 ? [originX + sumX / count, originY + sumY / count] : [NaN, NaN];
}

function isClosed(xy: Float64Array, from: number, to: number): boolean {
  return xy[2 * from] === xy[2 * to - 2] && xy[2 * from + 1] === xy[2 * to - 1];
}

function firstVertex(
  { partStarts, ringStarts, vertexStarts, xy }: FlatGeometry,
  row: number,
): [number, number] {
  const v = vertexStarts[ringStarts[partStarts[row]]];
  return [xy[2 * v], xy[2 * v + 1]];
}
