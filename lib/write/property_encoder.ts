/**
 * One column's values as FlatGeobuf properties: a 16-bit column number and the bytes of the value.
 *
 * @module
 */
import { FGB_TYPES } from "../layer/fgb_header.ts";
import type { ColumnValues } from "../layer/layer.ts";

/** Writes the properties of one column. */
export interface PropertyEncoder {
  /** The format's column type, see `FGB_TYPES`. */
  readonly type: number;
  /** Bytes that a row's property takes; 0 where the value is NaN or null, as it is then absent. */
  size(row: number): number;
  /** Writes a row's property at `at`; nothing where it is absent. */
  write(view: DataView, at: number, row: number): void;
}

/**
 * The encoder of a column whose number in the file is `column` (below 65,536).
 *
 * Numbers become Double; integers Int, or Long where one exceeds 32 bits; booleans Bool; dates
 * DateTime; all else String.
 */
export function propertyEncoder(values: ColumnValues, column: number): PropertyEncoder {
  if (!(values.values instanceof Float64Array)) {
    const type = values.kind === "datetime" ? FGB_TYPES.datetime : FGB_TYPES.string;
    return textEncoder(values.values, column, type);
  }
  switch (values.kind) {
    case "boolean":
      return numberEncoder(values.values, column, BOOL);
    case "integer":
      return numberEncoder(values.values, column, values.values.every(fitsInt) ? INT : LONG);
    default:
      return numberEncoder(values.values, column, DOUBLE);
  }
}

/** How a number is stored. */
interface NumberStorage {
  readonly type: number;
  readonly bytes: number;
  readonly set: (view: DataView, at: number, value: number) => void;
}

const BOOL: NumberStorage = {
  type: FGB_TYPES.bool,
  bytes: 1,
  set: (view, at, value) => view.setUint8(at, value === 0 ? 0 : 1),
};
const INT: NumberStorage = {
  type: FGB_TYPES.int,
  bytes: 4,
  set: (view, at, value) => view.setInt32(at, value, true),
};
const LONG: NumberStorage = {
  type: FGB_TYPES.long,
  bytes: 8,
  set: (view, at, value) => view.setBigInt64(at, BigInt(value), true),
};
const DOUBLE: NumberStorage = {
  type: FGB_TYPES.double,
  bytes: 8,
  set: (view, at, value) => view.setFloat64(at, value, true),
};

function fitsInt(value: number): boolean {
  return Number.isNaN(value) || (value | 0) === value;
}

function numberEncoder(
  values: Float64Array,
  column: number,
  { type, bytes, set }: NumberStorage,
): PropertyEncoder {
  return {
    type,
    size: (row) => Number.isNaN(values[row]) ? 0 : 2 + bytes,
    write: (view, at, row) => {
      if (Number.isNaN(values[row])) return;
      view.setUint16(at, column, true);
      set(view, at + 2, values[row]);
    },
  };
}

function textEncoder(
  values: readonly (string | null)[],
  column: number,
  type: number,
): PropertyEncoder {
  const bytes = encodeAll(values);
  return {
    type,
    size: (row) => bytes[row] === null ? 0 : 6 + bytes[row].length,
    write: (view, at, row) => {
      const text = bytes[row];
      if (text === null) return;
      view.setUint16(at, column, true);
      view.setUint32(at + 2, text.length, true);
      new Uint8Array(view.buffer, view.byteOffset + at + 6, text.length).set(text);
    },
  };
}

/** Result columns repeat a few words over all rows: each distinct text is encoded once. */
function encodeAll(values: readonly (string | null)[]): readonly (Uint8Array | null)[] {
  const encoder = new TextEncoder();
  const known = new Map<string, Uint8Array>();
  return values.map((value) => {
    if (value === null) return null;
    const bytes = known.get(value) ?? encoder.encode(value);
    known.set(value, bytes);
    return bytes;
  });
}
