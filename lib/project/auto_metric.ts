/**
 * The plane a layer's distances are measured on when nobody says which.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import type { Ellipsoid } from "./ellipsoid.ts";
import type { Extent } from "./extent.ts";
import type { LocatedLayer } from "./located_layer.ts";
import type { Metric } from "./metric_type.ts";
import { type NamedProjection, ownMetric, projectedMetric } from "./projected_metric.ts";

/** Worst distortion up to which distances count as true. */
const TRUE_ENOUGH = 0.01;

/** Worst distortion up to which a plane is used at all. */
const BEARABLE = 0.1;

/**
 * The layer's own CRS where it is projected and true within 1 %, else the UTM zone of its middle
 * where that is true within 1 %, else Lambert azimuthal equal-area around its middle; the latter
 * two on the layer's own ellipsoid.
 *
 * @throws {UnfitDataError} when even the last is off by more than 10 % somewhere in the extent.
 * Cost: three times a thousand geodesics at most.
 */
export function autoMetric(layer: LocatedLayer): Metric {
  const { projection: { geographic, ellipsoid }, extent: { center } } = layer;
  const own = geographic ? null : ownMetric(layer);
  if (own && isWithin(own, TRUE_ENOUGH)) return own;
  const utm = utmZone(center, ellipsoid);
  const zone = utm && projectedMetric(layer, utm);
  if (zone && isWithin(zone, TRUE_ENOUGH)) return zone;
  const equalArea = projectedMetric(layer, equalAreaAround(center, ellipsoid));
  if (isWithin(equalArea, BEARABLE)) return equalArea;
  throw new UnfitDataError(
    `Cannot lay ${layer.name} flat without distorting some distances by more than ` +
      `${100 * BEARABLE} %; pass --metric geodesic to measure on the ellipsoid`,
  );
}

function isWithin({ worstDistortion }: Metric, limit: number): boolean {
  return worstDistortion !== null && worstDistortion <= limit;
}

/**
 * The zone of the Universal Transverse Mercator grid around a place; null near the poles, where it
 * ends.
 */
function utmZone(
  [longitude, latitude]: Extent["center"],
  ellipsoid: Ellipsoid,
): NamedProjection | null {
  if (latitude < -80 || latitude > 84) return null;
  const zone = Math.min(60, Math.floor((longitude + 180) / 6) + 1);
  const isSouth = latitude < 0;
  const definition = onEllipsoid(`+proj=utm +zone=${zone}${isSouth ? " +south" : ""}`, ellipsoid);
  return { name: `UTM zone ${zone}${isSouth ? "S" : "N"}`, definition, source: definition };
}

function equalAreaAround(
  [longitude, latitude]: Extent["center"],
  ellipsoid: Ellipsoid,
): NamedProjection {
  const lon = Number(longitude.toFixed(2)), lat = Number(latitude.toFixed(2));
  const definition = onEllipsoid(`+proj=laea +lat_0=${lat} +lon_0=${lon}`, ellipsoid);
  const place = `${Math.abs(lat)}° ${lat < 0 ? "S" : "N"}, ${Math.abs(lon)}° ${
    lon < 0 ? "W" : "E"
  }`;
  return { name: `Lambert azimuthal equal-area around ${place}`, definition, source: definition };
}

function onEllipsoid(projection: string, { a, b }: Ellipsoid): string {
  return `${projection} +a=${a} +b=${b} +units=m +no_defs`;
}
