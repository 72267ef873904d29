/**
 * One point for each area, from which distances are measured.
 *
 * @module
 */
import { type FlatGeometry, GEOMETRY_KINDS } from "../layer/geometry.ts";
import { unwrapLongitudes, wrapLongitude } from "./antimeridian.ts";
import { insidePoint } from "./inside_point.ts";
import { centroidOf } from "./measure.ts";
import { pointInArea } from "./point_in_area.ts";

const POLYGON = GEOMETRY_KINDS.indexOf("polygon");

/** Options of {@link representativePoints}. */
export interface PointsOptions {
  /**
   * Whether coordinates are degrees, so that areas across the 180th meridian are made whole first.
   * @default false
   */
  readonly geographic?: boolean;
}

/**
 * The point that stands for each feature: the centroid of a polygon (all parts weighted by area,
 * holes taken out) or, where that falls outside of it, the middle of its widest horizontal run; the
 * length-weighted middle of a line; the mean of points. Polygons without area and lines without
 * length take the mean of their vertices.
 *
 * @returns x0, y0, x1, y1, … in the layer's own coordinates, length 2n; NaN for features without
 * geometry. Cost: a few passes over the vertices.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const square = {
 *   kinds: Uint8Array.of(3),
 *   partStarts: Uint32Array.of(0, 1),
 *   ringStarts: Uint32Array.of(0, 1),
 *   vertexStarts: Uint32Array.of(0, 5),
 *   xy: Float64Array.of(0, 0, 2, 0, 2, 2, 0, 2, 0, 0),
 * };
 * assert.deepEqual(representativePoints(square), Float64Array.of(1, 1));
 * ```
 */
export function representativePoints(
  geometry: FlatGeometry,
  { geographic = false }: PointsOptions = {},
): Float64Array {
  const whole = geographic ? unwrapLongitudes(geometry) : geometry;
  const count = whole.kinds.length;
  const points = new Float64Array(2 * count);
  for (let row = 0; row < count; row++) {
    const [x, y] = representativePoint(whole, row);
    points[2 * row] = geographic ? wrapLongitude(x) : x;
    points[2 * row + 1] = y;
  }
  return points;
}

function representativePoint(geometry: FlatGeometry, row: number): readonly [number, number] {
  const centroid = centroidOf(geometry, row);
  if (geometry.kinds[row] !== POLYGON || pointInArea(geometry, row, centroid)) return centroid;
  return insidePoint(geometry, row) ?? centroid;
}
