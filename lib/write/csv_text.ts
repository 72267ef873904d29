/**
 * Columns as delimited text, safe to open in a spreadsheet.
 *
 * @module
 */
import type { ColumnValues } from "../layer/layer.ts";

/** A text that a spreadsheet could take for a formula (OWASP, "CSV injection"). */
const FORMULA_START = /^[=+\-@\t\r]/;
const NEEDS_QUOTES = /[",\r\n]|^\s|\s$/;

/** Options of {@link csvText}. */
export interface CsvOptions {
  /**
   * Put an apostrophe before a *text* that begins like a formula; numbers never get one. Off where
   * a program reads the file back.
   * @default true
   */
  readonly formulaSafe?: boolean;
}

/**
 * Columns as CSV (RFC 4180; UTF-8 with byte-order mark, so that spreadsheets read the accents; comma
 * as delimiter, point as decimal mark). Null and NaN are empty cells; numbers are in their shortest form, which
 * reads back bit for bit.
 *
 * @param columns Columns of equal length; booleans print as `true` and `false`.
 */
export function csvText(
  columns: readonly ColumnValues[],
  { formulaSafe = true }: CsvOptions = {},
): string {
  const count = columns[0]?.values.length ?? 0;
  const textOf = formulaSafe ? disarmed : (text: string) => text;
  const cellOf = columns.map((column) => cellReader(column, textOf));
  const lines = [columns.map((column) => quoted(textOf(column.name))).join(",")];
  for (let row = 0; row < count; row++) lines.push(cellOf.map((cell) => cell(row)).join(","));
  return "\uFEFF" + lines.join("\r\n") + "\r\n";
}

function cellReader(
  column: ColumnValues,
  textOf: (text: string) => string,
): (row: number) => string {
  const { values, kind } = column;
  if (values instanceof Float64Array) {
    const print = kind === "boolean" ? (value: number) => String(value !== 0) : String;
    return (row) => Number.isNaN(values[row]) ? "" : print(values[row]);
  }
  const print = kind === "integer" || kind === "datetime" ? (text: string) => text : textOf;
  return (row) => {
    const text = values[row];
    return text === null ? "" : quoted(print(text));
  };
}

function disarmed(text: string): string {
  return FORMULA_START.test(text) ? `'${text}` : text;
}

function quoted(text: string): string {
  return NEEDS_QUOTES.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
