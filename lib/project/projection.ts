/**
 * Map projections by proj4, without datum shifts, for whole arrays of coordinates.
 *
 * A shift between datums moves all areas of a layer alike and changes distances by parts per
 * million, but whether proj4 applies one depends on how a CRS happens to be spelled. So none is
 * applied: longitudes and latitudes stay on the ellipsoid of the layer, and what that does to
 * distances is measured with everything else.
 *
 * @module
 */
import proj4 from "proj4";
import type { Ellipsoid } from "./ellipsoid.ts";
import { WGS84 } from "./ellipsoid.ts";
import { completeProj } from "./proj_string.ts";
import { type AxisLayout, readWkt } from "./wkt.ts";

/** A coordinate system that can be turned into longitude and latitude and back. */
export interface Projection {
  /** True where coordinates are degrees of longitude and latitude. */
  readonly geographic: boolean;
  /** What its longitudes and latitudes lie on. */
  readonly ellipsoid: Ellipsoid;
  /** Meters in one unit of its coordinates; 1 for degrees, which are not lengths. */
  readonly metersPerUnit: number;
  /**
   * Coordinates as stored in files (x0, y0, …: east before north whatever order the definition
   * names them in) to longitude and latitude from Greenwich in degrees; NaN where there are none.
   */
  readonly toDegrees: (xy: Float64Array) => Float64Array;
  /**
   * Longitude and latitude in degrees to meters east and north (to degrees, for a geographic
   * system); NaN where there are none.
   */
  readonly toMeters: (degrees: Float64Array) => Float64Array;
}

/** What proj4's projection objects hold beyond their declared type. */
type Proj4 = InstanceType<typeof proj4.Proj> & {
  readonly projName: string;
  readonly a: number;
  readonly b: number;
  readonly units?: string;
  readonly to_meter?: number;
  readonly from_greenwich?: number;
};

/** Axes through the Earth's center, which proj4 may take for longitude and latitude. */
const GEOCENTRIC = /geocentric ?X/i;

/**
 * No place on Earth at all, and one whose standard parallel proj4 drops when it reads WKT version
 * 1.
 */
const MISREAD = new Set(["identity", "Equirectangular"]);

/** Units of angle that longitudes and latitudes may come in, but not here. */
const OTHER_ANGLES = /^(?:grad|gon|radian|arc|mil)/;

const DEGREE = Math.PI / 180;

/**
 * Opens a projection.
 *
 * @param definition WKT (version 1 or 2) or a proj string.
 * @returns Null where the definition is not known, has no place on Earth or no plane, or counts
 * longitude and latitude in another unit than degrees.
 */
export function openProjection(definition: string): Projection | null {
  if (GEOCENTRIC.test(definition)) return null;
  const isWkt = definition.includes("[");
  const { wkt, primeMeridian, layout } = readWkt(definition);
  const proj = parse(isWkt ? wkt : completeProj(definition));
  if (proj === null || MISREAD.has(proj.projName)) return null;
  const ellipsoid = ellipsoidOf(proj);
  if (proj.projName === "longlat") {
    if (OTHER_ANGLES.test(proj.units ?? "")) return null;
    return geographicProjection(ellipsoid, primeMeridian);
  }
  const metersPerUnit = proj.to_meter ?? 1;
  const meridian = isWkt ? primeMeridian : (proj.from_greenwich ?? 0) / DEGREE;
  return {
    geographic: false,
    ellipsoid,
    metersPerUnit,
    toDegrees: (xy) =>
      mapPairs(xy, (x, y) => {
        const [east, north] = fromStored(layout, x * metersPerUnit, y * metersPerUnit);
        const place = proj.inverse({ x: east, y: north });
        return [place.x / DEGREE + meridian, place.y / DEGREE];
      }),
    toMeters: (degrees) =>
      mapPairs(degrees, (longitude, latitude) => {
        const place = proj.forward({ x: (longitude - meridian) * DEGREE, y: latitude * DEGREE });
        return [place.x, place.y];
      }),
  };
}

function fromStored(layout: AxisLayout, x: number, y: number): [east: number, north: number] {
  if (layout === "east north") return [x, y];
  return layout === "west south" ? [-x, -y] : [-y, -x];
}

function parse(definition: string): Proj4 | null {
  try {
    return new proj4.Proj(definition) as Proj4;
  } catch {
    return null; // proj4 throws bare strings of its own; the caller knows what the definition is of
  }
}

function geographicProjection(ellipsoid: Ellipsoid, primeMeridian: number): Projection {
  const shifted = (by: number) => (xy: Float64Array) => mapPairs(xy, (x, y) => [x + by, y]);
  return {
    geographic: true,
    ellipsoid,
    metersPerUnit: 1,
    toDegrees: shifted(primeMeridian),
    toMeters: shifted(-primeMeridian),
  };
}

/** Web Mercator runs latitudes of the WGS 84 ellipsoid through the formulas of a sphere. */
function ellipsoidOf({ projName, a, b }: Proj4): Ellipsoid {
  const isWebMercator = projName === "merc" && a === b && a === WGS84.a;
  return isWebMercator ? WGS84 : { a, b };
}

/**
 * Maps every pair; pairs that proj4 throws on, or for which it gives no finite pair, become NaN.
 */
function mapPairs(
  pairs: Float64Array,
  map: (first: number, second: number) => [number, number],
): Float64Array {
  const mapped = new Float64Array(pairs.length).fill(NaN);
  for (let at = 0; at < pairs.length; at += 2) {
    if (Number.isNaN(pairs[at]) || Number.isNaN(pairs[at + 1])) continue;
    const [first, second] = attempt(map, pairs[at], pairs[at + 1]);
    if (!Number.isFinite(first) || !Number.isFinite(second)) continue;
    mapped[at] = first;
    mapped[at + 1] = second;
  }
  return mapped;
}

function attempt(
  map: (first: number, second: number) => [number, number],
  first: number,
  second: number,
): [number, number] {
  try {
    return map(first, second);
  } catch {
    return [NaN, NaN]; // outside of what the projection can show
  }
}
