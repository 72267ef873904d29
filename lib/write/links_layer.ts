/**
 * The neighbor links as lines, so that a person can look at who counts as whose neighbor.
 *
 * @module
 */
import { encodeFgbHeader, fgbCrs, newFgbColumn } from "../layer/fgb_header.ts";
import { viewOf } from "../layer/flat_table.ts";
import { type FlatGeometry, GEOMETRY_KINDS } from "../layer/geometry.ts";
import type { ColumnValues, Crs } from "../layer/layer.ts";
import { blockPosition, PROPERTIES_AT, writeFront } from "./feature_front.ts";
import { type PropertyEncoder, propertyEncoder } from "./property_encoder.ts";
import type { LinkTable } from "./results.ts";
import { buildSpatialIndex } from "./spatial_index.ts";

/** What {@link linksFgb} draws. */
export interface LinksInput {
  /** Reference system of the points; null for none. */
  readonly crs: Crs | null;
  /** x, y of each layer row, length 2 × rows; NaN where an area has none. */
  readonly points: Float64Array;
  readonly links: LinkTable;
  /** Names of the areas by layer row, for people; adds the fields `from` and `to`. @default none */
  readonly ids?: readonly (string | null)[];
}

/** The format's number for LineString. */
const LINE_TYPE = 2;

/** A Geometry table whose only field is `xy`, of four doubles: where its parts lie within the block. */
const BLOCK = { vtable: 0, table: 8, vector: 16, xy: 20, size: 52 } as const;
/** Puts `xy` on a multiple of 8. */
const BLOCK_REMAINDER = 4;

/**
 * Draws each directed link as a straight line between the points of its areas.
 *
 * Fields: `from_row`, `to_row` (0-based rows of the layer), `from`, `to` where ids are given, `weight`, and
 * `distance` where it was measured. A link of an area without a point has no line.
 *
 * @returns A FlatGeobuf file with spatial index (without one where there is no line).
 * Cost: one sort and one pass; 600,000 links in about 1 s.
 */
export function linksFgb(input: LinksInput): Uint8Array {
  const geometry = lineGeometry(input.points, input.links);
  const columns = linkColumns(input);
  const encoders = columns.map(propertyEncoder);
  const sizes = Float64Array.from(geometry.kinds, (kind, row) => {
    const block = kind === 0 ? 0 : BLOCK.size;
    return blockPosition(propertiesLength(encoders, row), BLOCK_REMAINDER) + block;
  });
  const index = buildSpatialIndex(geometry, sizes);
  const head = encodeFgbHeader({
    name: "links",
    envelope: index?.extent ?? null,
    geometryType: LINE_TYPE,
    hasZ: false,
    hasM: false,
    hasT: false,
    hasTm: false,
    columns: columns.map(({ name }, i) => newFgbColumn(name, encoders[i].type)),
    featuresCount: sizes.length,
    indexNodeSize: index?.nodeSize ?? 0,
    crs: input.crs && fgbCrs(input.crs),
    title: null,
    description: null,
    metadata: null,
  });
  const tree = index?.tree ?? new Uint8Array(0);
  const featuresAt = head.length + tree.length;
  const file = new Uint8Array(sizes.reduce((sum, size) => sum + size, featuresAt));
  file.set(head);
  file.set(tree, head.length);
  const order = index?.order ?? Uint32Array.from(sizes, (_, row) => row);
  writeLines(viewOf(file), featuresAt, { order, sizes, geometry, encoders });
  return file;
}

function propertiesLength(encoders: readonly PropertyEncoder[], row: number): number {
  let length = 0;
  for (const encoder of encoders) length += encoder.size(row);
  return length;
}

/** What {@link writeLines} writes. */
interface Lines {
  readonly order: Uint32Array;
  readonly sizes: Float64Array;
  readonly geometry: FlatGeometry;
  readonly encoders: readonly PropertyEncoder[];
}

function writeLines(view: DataView, from: number, lines: Lines): void {
  const { kinds, partStarts, xy } = lines.geometry;
  let at = from;
  for (const row of lines.order) {
    const properties = propertiesLength(lines.encoders, row);
    const block = blockPosition(properties, BLOCK_REMAINDER);
    const geometry = kinds[row] === 0 ? 0 : block + BLOCK.table;
    writeFront(view, at, { size: lines.sizes[row], properties, geometry });
    let next = at + PROPERTIES_AT;
    for (const encoder of lines.encoders) {
      encoder.write(view, next, row);
      next += encoder.size(row);
    }
    if (kinds[row] !== 0) writeBlock(view, at + block, xy, 4 * partStarts[row]);
    at += lines.sizes[row];
  }
}

function writeBlock(view: DataView, at: number, xy: Float64Array, first: number): void {
  // The vtable: its own length, the table's, no `ends`, where `xy` lies in the table.
  view.setUint16(at + BLOCK.vtable, 8, true);
  view.setUint16(at + BLOCK.vtable + 2, 8, true);
  view.setUint16(at + BLOCK.vtable + 4, 0, true);
  view.setUint16(at + BLOCK.vtable + 6, 4, true);
  view.setInt32(at + BLOCK.table, BLOCK.table - BLOCK.vtable, true);
  view.setUint32(at + BLOCK.table + 4, BLOCK.vector - (BLOCK.table + 4), true);
  view.setUint32(at + BLOCK.vector, 4, true);
  for (let k = 0; k < 4; k++) view.setFloat64(at + BLOCK.xy + 8 * k, xy[first + k], true);
}

/** One part of two vertices a link; none where either end has no point. */
function lineGeometry(points: Float64Array, { from, to }: LinkTable): FlatGeometry {
  const count = from.length;
  const kinds = new Uint8Array(count);
  const partStarts = new Uint32Array(count + 1);
  const xy = new Float64Array(4 * count);
  const line = GEOMETRY_KINDS.indexOf("line");
  let lines = 0;
  for (let i = 0; i < count; i++) {
    const a = 2 * from[i], b = 2 * to[i];
    if (Number.isFinite(points[a] + points[a + 1] + points[b] + points[b + 1])) {
      kinds[i] = line;
      xy[4 * lines] = points[a];
      xy[4 * lines + 1] = points[a + 1];
      xy[4 * lines + 2] = points[b];
      xy[4 * lines + 3] = points[b + 1];
      lines++;
    }
    partStarts[i + 1] = lines;
  }
  const starts = Uint32Array.from({ length: lines + 1 }, (_, i) => i);
  return {
    kinds,
    partStarts,
    ringStarts: starts,
    vertexStarts: starts.map((start) => 2 * start),
    xy: xy.subarray(0, 4 * lines),
  };
}

function linkColumns({ links, ids }: LinksInput): ColumnValues[] {
  const integer = (name: string, values: ArrayLike<number>): ColumnValues => ({
    name,
    kind: "integer",
    storedAs: "Int32",
    values: Float64Array.from(values),
  });
  const number = (name: string, values: Float64Array): ColumnValues => ({
    name,
    kind: "number",
    storedAs: "Float64",
    values,
  });
  const label = (name: string, rows: Uint32Array): ColumnValues => ({
    name,
    kind: "text",
    storedAs: "String",
    values: Array.from(rows, (row) => ids?.[row] ?? null),
  });
  return [
    integer("from_row", links.from),
    integer("to_row", links.to),
    ...(ids ? [label("from", links.from), label("to", links.to)] : []),
    number("weight", links.weight),
    ...(links.distance ? [number("distance", links.distance)] : []),
  ];
}
