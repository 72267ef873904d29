/**
 * Areas that lie on both sides of the 180th meridian, made whole.
 *
 * @module
 */
import type { FlatGeometry } from "../layer/geometry.ts";

/**
 * Moves longitudes by full turns so that an area cut by the 180th meridian (Fiji, Chukotka) hangs
 * together: its eastern and western pieces then lie side by side, some longitudes beyond ±180. Only
 * features that span more than half a turn as written, and less when moved, are touched; areas that
 * go all round (Antarctica) stay. Gives the same record back where nothing moves. Cost: one pass
 * over the vertices, one copy of them where something moves.
 *
 * @param geometry Longitudes and latitudes in degrees.
 */
export function unwrapLongitudes(geometry: FlatGeometry): FlatGeometry {
  const { kinds, xy } = geometry;
  let moved: Float64Array | null = null;
  for (let row = 0; row < kinds.length; row++) {
    const [from, to] = vertexRange(geometry, row);
    const turn = turnToWhole(xy, from, to);
    if (turn === null) continue;
    moved ??= Float64Array.from(xy);
    for (let v = from; v < to; v++) moved[2 * v] = turn(xy[2 * v]);
  }
  return moved ? { ...geometry, xy: moved } : geometry;
}

/** The same longitude within -180 … 180. */
export function wrapLongitude(longitude: number): number {
  if (longitude >= -180 && longitude <= 180) return longitude;
  return eastOf(longitude + 180) - 180;
}

type Turn = (longitude: number) => number;

/** The same longitude within 0 … 360. */
export function eastOf(longitude: number): number {
  const rest = longitude % 360;
  return rest < 0 ? rest + 360 : Math.abs(rest);
}

/**
 * How to write a feature's longitudes so that they span less than half a turn; null to leave them.
 */
function turnToWhole(xy: Float64Array, from: number, to: number): Turn | null {
  const asWritten = (longitude: number) => longitude;
  if (!(spanOf(xy, from, to, asWritten) > 180)) return null;
  return [eastOf, wrapLongitude].find((turn) => spanOf(xy, from, to, turn) < 180) ?? null;
}

function spanOf(xy: Float64Array, from: number, to: number, turn: Turn): number {
  let west = Infinity, east = -Infinity;
  for (let v = from; v < to; v++) {
    const longitude = turn(xy[2 * v]);
    if (longitude < west) west = longitude;
    if (longitude > east) east = longitude;
  }
  return east - west;
}

function vertexRange(
  { partStarts, ringStarts, vertexStarts }: FlatGeometry,
  row: number,
): [number, number] {
  return [vertexStarts[ringStarts[partStarts[row]]], vertexStarts[ringStarts[partStarts[row + 1]]]];
}
