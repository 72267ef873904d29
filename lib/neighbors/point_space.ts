/**
 * What can be asked about points, whether they lie in a plane or on an ellipsoid.
 *
 * @module
 */
import type { ConnectingDistances } from "./distances.ts";
import type { NearestLinks } from "./nearest.ts";
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
