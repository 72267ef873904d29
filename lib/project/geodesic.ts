/**
 * Distances on the ellipsoid: what `--metric geodesic` measures, and what projections are measured
 * against.
 *
 * @module
 */
import geographiclib from "geographiclib-geodesic";
import type { Ellipsoid } from "./ellipsoid.ts";

const { Geodesic } = geographiclib;

/** Longitude and latitude in degrees. */
export type Place = readonly [longitude: number, latitude: number];

/** The two problems of geodesy on one ellipsoid. */
export interface GeodesicSolver {
  /** Length of the shortest line between two places in meters (the inverse problem). */
  readonly distance: (from: Place, to: Place) => number;
  /**
   * Where one comes out after `meters` in direction `azimuth`, degrees from north (the direct
   * problem).
   */
  readonly destination: (from: Place, azimuth: number, meters: number) => Place;
}

/**
 * Solves geodesics on an ellipsoid by the method of Karney 2013 (J. Geod. 87:43), good to
 * nanometers. Cost: about 2 µs a distance.
 */
export function openGeodesic({ a, b }: Ellipsoid): GeodesicSolver {
  const solver = new Geodesic.Geodesic(a, (a - b) / a);
  return {
    distance: ([lon1, lat1], [lon2, lat2]) =>
      solver.Inverse(lat1, lon1, lat2, lon2, Geodesic.DISTANCE).s12 ?? NaN,
    destination: ([longitude, latitude], azimuth, meters) => {
      const mask = Geodesic.LATITUDE | Geodesic.LONGITUDE;
      const { lon2 = NaN, lat2 = NaN } = solver.Direct(latitude, longitude, azimuth, meters, mask);
      return [lon2, lat2];
    },
  };
}

/**
 * Distance between points on the ellipsoid by their positions, rounded to 1e-6 m so that ties are
 * ties in every JavaScript engine.
 *
 * @param degrees Longitude and latitude of each point, 2 each, as a geodesic metric's `project`
 * gives them.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * import { WGS84 } from "./ellipsoid.ts";
 * const degrees = Float64Array.of(-6.26, 53.35, 31.23, 30.04); // Dublin, Cairo
 * assert.equal(Math.round(geodesicDistance(degrees, WGS84)(0, 1)), 3978364);
 * ```
 */
export function geodesicDistance(
  degrees: Float64Array,
  ellipsoid: Ellipsoid,
): (i: number, j: number) => number {
  const { distance } = openGeodesic(ellipsoid);
  const placeOf = (i: number): Place => [degrees[2 * i], degrees[2 * i + 1]];
  return (i, j) => Math.round(distance(placeOf(i), placeOf(j)) * 1e6) / 1e6;
}

/**
 * Points of the surface in space: x, y, z in meters from the Earth's center, 3 each. For finding
 * candidates with a tree in three dimensions: the straight line through the Earth is never longer
 * than the geodesic, so all points within a geodesic distance D are among those whose straight line
 * is at most D; and the k nearest are among those no farther in a straight line than the k-th
 * shortest geodesic found so far. The order of the straight lines themselves is close to that of
 * the geodesics but not the same.
 *
 * @param degrees Longitude and latitude of each point, 2 each. Cost: one pass.
 */
export function earthCentered(degrees: Float64Array, { a, b }: Ellipsoid): Float64Array {
  const squashed = (b / a) * (b / a);
  const xyz = new Float64Array(degrees.length / 2 * 3);
  for (let i = 0; i < degrees.length / 2; i++) {
    const longitude = degrees[2 * i] * Math.PI / 180, latitude = degrees[2 * i + 1] * Math.PI / 180;
    const sin = Math.sin(latitude), cos = Math.cos(latitude);
    const normal = a / Math.sqrt(cos * cos + squashed * sin * sin);
    xyz[3 * i] = normal * cos * Math.cos(longitude);
    xyz[3 * i + 1] = normal * cos * Math.sin(longitude);
    xyz[3 * i + 2] = normal * squashed * sin;
  }
  return xyz;
}
