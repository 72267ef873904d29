/**
 * From a column as it was published to numbers: what is a number, what is declared missing, what is neither.
 *
 * @module
 */
import { UnfitDataError, UsageError } from "../layer/errors.ts";
import type { ColumnValues } from "../layer/layer.ts";
import {
  type DecimalMark,
  type DetectedFormat,
  detectNumberFormat,
  type NumberFormat,
  numberParser,
  type ThousandsMark,
} from "../read/number_format.ts";

/** Options of {@link numbersOf}. */
export interface NumberOptions {
  /** Texts that stand for no value, as from `parseMissingValues`. @default none */
  readonly missing?: readonly string[];
  /** Decimal mark of text columns. @default "auto" */
  readonly decimal?: DecimalMark | "auto";
  /** Thousands mark of text columns. @default "auto" */
  readonly thousands?: ThousandsMark | "auto";
  /** File the column came from, for messages. @default none */
  readonly source?: string;
  /** What a null means, such as `no row in rates.csv` for a joined column. @default "null" */
  readonly nullKind?: string;
  /** Rows to look at; what the others hold does not matter. @default all */
  readonly where?: (row: number) => boolean;
}

/** Kind of a missing cell; null for a cell that should be a number, undefined for a row not looked at. */
type Kind = string | null | undefined;

/** A kind of missing value (the marker text, `empty` or what null means) and how many cells had it. */
export interface MissingCount {
  readonly kind: string;
  readonly count: number;
}

/** A column as numbers. */
export interface ColumnNumbers {
  /** One per row; NaN where missing or not looked at, never infinite. */
  readonly values: Float64Array;
  /** Kinds that occur: null and empty first, then the markers in the order they were declared. */
  readonly missing: readonly MissingCount[];
  /** One per row: null for a number or a row not looked at, else why there is none, such as `value missing: *`. */
  readonly reasons: readonly (string | null)[];
  /** Sentences on how the texts were read, where a reader could have thought otherwise. */
  readonly notes: readonly string[];
}

/**
 * Reads a column as numbers. Number columns pass through; text columns are parsed in the format the
 * whole column shows (see `detectNumberFormat`). A cell is missing when it is null, empty, a declared marker word for
 * word, or the same number as a declared marker (`-999` also covers `-999.0`). A suppressed value is missing, never
 * zero.
 *
 * @throws {UnfitDataError} when a cell is neither a number nor missing, or is infinite; the message names source, field,
 * row and text, how many more there are, and the option that declares them missing.
 * @throws {UsageError} when decimal and thousands mark are the same.
 */
export function numbersOf(column: ColumnValues, options: NumberOptions = {}): ColumnNumbers {
  const { decimal = "auto" } = options;
  if (decimal !== "auto" && decimal === options.thousands) {
    throw new UsageError(
      `Cannot use ${options.decimal} as both decimal and thousands mark; change --decimal or --thousands`,
    );
  }
  if (column.kind === "datetime" || column.kind === "binary") {
    const holds = column.kind === "datetime" ? "dates" : "binary data";
    throw new UnfitDataError(
      `Cannot use ${place(column, options)} as numbers as it holds ${holds}`,
    );
  }
  const { values } = column;
  const kindsByText = Array.from(values, missingKind(options));
  const { numbers, notes } = values instanceof Float64Array
    ? { numbers: values, notes: [] }
    : parseTexts(values, kindsByText, column, options);
  const kinds = withNumericMarkers(kindsByText, numbers, options.missing ?? []);
  checkFinite(numbers, kinds, column, options);
  return {
    values: numbers.map((value, row) => kinds[row] === null ? value : NaN),
    missing: countKinds(kinds, options),
    reasons: kinds.map(reasonOf),
    notes,
  };
}

/** Judges a cell by its text. */
function missingKind(
  { missing, nullKind = "null", where = () => true }: NumberOptions,
): (cell: string | number | null, row: number) => Kind {
  const markers = new Set(missing);
  return (cell, row) => {
    if (!where(row)) return undefined;
    if (cell === null || Number.isNaN(cell)) return nullKind;
    if (typeof cell === "number") return null;
    if (markers.has(cell)) return cell;
    const text = cell.trim();
    if (text === "") return "empty";
    return markers.has(text) ? text : null;
  };
}

