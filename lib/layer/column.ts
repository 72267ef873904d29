/**
 * Columns of a layer, read out of the FlatGeobuf bytes one pass at a time.
 *
 * In the format a property is a 16-bit column number followed by its bytes; a null property is absent.
 *
 * @module
 */
import { UsageError } from "./errors.ts";
import { FGB_TYPES, type FgbColumn, readFgbHeader } from "./fgb_header.ts";
import { fieldAt, follow, vectorLength, vectorStart, viewOf } from "./flat_table.ts";
import type { Column, ColumnKind, ColumnValues, Layer } from "./layer.ts";
import { suggestion } from "./nearest_name.ts";

export { nearestName } from "./nearest_name.ts";

/** How each type of the format is stored and what it becomes; `size` 0 marks a length prefix. */
interface TypeTraits {
  readonly kind: ColumnKind;
  readonly storedAs: string;
  readonly size: number;
}

const TRAITS: readonly TypeTraits[] = [
  { kind: "integer", storedAs: "Int8", size: 1 },
  { kind: "integer", storedAs: "UInt8", size: 1 },
  { kind: "boolean", storedAs: "Bool", size: 1 },
  { kind: "integer", storedAs: "Int16", size: 2 },
  { kind: "integer", storedAs: "UInt16", size: 2 },
  { kind: "integer", storedAs: "Int32", size: 4 },
  { kind: "integer", storedAs: "UInt32", size: 4 },
  { kind: "integer", storedAs: "Int64", size: 8 },
  { kind: "integer", storedAs: "UInt64", size: 8 },
  { kind: "number", storedAs: "Float32", size: 4 },
  { kind: "number", storedAs: "Float64", size: 8 },
  { kind: "text", storedAs: "String", size: 0 },
  { kind: "text", storedAs: "JSON", size: 0 },
  { kind: "datetime", storedAs: "DateTime", size: 0 },
  { kind: "binary", storedAs: "Binary", size: 0 },
];

/** Slot of the properties in the format's `Feature` table. */
const PROPERTIES_SLOT = 6;

/** A column as the rest of the program knows it. */
export function columnOf({ name, type }: FgbColumn): Column {
  const { kind, storedAs } = TRAITS[type];
  return { name, kind, storedAs };
}

/**
 * One column of a layer, from the file or added after reading.
 *
 * Dates come as the ISO text of the file, binary as hexadecimal text. A 64-bit integer column
 * with a value beyond 2^53 comes as text, kind included.
 *
 * @throws UsageError where no column has this name, suggesting the nearest.
 * Cost: one pass over the attributes of all features; for several columns use {@link readColumns}.
 */
export function readColumn(layer: Layer, name: string): ColumnValues {
  return readColumns(layer, [name])[0];
}

/** Several columns of a layer in one pass, in the order asked. See {@link readColumn}. */
export function readColumns(layer: Layer, names: readonly string[]): ColumnValues[] {
  const { columns: stored } = readFgbHeader(layer.fgb).header;
  const wanted = names.map((name) => locate(layer, stored, name));
  const readers = new Map<number, Reader>();
  for (const place of wanted) {
    if (typeof place === "number" && !readers.has(place)) {
      readers.set(place, readerOf(stored[place].type, layer.count));
    }
  }
  if (readers.size > 0) readProperties(layer, stored, readers);
  return wanted.map((place) =>
    typeof place === "number"
      ? { ...columnOf(stored[place]), ...(readers.get(place) as Reader).finish() }
      : place
  );
}

/** Number of a stored column, or the added column itself. */
function locate(layer: Layer, stored: readonly FgbColumn[], name: string): number | ColumnValues {
  const added = layer.added.find((column) => column.name === name);
  if (added !== undefined) return added;
  const place = stored.findIndex((column) => column.name === name);
  if (place >= 0) return place;
  const names = [...stored, ...layer.added].map((column) => column.name);
  throw new UsageError(
    `No field "${name}" in layer "${layer.name}" of ${layer.source}, which has ${list(names)}${
      suggestion(name, names)
    }`,
  );
}

