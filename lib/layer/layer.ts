/**
 * The one record that is passed along the path: what a file held, decoded only as far as needed.
 *
 * @module
 */
import type { FlatGeometry } from "./geometry.ts";

/** A coordinate reference system as the file declares it. */
export interface Crs {
  /** Human name, such as `NAD27` or `WGS 84 / UTM zone 32N`. */
  readonly name: string;
  /** Authority code such as `EPSG:4267`, or null where the file gives none. */
  readonly code: string | null;
  /** The definition as WKT (version 1 or 2); proj4 accepts it. */
  readonly wkt: string;
  /** True where coordinates are longitude and latitude in degrees. */
  readonly geographic: boolean;
}

/** What a column holds, whatever the file calls it. */
export type ColumnKind = "number" | "integer" | "boolean" | "text" | "datetime" | "binary";

/** Name and kind of a column of a layer or table. */
export interface Column {
  readonly name: string;
  readonly kind: ColumnKind;
  /** The file's own type, such as `Int64` or `DateTime`, for people. */
  readonly storedAs: string;
}

/**
 * A column with its values, one per row. `number`, `integer` and `boolean` come as numbers (NaN for
 * null, booleans as 0 and 1), all else as text (null for null). 64-bit integers beyond 2^53 come as
 * text, so that no digit is lost.
 */
export type ColumnValues = Column & {
  readonly values: Float64Array | readonly (string | null)[];
};

/**
 * A vector layer. Rows are the features in the order of the input; row numbers are 0-based and never
 * change. Geometry is decoded to flat arrays; attributes stay in the FlatGeobuf bytes and are read one
 * column at a time with `readColumn`, so that what is written back is what was read, types included.
 */
export interface Layer {
  /** Layer name inside the file. */
  readonly name: string;
  /** File name (without folders) for people and records. */
  readonly source: string;
  /** Number of rows. */
  readonly count: number;
  /** What most features are. */
  readonly shape: "polygon" | "point" | "line" | "mixed" | "none";
  readonly columns: readonly Column[];
  readonly geometry: FlatGeometry;
  /** Null where the file has none, or says "undefined" or "unknown". */
  readonly crs: Crs | null;
  /** The layer as FlatGeobuf without spatial index, rows in input order. */
  readonly fgb: Uint8Array;
  /** Byte offset in `fgb` of each feature's size prefix, length `count + 1`. */
  readonly featureStarts: Float64Array;
  /** Columns added after reading (a joined table), each of length `count`. */
  readonly added: readonly ColumnValues[];
}

/** A table without geometry: every cell as the text it was, so that `0042` stays `0042`. */
export interface Table {
  /** File name (without folders), for people and records. */
  readonly source: string;
  readonly count: number;
  readonly columns: readonly { readonly name: string; readonly cells: readonly string[] }[];
}
