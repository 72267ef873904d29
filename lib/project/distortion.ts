/**
 * How far distances on a map are from distances on the ground.
 *
 * @module
 */
import type { Ellipsoid } from "./ellipsoid.ts";
import type { Extent } from "./extent.ts";
import { openGeodesic } from "./geodesic.ts";

/**
 * Directions in which the scale is measured, degrees from north; the opposite ones have the same
 * scale.
 */
const AZIMUTHS = [0, 22.5, 45, 67.5, 90, 112.5, 135, 157.5];

/** Meters of a step short enough to measure the scale at a point. */
const STEP = 1000;

/**
 * Worst relative error of distances in a projection over an extent: at each grid point, of steps of
 * 1 km in eight directions and of the way to the middle of the extent, each against the geodesic on
 * the ellipsoid. 0.01 means that distances are true within 1 %. Longer distances are sums of short
 * ones, so they are off by no more, as far as a grid can tell.
 *
 * @param toMeters Longitude and latitude in degrees to meters in the plane.
 * @returns 0 or more, rounded to 1e-6 so that engines agree; Infinity where the projection cannot
 * show some of the extent.
 */
export function worstDistortion(
  extent: Extent,
  ellipsoid: Ellipsoid,
  toMeters: (degrees: Float64Array) => Float64Array,
): number {
  const { lines, lengths } = testLines(extent, ellipsoid);
  const ends = toMeters(lines);
  let worst = 0;
  for (let line = 0; line < lengths.length; line++) {
    const dx = ends[4 * line + 2] - ends[4 * line], dy = ends[4 * line + 3] - ends[4 * line + 1];
    const error = Math.abs(Math.sqrt(dx * dx + dy * dy) / lengths[line] - 1);
    worst = Math.max(worst, Number.isNaN(error) ? Infinity : error);
  }
  return Math.round(worst * 1e6) / 1e6;
}

/** Lines as longitude and latitude of both ends, 4 numbers each, with their lengths in meters. */
function testLines(
  { grid, center }: Extent,
  ellipsoid: Ellipsoid,
): { lines: Float64Array; lengths: number[] } {
  const { distance, destination } = openGeodesic(ellipsoid);
  const lines: number[] = [];
  const lengths: number[] = [];
  for (let at = 0; at < grid.length; at += 2) {
    const from = [grid[at], grid[at + 1]] as const;
    for (const azimuth of AZIMUTHS) {
      lines.push(...from, ...destination(from, azimuth, STEP));
      lengths.push(STEP);
    }
    const toCenter = distance(from, center);
    if (toCenter < STEP) continue;
    lines.push(...from, ...center);
    lengths.push(toCenter);
  }
  return { lines: Float64Array.from(lines), lengths };
}
