/**
 * Choosing what distance means between points: a plane, or an ellipsoid.
 *
 * @module
 */
import type { Ellipsoid } from "../project/ellipsoid.ts";
import { earthSpace } from "./earth_space.ts";
import { planeSpace } from "./plane_space.ts";
import type { PointSpace } from "./point_space.ts";

/**
 * Opens the space of some points; indexes are made when first asked for.
 *
 * @param points x and y of each, in meters or map units; with an ellipsoid, longitude and latitude in degrees.
 * @param ellipsoid What to measure on; null for the plane.
 */
export function openSpace(points: Float64Array, ellipsoid: Ellipsoid | null = null): PointSpace {
  return ellipsoid ? earthSpace(points, ellipsoid) : planeSpace(points);
}