/** Names for a message; long lists are cut. */
function list(names: readonly string[]): string {
  if (names.length === 0) return "no fields";
  const shown = names.slice(0, 20).join(", ");
  return names.length > 20 ? `${shown} and ${names.length - 20} more` : shown;
}

/** Hands each wanted property of each feature to the reader of its column. */
function readProperties(
  layer: Layer,
  stored: readonly FgbColumn[],
  readers: ReadonlyMap<number, Reader>,
): void {
  const view = viewOf(layer.fgb);
  const sizes = stored.map((column) => TRAITS[column.type].size);
  const byColumn = stored.map((_, i) => readers.get(i));
  for (let row = 0; row < layer.count; row++) {
    const field = fieldAt(view, follow(view, layer.featureStarts[row] + 4), PROPERTIES_SLOT);
    if (field === 0) continue;
    let at = vectorStart(view, field);
    const end = at + vectorLength(view, field);
    while (at < end) {
      const column = view.getUint16(at, true);
      at += 2;
      const prefix = sizes[column] === 0 ? 4 : 0;
      const size = prefix === 4 ? view.getUint32(at, true) : sizes[column];
      byColumn[column]?.take(row, view, at + prefix, size);
      at += prefix + size;
    }
  }
}

/** Gathers the values of one column. */
interface Reader {
  take(row: number, view: DataView, at: number, size: number): void;
  finish(): Pick<ColumnValues, "values"> & { readonly kind?: ColumnKind };
}

function readerOf(type: number, count: number): Reader {
  if (type === FGB_TYPES.long || type === FGB_TYPES.ulong) return longReader(type, count);
  const { kind } = TRAITS[type];
  if (kind === "binary") return textReader(count, hexadecimal);
  if (kind === "text" || kind === "datetime") {
    const decoder = new TextDecoder();
    return textReader(count, (bytes) => decoder.decode(bytes));
  }
  const get = GET_NUMBER[type];
  const values = new Float64Array(count).fill(NaN);
  return {
    take: (row, view, at) => values[row] = get(view, at),
    finish: () => ({ values }),
  };
}

const GET_NUMBER: Readonly<Record<number, (view: DataView, at: number) => number>> = {
  [FGB_TYPES.byte]: (view, at) => view.getInt8(at),
  [FGB_TYPES.ubyte]: (view, at) => view.getUint8(at),
  [FGB_TYPES.bool]: (view, at) => view.getUint8(at) === 0 ? 0 : 1,
  [FGB_TYPES.short]: (view, at) => view.getInt16(at, true),
  [FGB_TYPES.ushort]: (view, at) => view.getUint16(at, true),
  [FGB_TYPES.int]: (view, at) => view.getInt32(at, true),
  [FGB_TYPES.uint]: (view, at) => view.getUint32(at, true),
  [FGB_TYPES.float]: (view, at) => view.getFloat32(at, true),
  [FGB_TYPES.double]: (view, at) => view.getFloat64(at, true),
};

function longReader(type: number, count: number): Reader {
  const values: (bigint | null)[] = new Array(count).fill(null);
  const signed = type === FGB_TYPES.long;
  return {
    take: (row, view, at) => {
      values[row] = signed ? view.getBigInt64(at, true) : view.getBigUint64(at, true);
    },
    finish: () => {
      const exact = values.every((value) => value === null || Number.isSafeInteger(Number(value)));
      return exact
        ? { values: Float64Array.from(values, (value) => value === null ? NaN : Number(value)) }
        : { kind: "text", values: values.map((value) => value === null ? null : String(value)) };
    },
  };
}

function textReader(count: number, decode: (bytes: Uint8Array) => string): Reader {
  const values: (string | null)[] = new Array(count).fill(null);
  return {
    take: (row, view, at, size) => {
      values[row] = decode(new Uint8Array(view.buffer, view.byteOffset + at, size));
    },
    finish: () => ({ values }),
  };
}

function hexadecimal(bytes: Uint8Array): string {
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, "0")).join("");
}
