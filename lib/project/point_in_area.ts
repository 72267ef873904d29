/**
 * Whether a point lies in an area.
 *
 * @module
 */
import type { FlatGeometry } from "../layer/geometry.ts";

/**
 * True when (x, y) lies in any part of the polygon feature `row` and in none of that part's holes,
 * by the even-odd rule within each part (Shimrat 1962). A point exactly on a boundary may count
 * either way, but of areas that tile the plane exactly one takes it. Cost: the feature's vertices.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const triangle = {
 *   kinds: Uint8Array.of(3),
 *   partStarts: Uint32Array.of(0, 1),
 *   ringStarts: Uint32Array.of(0, 1),
 *   vertexStarts: Uint32Array.of(0, 4),
 *   xy: Float64Array.of(0, 0, 4, 0, 0, 4, 0, 0),
 * };
 * assert.equal(pointInArea(triangle, 0, [1, 1]), true);
 * assert.equal(pointInArea(triangle, 0, [3, 3]), false);
 * ```
 */
export function pointInArea(
  geometry: FlatGeometry,
  row: number,
  [x, y]: readonly [x: number, y: number],
): boolean {
  const { partStarts, ringStarts, vertexStarts, xy } = geometry;
  for (let part = partStarts[row]; part < partStarts[row + 1]; part++) {
    let inside = false;
    for (let ring = ringStarts[part]; ring < ringStarts[part + 1]; ring++) {
      if (crossesOddly(xy, vertexStarts[ring], vertexStarts[ring + 1], x, y)) inside = !inside;
    }
    if (inside) return true;
  }
  return false;
}

/** Whether a ray from (x, y) to the right meets a ring an odd number of times. */
function crossesOddly(xy: Float64Array, from: number, to: number, x: number, y: number): boolean {
  let odd = false;
  for (let v = from + 1; v < to; v++) {
    const ay = xy[2 * v - 1], by = xy[2 * v + 1];
    if ((ay > y) === (by > y)) continue;
    const ax = xy[2 * v - 2], bx = xy[2 * v];
    if (x < ax + ((y - ay) / (by - ay)) * (bx - ax)) odd = !odd;
  }
  return odd;
}
