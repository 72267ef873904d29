/**
 * Distances on a map projection.
 *
 * @module
 */
import { UnfitDataError, UsageError } from "../layer/errors.ts";
import { worstDistortion } from "./distortion.ts";
import type { LocatedLayer } from "./located_layer.ts";
import type { Metric } from "./metric_type.ts";
import { openProjection } from "./projection.ts";
import { roundAll } from "./round_all.ts";

/** A projection with its names. */
export interface NamedProjection {
  /** For people. */
  readonly name: string;
  /** What goes on record. */
  readonly definition: string;
  /** What is opened: WKT or a proj string. */
  readonly source: string;
}

/** Digits after the decimal point to which meters are rounded. */
const MICROMETERS = 6;

/**
 * Distances on another projection than the layer's own.
 *
 * @throws {UsageError} when `target` cannot be opened or is in degrees. Cost: a thousand geodesics.
 */
export function projectedMetric(layer: LocatedLayer, target: NamedProjection): Metric {
  const { projection, extent } = layer;
  const plane = openProjection(target.source);
  if (plane === null || plane.geographic) {
    throw new UsageError(
      `Cannot measure distances in ${target.name}, which ${
        plane === null ? "is not understood here" : "is in degrees"
      }; choose a projected system such as EPSG:32632, a proj string such as ` +
        `"+proj=utm +zone=32", or --metric geodesic`,
    );
  }
  return {
    kind: "projected",
    name: target.name,
    definition: target.definition,
    unit: "m",
    worstDistortion: worstDistortion(extent, projection.ellipsoid, plane.toMeters),
    ellipsoid: null,
    project: (xy) => {
      const meters = plane.toMeters(projection.toDegrees(xy));
      checkPlaced(xy, meters, layer.name, target.name);
      return roundAll(meters, MICROMETERS);
    },
  };
}

/** Distances in the layer's own projected CRS, turned into meters. Cost: a thousand geodesics. */
export function ownMetric({ crs, projection, extent }: LocatedLayer): Metric {
  const { metersPerUnit, ellipsoid, toMeters } = projection;
  return {
    kind: "projected",
    name: crs.name,
    definition: crs.code ?? crs.wkt,
    unit: "m",
    worstDistortion: worstDistortion(extent, ellipsoid, toMeters),
    ellipsoid: null,
    project: (xy) => roundAll(xy.map((coordinate) => coordinate * metersPerUnit), MICROMETERS),
  };
}

/**
 * Makes sure that every point with coordinates got a place.
 *
 * @throws {UnfitDataError} naming the first that did not.
 */
export function checkPlaced(
  xy: Float64Array,
  placed: Float64Array,
  layer: string,
  target: string,
): void {
  const fault = placed.findIndex((coordinate, at) =>
    Number.isNaN(coordinate) && !Number.isNaN(xy[at])
  );
  if (fault < 0) return;
  const at = fault - fault % 2;
  throw new UnfitDataError(
    `Cannot place the point ${xy[at]}, ${xy[at + 1]} of ${layer} in ${target}; ` +
      "choose another --metric, or leave the area out",
  );
}
