/**
 * Distances along the shortest lines on the ellipsoid.
 *
 * @module
 */
import { wrapLongitude } from "./antimeridian.ts";
import type { LocatedLayer } from "./located_layer.ts";
import type { Metric } from "./metric_type.ts";
import { checkPlaced } from "./projected_metric.ts";
import { roundAll } from "./round_all.ts";

/** Digits after the decimal point of a degree: about a micrometer on the ground. */
const KEPT_DIGITS = 11;

/**
 * The metric without distortion: `project` gives longitude (-180 … 180) and latitude in degrees,
 * and `geodesicDistance` measures between them on the layer's own ellipsoid.
 */
export function geodesicMetric({ name, crs, projection }: LocatedLayer): Metric {
  const { ellipsoid, toDegrees } = projection;
  return {
    kind: "geodesic",
    name: `geodesics on the ellipsoid of ${crs.name}`,
    definition: `geodesic +a=${ellipsoid.a} +b=${ellipsoid.b}`,
    unit: "m",
    worstDistortion: 0,
    ellipsoid,
    project: (xy) => {
      const degrees = toDegrees(xy);
      checkPlaced(xy, degrees, name, "longitude and latitude");
      const wrapped = degrees.map((angle, at) => at % 2 === 0 ? wrapLongitude(angle) : angle);
      return roundAll(wrapped, KEPT_DIGITS);
    },
  };
}
