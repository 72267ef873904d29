/**
 * The texts by which an office says "there is no number here".
 *
 * @module
 */
import { CsvError, parse } from "csv-parse/sync";
import { UsageError } from "../layer/errors.ts";

/**
 * Splits a list such as `*,..,<5,-999` into its marker texts. Markers are literal: `<5` is the cell that
 * reads `<5`, not a comparison. Blanks around a marker do not count; a marker that holds a comma or begins or
 * ends with a blank goes in double quotes, CSV style. Empty items and repeats are dropped, since an empty
 * cell is missing anyway.
 *
 * ```ts
 * import assert from "node:assert/strict";
 * assert.deepEqual(parseMissingValues('*, .., <5, "n, a"'), ["*", "..", "<5", "n, a"]);
 * ```
 *
 * @throws {UsageError} when a quote is not closed, or stands inside an unquoted marker.
 */
export function parseMissingValues(list: string): readonly string[] {
  try {
    const [markers = []] = parse(list.replace(/[\r\n]+/g, " "), { trim: true });
    return [...new Set(markers)].filter((marker) => marker !== "");
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    throw new UsageError(
      `Cannot read the list of missing values ${list}; separate the texts by commas and ` +
        "put a text that holds a comma or a quote in double quotes, a quote inside doubled",
    );
  }
}
