/**
 * Shapes of areas as path data.
 *
 * @module
 */
import { GEOMETRY_KINDS } from "../layer/geometry.ts";
import type { AreaClass } from "../write/results.ts";
import type { MapFrame } from "./map_frame.ts";
import { markCorners } from "./map_marks.ts";
import type { RelativePath } from "./relative_path.ts";

/** What a path shows. */
export interface ShapeStyle {
  readonly name: AreaClass;
  /** Size of point marks, in map units. */
  readonly radius: number;
}

/**
 * Adds a feature to a path: polygons as rings, lines as lines, each vertex of a point feature as a mark of the class.
 * Vertices that fall on the unit of the vertex before, or go straight on, are dropped; what is too
 * small to see leaves a dot. Cost: the feature's vertices.
 */
export function addShape(
  path: RelativePath,
  frame: MapFrame,
  row: number,
  style: ShapeStyle,
): void {
  const kind = GEOMETRY_KINDS[frame.geometry.kinds[row]];
  if (kind === "polygon") addPolygon(path, frame, row);
  else if (kind === "line") addLine(path, frame, row);
  else if (kind === "point") addMarks(path, frame, row, style);
}

/** Outer rings run one way and holes the other, so that areas that overlap stay filled. */
function addPolygon(path: RelativePath, frame: MapFrame, row: number): void {
  const { partStarts, ringStarts } = frame.geometry;
  for (let part = partStarts[row]; part < partStarts[row + 1]; part++) {
    for (let ring = ringStarts[part]; ring < ringStarts[part + 1]; ring++) {
      const isOuter = ring === ringStarts[part];
      const points = unclosed(mapPoints(frame, ring));
      const area = twiceArea(points);
      if (area !== 0) path.ring(area > 0 === isOuter ? points : reversed(points));
      else if (isOuter) path.dot(points[0], points[1]);
    }
  }
}

function addLine(path: RelativePath, frame: MapFrame, row: number): void {
  const { partStarts, ringStarts } = frame.geometry;
  for (let part = partStarts[row]; part < partStarts[row + 1]; part++) {
    const points = mapPoints(frame, ringStarts[part]);
    if (points.length > 2) path.line(points);
    else path.dot(points[0], points[1]);
  }
}

function addMarks(path: RelativePath, frame: MapFrame, row: number, style: ShapeStyle): void {
  const { partStarts, ringStarts } = frame.geometry;
  const corners = markCorners(style.name, style.radius);
  for (let part = partStarts[row]; part < partStarts[row + 1]; part++) {
    const [x, y] = mapPoints(frame, ringStarts[part]);
    path.ring(corners.map((offset, i) => offset + (i % 2 === 0 ? x : y)));
  }
}

/** Vertices of a ring in map units without needless ones. */
function mapPoints({ geometry, across, down }: MapFrame, ring: number): number[] {
  const { vertexStarts, xy } = geometry;
  const points: number[] = [];
  for (let v = vertexStarts[ring]; v < vertexStarts[ring + 1]; v++) {
    const x = across(xy[2 * v]), y = down(xy[2 * v + 1]);
    const end = points.length;
    if (end > 0 && points[end - 2] === x && points[end - 1] === y) continue;
    if (end > 2 && goesStraightOn(points, x, y)) points.length = end - 2;
    points.push(x, y);
  }
  return points;
}

/** Whether a step to (x, y) continues the last step in the same direction. */
function goesStraightOn(points: readonly number[], x: number, y: number): boolean {
  const end = points.length;
  const dx1 = points[end - 2] - points[end - 4], dy1 = points[end - 1] - points[end - 3];
  const dx2 = x - points[end - 2], dy2 = y - points[end - 1];
  return dx1 * dy2 === dy1 * dx2 && dx1 * dx2 + dy1 * dy2 > 0;
}

/** A ring without the repetition of its first point at the end. */
function unclosed(points: number[]): number[] {
  const end = points.length;
  const closes = end > 2 && points[0] === points[end - 2] && points[1] === points[end - 1];
  return closes ? points.slice(0, end - 2) : points;
}

/** Twice the signed area; 0 for rings that collapsed. */
function twiceArea(points: readonly number[]): number {
  let sum = 0;
  for (let i = 0, before = points.length - 2; i < points.length; before = i, i += 2) {
    sum += points[before] * points[i + 1] - points[i] * points[before + 1];
  }
  return sum;
}

function reversed(points: readonly number[]): number[] {
  const back: number[] = [];
  for (let i = points.length - 2; i >= 0; i -= 2) back.push(points[i], points[i + 1]);
  return back;
}
