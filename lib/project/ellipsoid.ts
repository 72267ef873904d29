/**
 * The figure of the Earth that a CRS uses.
 *
 * @module
 */

/** An ellipsoid of revolution by its semi-axes in meters; a sphere has `a === b`. */
export interface Ellipsoid {
  /** Equatorial. */
  readonly a: number;
  /** Polar. */
  readonly b: number;
}

/** The ellipsoid of the World Geodetic System 1984. */
export const WGS84: Ellipsoid = { a: 6378137, b: 6378137 * (1 - 1 / 298.257223563) };
