/**
 * Distances on coordinates as they are stored.
 *
 * @module
 */
import { boundsOf } from "../layer/geometry.ts";
import { worstDistortion } from "./distortion.ts";
import { extentOf } from "./extent.ts";
import type { MetricLayer } from "./located_layer.ts";
import type { Metric } from "./metric_type.ts";
import { openProjection } from "./projection.ts";
import { roundAll } from "./round_all.ts";

/** Digits that are kept of the largest coordinate when its unit is not known. */
const KEPT_DIGITS = 12;

/**
 * Straight lines on the layer's own coordinates. Where the layer declares a projected CRS they are
 * turned into meters, so that `within:5km` means what it says, and their distortion is stated.
 * Else, degrees included, they stay what they are: map units. Never refuses a layer. Cost: a pass
 * over the vertices.
 */
export function planarMetric(layer: MetricLayer): Metric {
  const projection = layer.crs && openProjection(layer.crs.wkt);
  const metersPerUnit = projection && !projection.geographic ? projection.metersPerUnit : null;
  const extent = metersPerUnit && projection ? extentOf(layer.geometry, projection) : null;
  const digits = metersPerUnit === null ? digitsFor(layer) : 6;
  return {
    kind: "planar",
    name: "coordinates as stored",
    definition: "planar",
    unit: metersPerUnit === null ? "map units" : "m",
    worstDistortion: extent && projection &&
      worstDistortion(extent, projection.ellipsoid, projection.toMeters),
    ellipsoid: null,
    project: (xy) => roundAll(xy.map((coordinate) => coordinate * (metersPerUnit ?? 1)), digits),
  };
}

/**
 * Digits after the decimal point that keep {@link KEPT_DIGITS} of the layer's largest coordinate.
 */
function digitsFor({ geometry }: MetricLayer): number {
  const bounds = boundsOf(geometry) ?? [];
  const largest = Math.max(0, ...bounds.map(Math.abs));
  const exponent = Number(largest.toExponential().split("e")[1]);
  return KEPT_DIGITS - 1 - exponent;
}
