/**
 * A point that is surely inside an area whose centroid is not.
 *
 * @module
 */
import type { FlatGeometry } from "../layer/geometry.ts";

/**
 * The middle of the widest horizontal run through the area: each part is cut at half its height,
 * and of all runs of all parts that lie inside, the widest one's middle is taken. It prefers the
 * largest part of an archipelago and needs no tolerance; it is not the point farthest from the
 * boundary. Null where no run has a width (a feature without area). Cost: the feature's vertices.
 */
export function insidePoint(geometry: FlatGeometry, row: number): [x: number, y: number] | null {
  const { partStarts } = geometry;
  let widest = 0;
  let point: [number, number] | null = null;
  for (let part = partStarts[row]; part < partStarts[row + 1]; part++) {
    const y = middleHeight(geometry, part);
    const crossings = crossingsAt(geometry, part, y);
    for (let at = 0; at + 1 < crossings.length; at += 2) {
      const width = crossings[at + 1] - crossings[at];
      if (!(width > widest)) continue;
      widest = width;
      point = [crossings[at] + width / 2, y];
    }
  }
  return point;
}

/** Half-way between the lowest and the highest vertex of a part's outer ring. */
function middleHeight({ ringStarts, vertexStarts, xy }: FlatGeometry, part: number): number {
  const outer = ringStarts[part];
  let south = Infinity, north = -Infinity;
  for (let v = vertexStarts[outer]; v < vertexStarts[outer + 1]; v++) {
    south = Math.min(south, xy[2 * v + 1]);
    north = Math.max(north, xy[2 * v + 1]);
  }
  return south + (north - south) / 2;
}

/**
 * Where the rings of a part cross the height `y`, ascending; between 1st and 2nd, 3rd and 4th …
 * lies the inside.
 */
function crossingsAt(
  { ringStarts, vertexStarts, xy }: FlatGeometry,
  part: number,
  y: number,
): number[] {
  const crossings: number[] = [];
  for (let ring = ringStarts[part]; ring < ringStarts[part + 1]; ring++) {
    for (let v = vertexStarts[ring] + 1; v < vertexStarts[ring + 1]; v++) {
      const ay = xy[2 * v - 1], by = xy[2 * v + 1];
      if ((ay > y) === (by > y)) continue;
      const ax = xy[2 * v - 2], bx = xy[2 * v];
      crossings.push(ax + ((y - ay) / (by - ay)) * (bx - ax));
    }
  }
  return crossings.sort((a, b) => a - b);
}
