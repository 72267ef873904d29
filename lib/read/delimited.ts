/**
 * Rows of cells from CSV, TSV and their kin (RFC 4180, with any delimiter).
 *
 * @module
 */
import { CsvError, parse } from "csv-parse/sync";
import { UnreadableError, UsageError } from "../layer/errors.ts";

/** Candidates in order of preference: the rarer a mark is inside texts and numbers, the earlier. */
const DELIMITERS = ["\t", ";", "|", ","] as const;
/** Lines looked at to find the delimiter. */
const SNIFFED_LINES = 200;
/** A first line by which spreadsheets announce the delimiter. */
const ANNOUNCEMENT = /^sep=(.)\r?\n/i;

/** Options of {@link parseDelimited}. */
export interface DelimitedOptions {
  /** File name for messages. */
  readonly source: string;
  /** One character, or `tab`. @default detected */
  readonly delimiter?: string;
  /** Decimal mark of the numbers inside; `,` makes the comma the last resort as delimiter. */
  readonly decimal?: "." | ",";
  /** Line of the column names, counted from 1; the lines above are skipped. @default 1 */
  readonly header?: number;
}

/**
 * Splits text into rows of cells, the first row being the column names. Cells are kept as they are; double quotes
 * enclose a cell that holds the delimiter, a line end or a doubled quote. Empty lines are skipped.
 *
 * @returns Rows of equal length.
 * @throws {UnreadableError} naming the line of a row with more or fewer cells, or of a stray quote.
 * @throws {UsageError} when the delimiter is not one character.
 */
export function parseDelimited(text: string, options: DelimitedOptions): string[][] {
  const announced = ANNOUNCEMENT.exec(text)?.[1];
  const header = options.header ?? (announced ? 2 : 1);
  const delimiter = namedDelimiter(options.delimiter) ?? announced ??
    sniffDelimiter(skipLines(text, header - 1), options.decimal);
  try {
    return parse(text, { delimiter, from_line: header, skip_empty_lines: true });
  } catch (error) {
    if (error instanceof CsvError) throw new UnreadableError(explain(error, delimiter, options));
    throw error;
  }
}

function namedDelimiter(name: string | undefined): string | undefined {
  if (name === undefined) return undefined;
  if (name === "tab" || name === "\\t") return "\t";
  if (name.length === 1 && !'"\r\n'.includes(name)) return name;
  throw new UsageError(
    `Cannot use --delimiter ${name || "''"}; give one character such as ; or the word tab`,
  );
}

/**
 * The delimiter of a text whose first line holds the column names: among tab, semicolon, pipe and comma, those
 * that occur in the first line; of these the one whose number per row agrees with the first line in the most of
 * the first 200 rows, then the more frequent one, then the earlier in that list. Marks inside double
 * quotes do not count.
 *
 * @param decimal With `,` the comma is taken only where no other candidate occurs in the first line.
 * @returns A comma where no candidate occurs (a table of one column).
 */
export function sniffDelimiter(text: string, decimal?: "." | ","): string {
  const rows = countMarks(text);
  const [first] = rows;
  let candidates = DELIMITERS.filter((_, m) => first[m] > 0);
  if (decimal === "," && candidates.length > 1) candidates = candidates.filter((d) => d !== ",");
  let best = ",", bestAgreeing = 0, bestCount = 0;
  for (const delimiter of candidates) {
    const m = DELIMITERS.indexOf(delimiter), count = first[m];
    const agreeing = rows.filter((row) => row[m] === count).length;
    if (agreeing > bestAgreeing || (agreeing === bestAgreeing && count > bestCount)) {
      [best, bestAgreeing, bestCount] = [delimiter, agreeing, count];
    }
  }
  return best;
}

/** How often each candidate stands outside quotes, row by row; at least one row. */
function countMarks(text: string): number[][] {
  const rows: number[][] = [];
  let row = DELIMITERS.map(() => 0), quoted = false, blank = true;
  const finish = () => {
    if (!blank) rows.push(row);
    row = DELIMITERS.map(() => 0);
    blank = true;
  };
  for (let c = 0; c < text.length && rows.length < SNIFFED_LINES; c++) {
    const mark = text[c];
    if (mark === '"') quoted = !quoted;
    if (!quoted && (mark === "\n" || mark === "\r")) {
      finish();
      continue;
    }
    blank = false;
    const m = quoted ? -1 : DELIMITERS.findIndex((delimiter) => delimiter === mark);
    if (m >= 0) row[m]++;
  }
  finish();
  return rows.length > 0 ? rows : [row];
}

function skipLines(text: string, lines: number): string {
  let start = 0;
  for (let line = 0; line < lines; line++) {
    const end = text.indexOf("\n", start);
    if (end < 0) return "";
    start = end + 1;
  }
  return text.slice(start);
}

function explain(error: CsvError, delimiter: string, { source }: DelimitedOptions): string {
  const line = `line ${error.lines}`;
  if (error.code === "CSV_RECORD_INCONSISTENT_FIELDS_LENGTH") {
    const found = (error.record as string[]).length;
    const wanted = Number(/expect (\d+)/.exec(error.message)?.[1]);
    return `Cannot read ${source} as ${line} has ${cells(found)} where the column names are ` +
      `${wanted} (delimiter ${delimiter === "\t" ? "tab" : delimiter}); mend that line, ` +
      "remove lines above the column names or below the table, or name the delimiter with --delimiter";
  }
  if (error.code === "CSV_QUOTE_NOT_CLOSED") {
    return `Cannot read ${source} as the double quote opened in ${line} is never closed`;
  }
  return `Cannot read ${source} as ${line} has a double quote inside a cell; ` +
    "enclose the whole cell in double quotes and double the one inside";
}

function cells(count: number): string {
  return count === 1 ? "1 cell" : `${count} cells`;
}
