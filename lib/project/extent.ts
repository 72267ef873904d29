/**
 * Where on Earth a layer lies.
 *
 * @module
 */
import { boundsOf, type FlatGeometry } from "../layer/geometry.ts";
import { eastOf, wrapLongitude } from "./antimeridian.ts";
import type { Projection } from "./projection.ts";

/** The extent of a layer on the globe. */
export interface Extent {
  /** Its middle: longitude from Greenwich and latitude in degrees. */
  readonly center: readonly [longitude: number, latitude: number];
  /** Longitude and latitude of a grid of points over it, the corners included; 2 each. */
  readonly grid: Float64Array;
}

/** Grid points along each side. */
const SIDE = 9;

/** Half-degree slots around the Earth, to find the widest empty stretch. */
const SLOTS = 720;

/**
 * Extent of the vertices of a layer as a box in its own coordinates. Longitudes are cut open where
 * the widest empty stretch is, so that a layer across the 180th meridian has a narrow box around
 * itself. Grid points that the projection cannot place are left out.
 *
 * @returns Null where the layer has no vertices, or its middle is no place on Earth.
 * Cost: one to three passes over the vertices.
 */
export function extentOf(geometry: FlatGeometry, projection: Projection): Extent | null {
  const bounds = boundsOf(geometry);
  if (bounds === null) return null;
  const [south, north] = [bounds[1], bounds[3]];
  const [west, east] = projection.geographic
    ? longitudeRange(geometry.xy, bounds[0], bounds[2])
    : [bounds[0], bounds[2]];
  const steps = Array.from({ length: SIDE }, (_, step) => step / (SIDE - 1));
  const pairs = steps.flatMap((up) =>
    steps.flatMap((along) => [west + along * (east - west), south + up * (north - south)])
  );
  const grid = projection.toDegrees(Float64Array.from(pairs));
  const middle = grid.length / 2 - 1;
  const center = [wrapLongitude(grid[middle]), grid[middle + 1]] as const;
  return Number.isNaN(center[0])
    ? null
    : { center, grid: grid.filter((degrees) => !Number.isNaN(degrees)) };
}

/**
 * West and east end of the longitudes, east beyond 180 where they run across the 180th meridian.
 */
function longitudeRange(xy: Float64Array, west: number, east: number): [number, number] {
  if (east - west <= 180) return [west, east];
  const cut = middleOfWidestGap(xy);
  if (cut === null) return [west, east];
  let nearest = Infinity, farthest = -Infinity;
  for (let v = 0; v < xy.length; v += 2) {
    const turned = eastOf(xy[v] - cut);
    if (turned < nearest) nearest = turned;
    if (turned > farthest) farthest = turned;
  }
  return [cut + nearest, cut + farthest];
}

/** A longitude in the middle of the widest stretch without vertices; null where there is none. */
function middleOfWidestGap(xy: Float64Array): number | null {
  const taken = new Uint8Array(SLOTS);
  for (let v = 0; v < xy.length; v += 2) {
    taken[Math.floor(eastOf(xy[v]) * (SLOTS / 360)) % SLOTS] = 1;
  }
  let widest = 0, end = 0, run = 0;
  for (let slot = 0; slot < 2 * SLOTS; slot++) {
    run = taken[slot % SLOTS] ? 0 : run + 1;
    if (run > widest && run <= SLOTS) [widest, end] = [run, slot + 1];
  }
  return widest === 0 ? null : wrapLongitude((end - widest / 2) * 360 / SLOTS);
}
