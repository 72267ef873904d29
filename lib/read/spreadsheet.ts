/**
 * Rows of cells from a sheet of an XLSX workbook.
 *
 * @module
 */
import readWorkbook, {
  InvalidInputError,
  InvalidSpreadsheetError,
} from "read-excel-file/universal";
import { UnreadableError, UsageError } from "../layer/errors.ts";
import { suggestion } from "../layer/nearest_name.ts";

/** Options of {@link readSheetRows}. */
export interface SheetOptions {
  /** File name for messages. */
  readonly source: string;
  /** Name of the sheet. @default the only one that holds anything */
  readonly sheet?: string;
  /** Row of the column names, counted from 1; the rows above are skipped. @default 1 */
  readonly header?: number;
}

/**
 * Reads one sheet as text, the first row being the column names. Text stays as typed (`0042`); a
 * number becomes its shortest decimal text, whatever its display format rounds it to (`12`, not `12.0`); a date is
 * ISO 8601 (`2024-03-31`, with a time where it has one); a formula gives its stored result. Empty cells
 * and cells that show a formula error are empty texts.
 *
 * @returns Rows of equal length; none for an empty sheet.
 * @throws {UsageError} when the sheet is unknown, or none is named and several hold something.
 * @throws {UnreadableError} when the bytes are no XLSX workbook.
 */
export async function readSheetRows(bytes: Uint8Array, options: SheetOptions): Promise<string[][]> {
  const sheets = await openWorkbook(bytes, options.source);
  const rows = chooseSheet(sheets, options).data.slice((options.header ?? 1) - 1);
  return rows.map((row) => row.map(cellText));
}

interface Sheet {
  readonly sheet: string;
  /** Cells are texts, booleans, dates or null; the reader's own types mistake Date for its constructor. */
  readonly data: readonly (readonly unknown[])[];
}

async function openWorkbook(bytes: Uint8Array, source: string): Promise<Sheet[]> {
  try {
    const options = { trim: false, parseNumber: shortestDecimal };
    return await readWorkbook(new Uint8Array(bytes).buffer, options);
  } catch (error) {
    if (error instanceof InvalidInputError && error.code === "XLS_FILE_NOT_SUPPORTED") {
      throw new UnreadableError(
        `Cannot read ${source} as it is an old XLS workbook or protected by a password; ` +
          "save it as an unprotected .xlsx or as CSV",
      );
    }
    if (error instanceof InvalidInputError || error instanceof InvalidSpreadsheetError) {
      throw new UnreadableError(
        `Cannot read ${source} as an XLSX workbook (${error.message}); save it again as .xlsx or as CSV`,
      );
    }
    throw error;
  }
}

/** Workbooks store binary fractions with 17 digits: 0.1 stands as 0.10000000000000001. */
function shortestDecimal(stored: string): string {
  return String(Number(stored));
}

function chooseSheet(sheets: readonly Sheet[], { source, sheet: wanted }: SheetOptions): Sheet {
  const list = (some: readonly Sheet[]) => some.map(({ sheet }) => `"${sheet}"`).join(", ");
  if (wanted !== undefined) {
    const found = sheets.find(({ sheet }) => sheet === wanted);
    if (found) return found;
    throw new UsageError(
      `Cannot find sheet "${wanted}" in ${source}, which has ${list(sheets)}` +
        suggestion(wanted, sheets.map(({ sheet }) => sheet)),
    );
  }
  const filled = sheets.filter(({ data }) => data.length > 0);
  if (filled.length > 1) {
    throw new UsageError(
      `Cannot tell which sheet of ${source} to read: ${list(filled)}; name one with --sheet`,
    );
  }
  return filled[0] ?? { sheet: "", data: [] };
}

function cellText(cell: unknown): string {
  if (cell === null) return "";
  if (cell instanceof Date) return cell.toISOString().replace(/(T00:00:00)?\.000Z$/, "");
  return String(cell);
}
