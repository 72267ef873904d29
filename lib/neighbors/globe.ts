/**
 * What longitude and latitude mean for boundaries: where the map meets itself, and how long a degree is.
 *
 * @module
 */
import type { Box } from "../layer/geometry.ts";
import type { Scale } from "./area_contacts.ts";

/**
 * Whether a box can be one of degrees. Files whose format knows only longitude and latitude (GeoJSON) are
 * often written in other units all the same; these have no poles and no seam.
 */
export function fitsGlobe([west, south, east, north]: Box): boolean {
  return west >= -360 && east <= 360 && south >= -90 && north <= 90;
}

/**
 * Coordinates in which places that are one on the globe are equal: the eastern border moves onto the western
 * one where the layer goes all the way around, and every vertex at a pole to one longitude. The same array when
 * nothing moves.
 */
export function globePlaces(xy: Float64Array, box: Box, tolerance: number): Float64Array {
  const [west, south, east, north] = box;
  const around = east - west >= 360 - tolerance;
  if (!around && south > tolerance - 90 && north < 90 - tolerance) return xy;
  const border = west + 360 - tolerance;
  return xy.map((value, at) => {
    if (at % 2 === 1) return value;
    if (Math.abs(xy[at + 1]) >= 90 - tolerance) return west;
    return around && value >= border ? value - 360 : value;
  });
}

/**
 * Meters in a degree of longitude and of latitude on the WGS 84 ellipsoid, to a few centimeters (Snyder 1987, p. 25;
 * series by powers of the eccentricity). At the poles a degree of longitude is taken as a meter, not 0.
 */
export function metersPerDegree(latitude: number): Scale {
  const phi = latitude * Math.PI / 180;
  const east = 111412.84 * Math.cos(phi) - 93.5 * Math.cos(3 * phi) + 0.118 * Math.cos(5 * phi);
  const north = 111132.95 - 559.82 * Math.cos(2 * phi) + 1.175 * Math.cos(4 * phi);
  return { east: Math.max(1, east), north };
}
