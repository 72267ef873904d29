/**
 * Points and what distance means between them: a plane, or an ellipsoid.
 *
 * @module
 */
import type { Ellipsoid } from "../project/ellipsoid.ts";
import type { ConnectingDistances } from "./distances.ts";
import { earthSpace } from "./earth_space.ts";
import type { NearestLinks } from "./nearest.ts";
import { planeSpace } from "./plane_space.ts";
import type { PointGraph } from "./rule_tree.ts";
import type { Topology } from "./topology.ts";

/**
 * Every question about distance that rules, weights and diagnostics ask of a list of points. Points without a
 * place are linked with nobody. Lengths are in meters (map units in a plane of such).
 */
export interface PointSpace {
  /** Points that have a place. */
  readonly located: number;
  /** Whether {@link graph} can be asked: the point graphs are defined in a plane only. */
  readonly planar: boolean;
  /** Distance of two points by position; NaN where one has no place. */
  readonly distance: (i: number, j: number) => number;
  /** The rule `nearest:K`. @throws {UnfitDataError} when there are no K others. */
  readonly nearest: (count: number) => NearestLinks;
  /** The rule `within:DIST`. @throws {UnfitDataError} beyond 200 million links. */
  readonly within: (length: number) => Topology;
  /** The rules `triangulated`, `gabriel`, `relative` and `sphere`. @throws {UsageError} where not planar. */
  readonly graph: (kind: PointGraph["kind"]) => Topology;
  /** Distance from each point to its k-th nearest other; NaN without a place, or without k others. */
  readonly toNearest: (k: number) => Float64Array;
  /** Shortest distances with nobody alone and with one component; NaN with fewer than two points. */
  readonly connecting: () => ConnectingDistances;
  /** How many points share their place with another one. */
  readonly countSharing: () => number;
}

/**
 * Opens the space of some points; indexes are made when first asked for.
 *
 * @param points x and y of each, in meters or map units; with an ellipsoid, longitude and latitude in degrees.
 * @param ellipsoid What to measure on; null for the plane.
 */
export function pointSpace(points: Float64Array, ellipsoid: Ellipsoid | null = null): PointSpace {
  return ellipsoid ? earthSpace(points, ellipsoid) : planeSpace(points);
}
