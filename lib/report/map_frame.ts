/**
 * From layer coordinates to whole units of a map.
 *
 * @module
 */
import { boundsOf, type Box, type FlatGeometry } from "../layer/geometry.ts";
import type { Crs } from "../layer/layer.ts";
import { fitsGlobe } from "../neighbors/globe.ts";
import { unwrapLongitudes } from "../project/antimeridian.ts";
import { openProjection } from "../project/projection.ts";

/** Units of the map in one unit of the figure. Paths are written in whole map units. */
export const UNITS = 2;

/** Meters in one degree of latitude, on the mean sphere. */
const METERS_PER_DEGREE = 111_195;

/** How a layer is placed on the map. */
export interface MapFrame {
  /** The shapes as drawn, longitudes made whole across the 180th meridian. */
  readonly geometry: FlatGeometry;
  /** Size in figure units. */
  readonly width: number;
  readonly height: number;
  /** Layer units around the globe, 360 for degrees; 0 where the map is flat. */
  readonly turn: number;
  /** x of a layer coordinate in map units, to the right. */
  readonly across: (x: number) => number;
  /** y of a layer coordinate in map units, downward. */
  readonly down: (y: number) => number;
  /** Meters in one figure unit in the middle of the map; null where not known. */
  readonly metersPerUnit: number | null;
}

/** Room that a map may take, in figure units. */
export interface MapRoom {
  readonly width: number;
  readonly height: number;
}

/**
 * Fits all shapes into a room. Projected layers are drawn as they are; longitudes and latitudes are drawn
 * as an equirectangular map that is true in the middle latitude (a degree of longitude is shortened
 * by its cosine), which any reader can follow and which needs no choice of projection.
 *
 * @param room Given the ratio of width to height of the layer.
 * @returns Null where there is nothing to draw.
 */
export function fitMap(
  layer: { readonly geometry: FlatGeometry; readonly crs: Crs | null },
  room: (ratio: number) => MapRoom,
): MapFrame | null {
  const whole = boundsOf(layer.geometry);
  if (whole === null) return null;
  const geographic = layer.crs?.geographic === true && fitsGlobe(whole);
  const geometry = geographic ? joinedAcross180(layer.geometry) : layer.geometry;
  const box = boundsOf(geometry) ?? whole;
  const [west, south, east, north] = withSize(box);
  const squeeze = geographic ? Math.cos((south + north) / 2 * Math.PI / 180) : 1;
  const wide = (east - west) * squeeze, high = north - south;
  const { width, height } = room(wide / high);
  const scale = Math.min(width / wide, height / high);
  const meters = metersPerUnitAt(layer.crs, [(west + east) / 2, (south + north) / 2]);
  return {
    geometry,
    width: wide * scale,
    height: high * scale,
    turn: geographic ? 360 : 0,
    across: (x) => Math.round((x - west) * squeeze * scale * UNITS),
    down: (y) => Math.round((north - y) * scale * UNITS),
    metersPerUnit: meters && meters / scale,
  };
}

/** A box that is at least a little wide and high: a single point, or points in a row, have none. */
function withSize([west, south, east, north]: Box): Box {
  const least = Math.max(east - west, north - south) / 20 || 1;
  const padX = Math.max(0, least - (east - west)) / 2;
  const padY = Math.max(0, least - (north - south)) / 2;
  return [west - padX, south - padY, east + padX, north + padY];
}

/** Shapes on both sides of the 180th meridian side by side, where that makes the layer narrower. */
function joinedAcross180(layer: FlatGeometry): FlatGeometry {
  const geometry = unwrapLongitudes(layer);
  const box = boundsOf(geometry);
  if (box === null || box[2] - box[0] <= 180) return geometry;
  const moved = { ...geometry, xy: turnedEast(geometry) };
  const [west, , east] = boundsOf(moved)!;
  return east - west < box[2] - box[0] ? moved : geometry;
}

/** Coordinates with every feature that begins west of Greenwich moved east by a full turn. */
function turnedEast({ kinds, partStarts, ringStarts, vertexStarts, xy }: FlatGeometry) {
  const moved = Float64Array.from(xy);
  for (let row = 0; row < kinds.length; row++) {
    const from = vertexStarts[ringStarts[partStarts[row]]];
    const to = vertexStarts[ringStarts[partStarts[row + 1]]];
    if (!(xy[2 * from] < 0)) continue;
    for (let v = from; v < to; v++) moved[2 * v] += 360;
  }
  return moved;
}

/** Meters in one unit of the layer (a degree of latitude where it has degrees) at a place. */
function metersPerUnitAt(crs: Crs | null, [x, y]: readonly [number, number]): number | null {
  if (crs === null) return null;
  if (crs.geographic) return METERS_PER_DEGREE;
  const projection = openProjection(crs.wkt);
  if (projection === null) return null;
  // A step of about a kilometer, small enough to be straight and large enough for its digits.
  const step = 500 / projection.metersPerUnit;
  const [lon1, lat1, lon2, lat2] = projection.toDegrees(Float64Array.of(x - step, y, x + step, y));
  const east = (lon2 - lon1) * Math.cos((lat1 + lat2) / 2 * Math.PI / 180);
  const meters = Math.hypot(east, lat2 - lat1) * METERS_PER_DEGREE / (2 * step);
  return meters > 0 ? meters : null;
}
