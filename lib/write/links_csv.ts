/**
 * Links as a table that reads back through the rule `links:FILE`.
 *
 * @module
 */
import { csvText } from "./csv_text.ts";
import type { LinkTable } from "./results.ts";
import type { ColumnValues } from "../layer/layer.ts";

/**
 * The columns `from,to,weight,distance`, one row per directed link; numbers in shortest form, so that
 * they read back bit for bit. `distance` is empty where none was measured.
 *
 * @param names What to call each row of the layer.
 */
export function linksCsv(links: LinkTable, names: readonly string[]): string {
  const text = (name: string, rows: Uint32Array): ColumnValues => ({
    name,
    kind: "text",
    storedAs: "text",
    values: Array.from(rows, (row) => names[row]),
  });
  const number = (name: string, values: Float64Array): ColumnValues => ({
    name,
    kind: "number",
    storedAs: "Float64",
    values,
  });
  const unmeasured = () => new Float64Array(links.from.length).fill(NaN);
  const columns = [
    text("from", links.from),
    text("to", links.to),
    number("weight", links.weight),
    number("distance", links.distance ?? unmeasured()),
  ];
  return csvText(columns, { formulaSafe: false });
}
