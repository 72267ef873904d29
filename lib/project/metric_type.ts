/**
 * What a metric is, whichever way it was chosen.
 *
 * @module
 */
import type { Ellipsoid } from "./ellipsoid.ts";

/** A way to measure distances between points of a layer. */
export interface Metric {
  /**
   * `planar`: straight lines on the coordinates as stored; `projected`: straight lines on a map
   * projection; `geodesic`: shortest lines on the ellipsoid (`project` gives longitude and
   * latitude, `geodesicDistance` measures).
   */
  readonly kind: "planar" | "projected" | "geodesic";
  /** For people, such as `WGS 84 / UTM zone 17N`. */
  readonly name: string;
  /** What it can be rebuilt from: a code, a proj string or WKT. */
  readonly definition: string;
  /**
   * Unit of distances. Lengths in rules count as meters, so with map units `within:5km` reaches
   * 5000 of them.
   */
  readonly unit: "m" | "map units";
  /**
   * Worst relative error of a distance over the extent (0.01 = 1 %); null where the place of the
   * layer on Earth is not known.
   */
  readonly worstDistortion: number | null;
  /** The ellipsoid to measure on where `kind` is `geodesic`, else null. */
  readonly ellipsoid: Ellipsoid | null;
  /**
   * Turns points in the layer's own coordinates (x0, y0, …) into those that distances are measured
   * between: meters rounded to 1e-6, map units rounded at the 12th digit of the largest, or degrees
   * rounded to 1e-11. NaN stays NaN.
   *
   * @throws {UnfitDataError} naming a point that has no place there.
   */
  readonly project: (xy: Float64Array) => Float64Array;
}
