/**
 * What counts as a small gap on a layer.
 *
 * @module
 */
import type { FlatGeometry } from "../layer/geometry.ts";
import type { Scale } from "./area_contacts.ts";

/** A gap is small below this share of an area's width. */
const SHARE = 0.001;

/**
 * The gap below which two boundaries that do not touch are probably meant to: a thousandth of the width of the
 * median area, that is of the root of its box's extent. 50 m between counties, 2 m between city
 * tracts. 0 when no area has a width.
 *
 * @param scale Meters in a unit eastward and northward, at a given y.
 * @returns Meters.
 */
export function smallGap(geometry: FlatGeometry, scale: (y: number) => Scale): number {
  const { kinds, partStarts, ringStarts, vertexStarts, xy } = geometry;
  const widths = new Float64Array(kinds.length);
  for (let area = 0; area < kinds.length; area++) {
    let west = Infinity, south = Infinity, east = -Infinity, north = -Infinity;
    const last = vertexStarts[ringStarts[partStarts[area + 1]]];
    for (let v = vertexStarts[ringStarts[partStarts[area]]]; v < last; v++) {
      west = Math.min(west, xy[2 * v]);
      east = Math.max(east, xy[2 * v]);
      south = Math.min(south, xy[2 * v + 1]);
      north = Math.max(north, xy[2 * v + 1]);
    }
    if (!(east > west)) continue;
    const local = scale((south + north) / 2);
    widths[area] = Math.sqrt((east - west) * local.east * (north - south) * local.north);
  }
  const wide = widths.filter((width) => width > 0).sort();
  return wide.length > 0 ? SHARE * wide[wide.length >> 1] : 0;
}