function parseTexts(
  cells: readonly (string | null)[],
  kinds: readonly Kind[],
  column: ColumnValues,
  options: NumberOptions,
): { numbers: Float64Array; notes: string[] } {
  const texts = cells.filter((cell, row): cell is string => cell !== null && kinds[row] === null);
  const detected = detectNumberFormat(texts, options);
  const parse = numberParser(detected.format);
  const numbers = new Float64Array(cells.length).fill(NaN);
  const strange: number[] = [];
  cells.forEach((cell, row) => {
    if (cell === null || kinds[row] !== null) return;
    const value = parse(cell);
    if (value === null) strange.push(row);
    else numbers[row] = value;
  });
  if (strange.length > 0) throw strangeCells(strange, cells, column, options);
  return { numbers, notes: notesOn(texts, detected, column) };
}

function strangeCells(
  rows: readonly number[],
  cells: readonly (string | null)[],
  column: ColumnValues,
  options: NumberOptions,
): UnfitDataError {
  const distinct = [...new Set(rows.map((row) => (cells[row] ?? "").trim()))];
  const markers = [...options.missing ?? [], ...distinct.slice(0, 5)].map(quotedMarker).join(",");
  const more = rows.length === 1 ? "" : ` (and ${rows.length - 1} more such cells)`;
  return new UnfitDataError(
    `Cannot read ${place(column, options)} as numbers as ${rowText(rows[0])} holds ` +
      `"${distinct[0]}"${more}; if such a text stands for a missing value, declare it: ` +
      `--missing-values '${markers}'`,
  );
}

function quotedMarker(marker: string): string {
  return /[",]|^\s|\s$/.test(marker) ? `"${marker.replaceAll('"', '""')}"` : marker;
}

/** `-999` among the markers also takes out -999 in number columns and `-999.0` in texts. */
function withNumericMarkers(
  kinds: readonly Kind[],
  numbers: Float64Array,
  markers: readonly string[],
): readonly Kind[] {
  const parse = numberParser({ decimal: ".", thousands: "none" });
  const markerOf = new Map<number | null, string>();
  for (const marker of markers) {
    const value = parse(marker);
    if (value !== null && !markerOf.has(value)) markerOf.set(value, marker);
  }
  if (markerOf.size === 0) return kinds;
  return kinds.map((kind, row) => kind === null ? markerOf.get(numbers[row]) ?? null : kind);
}

function checkFinite(
  numbers: Float64Array,
  kinds: readonly Kind[],
  column: ColumnValues,
  options: NumberOptions,
): void {
  const row = numbers.findIndex((value, row) => kinds[row] === null && !Number.isFinite(value));
  if (row < 0) return;
  throw new UnfitDataError(
    `Cannot use ${place(column, options)} as ${rowText(row)} holds ${column.values[row]}, ` +
      "which is no finite number; mend it or leave the area out with --where",
  );
}

function countKinds(
  kinds: readonly Kind[],
  { missing = [], nullKind = "null" }: NumberOptions,
): MissingCount[] {
  const counts = new Map([nullKind, "empty", ...missing].map((kind) => [kind, 0]));
  for (const kind of kinds) {
    if (typeof kind === "string") counts.set(kind, (counts.get(kind) ?? 0) + 1);
  }
  return [...counts].flatMap(([kind, count]) => count > 0 ? [{ kind, count }] : []);
}

function reasonOf(kind: Kind): string | null {
  if (typeof kind !== "string") return null;
  return kind === "null" || kind === "empty" ? "value missing" : `value missing: ${kind}`;
}

function notesOn(
  texts: readonly string[],
  { format, doubt }: DetectedFormat,
  column: ColumnValues,
): string[] {
  const notes: string[] = [];
  if (doubt) {
    const { text, other } = doubt;
    notes.push(
      `${column.name}: "${text.trim()}" was read as ${numberParser(format)(text)} ` +
        `(${spoken(format)}); with ${spoken(other)} it would be ${numberParser(other)(text)}, ` +
        "so say --decimal and --thousands if that is meant",
    );
  }
  const percent = texts.filter((text) => text.trimEnd().endsWith("%")).length;
  if (percent > 0) {
    notes.push(
      `${column.name}: ${percent} of ${texts.length} texts carry a percent sign, which was dropped ` +
        "(12.5 % is read as 12.5)",
    );
  }
  return notes;
}

function spoken({ decimal, thousands }: NumberFormat): string {
  const marks = { ".": "point", ",": "comma", " ": "space", "'": "apostrophe" };
  const grouping = thousands === "none" ? "no thousands mark" : `thousands ${marks[thousands]}`;
  return `decimal ${marks[decimal]}, ${grouping}`;
}

function place(column: ColumnValues, { source }: NumberOptions): string {
  return `field ${column.name}${source === undefined ? "" : ` of ${source}`}`;
}

/** Both ways of counting: people count data rows from 1, the outcome's `_row` from 0. */
function rowText(row: number): string {
  return `row ${row + 1} (_row ${row})`;
}
