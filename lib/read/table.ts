/**
 * Tables as offices publish them: delimited text or an XLSX sheet, every cell as the text it was.
 *
 * @module
 */
import { readFile } from "node:fs/promises";
import { basename, extname } from "node:path";
import { UnreadableError, UsageError } from "../layer/errors.ts";
import type { ColumnValues, Table } from "../layer/layer.ts";
import { suggestion } from "../layer/nearest_name.ts";
import { parseDelimited } from "./delimited.ts";
import { readSheetRows } from "./spreadsheet.ts";
import { decodeText } from "./text_encoding.ts";

const TABLE_ENDINGS = new Set([".csv", ".tsv", ".txt", ".xlsx"]);

/** Whether a path is read as a table, by its ending. */
export function isTable(path: string): boolean {
  return TABLE_ENDINGS.has(extname(path).toLowerCase());
}

/** Options of {@link readTable}; what is left out is detected. */
export interface TableOptions {
  /** Delimiter of text tables, one character or `tab`. @default detected */
  readonly delimiter?: string;
  /** Text encoding, such as `windows-1252`. @default detected */
  readonly encoding?: string;
  /** Sheet of a workbook. @default the only one that holds anything */
  readonly sheet?: string;
  /** Decimal mark of the numbers inside; helps to tell a delimiter from a decimal comma. */
  readonly decimal?: "." | ",";
  /** Line (text) or row (sheet) of the column names, counted from 1. @default 1 */
  readonly header?: number;
}

/**
 * Reads a table from a file: XLSX where the bytes say so, else delimited text (comma, semicolon,
 * tab or pipe). Column names are trimmed and must differ; a column without a name is called
 * `column N` by its position, or dropped when it is empty. Cells stay as they are, so ids such as `0042` and
 * names such as `2020` stay text. Empty rows at the end are dropped.
 *
 * @throws {UnreadableError} naming file and line: missing, empty, ragged, repeated column names.
 * @throws {UsageError} for an unknown sheet, delimiter or encoding.
 */
export async function readTable(path: string, options: TableOptions = {}): Promise<Table> {
  return await tableFromBytes(basename(path), await bytesOf(path), options);
}

/** {@link readTable} for bytes already in memory; `source` is the file name for people. */
export async function tableFromBytes(
  source: string,
  bytes: Uint8Array,
  options: TableOptions = {},
): Promise<Table> {
  const { header } = options;
  if (header !== undefined && !(Number.isInteger(header) && header >= 1)) {
    throw new UsageError(`Cannot take row ${header} as column names; rows are counted from 1`);
  }
  const named = { ...options, source };
  const rows = isWorkbook(bytes)
    ? await readSheetRows(bytes, named)
    : parseDelimited(decodeText(bytes, named).text, named);
  return tableOf(source, rows);
}

/** The columns of a table as text columns, for filters and number parsing. Cells are shared, not copied. */
export function tableColumns(table: Table): ColumnValues[] {
  return table.columns.map(({ name, cells }) => (
    { name, kind: "text", storedAs: "text", values: cells }
  ));
}

/**
 * A column of a table by its name.
 *
 * @throws {UsageError} naming what there is and the nearest name.
 */
export function tableColumn(table: Table, name: string): Table["columns"][number] {
  const column = table.columns.find((column) => column.name === name);
  if (column) return column;
  const names = table.columns.map((column) => column.name);
  throw new UsageError(
    `Cannot find column "${name}" in ${table.source}, which has ${columnList(table)}` +
      suggestion(name, names),
  );
}

/** Column names of a table for a message; long lists are cut. */
export function columnList({ columns }: Table): string {
  const names = columns.map(({ name }) => name);
  return names.slice(0, 20).join(", ") +
    (names.length > 20 ? ` and ${names.length - 20} more` : "");
}

async function bytesOf(path: string): Promise<Uint8Array> {
  try {
    return await readFile(path);
  } catch (error) {
    const reason = (error as { code?: string }).code === "ENOENT"
      ? "there is no such file"
      : (error as Error).message;
    throw new UnreadableError(`Cannot read ${path} as ${reason}`);
  }
}

/** Zip archives and old workbooks, by their first bytes: an ending can lie. */
function isWorkbook(bytes: Uint8Array): boolean {
  const starts = (...magic: number[]) => magic.every((byte, b) => bytes[b] === byte);
  return starts(0x50, 0x4b, 0x03, 0x04) || starts(0xd0, 0xcf, 0x11, 0xe0);
}

function tableOf(source: string, rows: readonly string[][]): Table {
  if (rows.length === 0) throw new UnreadableError(`Cannot read ${source} as it is empty`);
  let end = rows.length;
  while (end > 1 && rows[end - 1].every(isBlank)) end--;
  const body = rows.slice(1, end);
  if (body.length === 0) {
    throw new UnreadableError(`Cannot use ${source} as it has column names but no rows`);
  }
  const columns: { name: string; cells: string[] }[] = [];
  rows[0].forEach((heading, c) => {
    const cells = body.map((row) => row[c]);
    const name = heading.trim();
    if (name !== "" || !cells.every(isBlank)) {
      columns.push({ name: name || `column ${c + 1}`, cells });
    }
  });
  checkNames(source, columns.map(({ name }) => name));
  return { source, count: body.length, columns };
}

function isBlank(cell: string): boolean {
  return cell.trim() === "";
}

function checkNames(source: string, names: readonly string[]): void {
  const repeated = names.filter((name, c) => names.indexOf(name) < c);
  if (repeated.length === 0) return;
  const list = [...new Set(repeated)].map((name) => `"${name}"`).join(", ");
  throw new UnreadableError(
    `Cannot use ${source} as several columns are called ${list}; give every column its own name`,
  );
}
