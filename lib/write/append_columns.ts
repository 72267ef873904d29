/**
 * New columns on a layer without touching what was read: FlatGeobuf bytes in, FlatGeobuf bytes out.
 *
 * Each feature gets a new front with its old and new properties; its geometry block is moved as it is.
 *
 * @module
 */
import { crsOf } from "../layer/decode_layer.ts";
import { UsageError } from "../layer/errors.ts";
import { encodeFgbHeader, fgbCrs, newFgbColumn, readFgbHeader } from "../layer/fgb_header.ts";
import { fieldAt, follow, vectorLength, vectorStart, viewOf } from "../layer/flat_table.ts";
import { boundsOf } from "../layer/geometry.ts";
import type { ColumnValues, Layer } from "../layer/layer.ts";
import { blockPosition, PROPERTIES_AT, writeFront } from "./feature_front.ts";
import { type PropertyEncoder, propertyEncoder } from "./property_encoder.ts";

/** Slots of the format's `Feature` and `Geometry` tables. */
const SLOT = { geometry: 4, properties: 6, parts: 18 } as const;

/** Bytes of one old feature that go on living, as positions in the old file. */
interface Kept {
  readonly properties: number;
  readonly propertiesLength: number;
  /** First byte of the geometry block and the byte after it; equal where there is no geometry. */
  readonly blockStart: number;
  readonly blockEnd: number;
  /** Position of the geometry table inside the block, 0 for none. */
  readonly geometry: number;
  /** What `blockStart` leaves when counted from the size prefix and divided by 8. */
  readonly remainder: number;
}

/**
 * Appends columns to a layer's file.
 *
 * Original attributes, geometry (Z and M too), reference system, title and metadata stay byte for byte. NaN
 * and null become absent properties. `number` is stored as Double, `integer` as Int (Long beyond 32 bits),
 * `boolean` as Bool, `datetime` as DateTime, all else as String. `layer.added` is not appended by itself:
 * pass it first where it is wanted.
 *
 * @returns A FlatGeobuf file without spatial index, rows in the order of the layer.
 * @throws UsageError where a name is taken or a column has another number of values than the layer rows.
 * Cost: two passes over the file; 100,000 polygons and ten columns in about 0.2 s.
 */
export function appendColumns(layer: Layer, columns: readonly ColumnValues[]): Uint8Array {
  const { header } = readFgbHeader(layer.fgb);
  check(layer, header.columns.map((column) => column.name), columns);
  const encoders = columns.map((column, i) => propertyEncoder(column, header.columns.length + i));
  const head = encodeFgbHeader({
    ...header,
    // A file that declares none, or "unknown", may have been given one by the caller.
    crs: layer.crs && !crsOf(header.crs) ? fgbCrs(layer.crs) : header.crs,
    envelope: header.envelope ?? boundsOf(layer.geometry),
    columns: [
      ...header.columns,
      ...columns.map(({ name }, i) => newFgbColumn(name, encoders[i].type)),
    ],
    featuresCount: layer.count,
  });
  const sizes = featureSizes(layer, encoders);
  const file = new Uint8Array(sizes.reduce((sum, size) => sum + size, head.length));
  file.set(head);
  writeFeatures(file, head.length, sizes, layer, encoders);
  return file;
}

function check(layer: Layer, taken: readonly string[], columns: readonly ColumnValues[]): void {
  const names = new Set(taken);
  for (const { name, values } of columns) {
    if (names.has(name)) {
      throw new UsageError(
        `Cannot add a field "${name}" to layer "${layer.name}" of ${layer.source} as it has one; rename one of them`,
      );
    }
    names.add(name);
    if (values.length !== layer.count) {
      throw new UsageError(
        `Cannot add field "${name}" with ${values.length} values to layer "${layer.name}" with ${layer.count} rows; give one value for each row`,
      );
    }
  }
}

function featureSizes(layer: Layer, encoders: readonly PropertyEncoder[]): Float64Array {
  const view = viewOf(layer.fgb);
  const sizes = new Float64Array(layer.count);
  for (let row = 0; row < layer.count; row++) {
    const kept = findKept(view, layer.featureStarts[row], layer.featureStarts[row + 1]);
    const properties = kept.propertiesLength + addedLength(encoders, row);
    sizes[row] = blockPosition(properties, kept.remainder) + kept.blockEnd - kept.blockStart;
  }
  return sizes;
}

function writeFeatures(
  file: Uint8Array,
  from: number,
  sizes: Float64Array,
  layer: Layer,
  encoders: readonly PropertyEncoder[],
): void {
  const view = viewOf(file);
  const old = viewOf(layer.fgb);
  let at = from;
  for (let row = 0; row < layer.count; row++) {
    const kept = findKept(old, layer.featureStarts[row], layer.featureStarts[row + 1]);
    const properties = kept.propertiesLength + addedLength(encoders, row);
    const block = blockPosition(properties, kept.remainder);
    const geometry = kept.geometry === 0 ? 0 : block + kept.geometry - kept.blockStart;
    writeFront(view, at, { size: sizes[row], properties, geometry });
    const inherited = layer.fgb.subarray(kept.properties, kept.properties + kept.propertiesLength);
    file.set(inherited, at + PROPERTIES_AT);
    let next = at + PROPERTIES_AT + kept.propertiesLength;
    for (const encoder of encoders) {
      encoder.write(view, next, row);
      next += encoder.size(row);
    }
    file.set(layer.fgb.subarray(kept.blockStart, kept.blockEnd), at + block);
    at += sizes[row];
  }
}

function addedLength(encoders: readonly PropertyEncoder[], row: number): number {
  let length = 0;
  for (const encoder of encoders) length += encoder.size(row);
  return length;
}

function findKept(view: DataView, start: number, end: number): Kept {
  const table = follow(view, start + 4);
  const properties = fieldAt(view, table, SLOT.properties);
  const geometryField = fieldAt(view, table, SLOT.geometry);
  const geometry = geometryField === 0 ? 0 : follow(view, geometryField);
  const blockStart = geometry === 0 ? end : firstByte(view, geometry);
  return {
    properties: properties === 0 ? 0 : vectorStart(view, properties),
    propertiesLength: vectorLength(view, properties),
    blockStart,
    blockEnd: end,
    geometry,
    remainder: geometry === 0 ? 0 : (blockStart - start) % 8,
  };
}

/** Lowest byte a geometry uses. Only vtables, which tables may share, lie before what refers to them. */
function firstByte(view: DataView, table: number): number {
  let first = Math.min(table, table - view.getInt32(table, true));
  const parts = fieldAt(view, table, SLOT.parts);
  const count = vectorLength(view, parts);
  for (let p = 0; p < count; p++) {
    first = Math.min(first, firstByte(view, follow(view, vectorStart(view, parts) + 4 * p)));
  }
  return first;
}
