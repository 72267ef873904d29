/**
 * A table's columns beside a layer's, matched by a key.
 *
 * @module
 */
import { readColumn } from "../layer/column.ts";
import { UnfitDataError } from "../layer/errors.ts";
import type { ColumnValues, Layer, Table } from "../layer/layer.ts";
import { joinHint } from "./join_hint.ts";
import { repeatedKeyError } from "./long_table.ts";
import { tableColumn } from "./table.ts";

/** Options of {@link joinTable}. */
export interface JoinOptions {
  /** Field of the layer. */
  readonly layerKey: string;
  /** Column of the table. */
  readonly tableKey: string;
  /** Rows of the table to join. @default all */
  readonly keep?: (row: number) => boolean;
}

/** What a join matched and what it did not. Lists hold distinct keys in file order, the first 100. */
export interface JoinReport {
  /** File name of the table. */
  readonly table: string;
  /** Field of the layer. */
  readonly layerKey: string;
  /** Column of the table. */
  readonly tableKey: string;
  /** Areas that found their row. */
  readonly matched: number;
  /** Keys of areas that found none; `(no key)` stands for a null or empty key. */
  readonly layerOnly: readonly string[];
  /** Areas that found none. */
  readonly layerOnlyCount: number;
  /** Keys of table rows that no area asked for. */
  readonly tableOnly: readonly string[];
  /** Kept table rows with a key that no area asked for. */
  readonly tableOnlyCount: number;
  /** How more keys would match, or null where nothing simple helps. */
  readonly hint: string | null;
  /** Table columns that took another name because the layer has a field of theirs. */
  readonly renamed: readonly { readonly from: string; readonly to: string }[];
  /** Sentences worth telling: renamed columns, areas that share a key. */
  readonly notes: readonly string[];
}

/** What comparing the two sides' keys found. */
type Matches = Omit<JoinReport, "table" | "layerKey" | "tableKey" | "renamed" | "notes">;

const LISTED_KEYS = 100;
const NO_KEY = "(no key)";

/**
 * Puts the columns of a table beside those of a layer. Keys match when their texts are exactly equal; a number in the
 * layer counts as its shortest decimal text. Null and empty keys match nothing. Several areas may share a key and
 * get the same cells; several rows of the table may not.
 *
 * The table's columns (all but its key) become text columns in `layer.added`, null for areas without a row. A column whose
 * name the layer has already, in whatever case, is called `NAME (TABLE FILE)`.
 *
 * Cost: rows of both sides, times columns of the table.
 *
 * @throws {UsageError} when a key field does not exist.
 * @throws {UnfitDataError} when a key stands in several kept rows, when no row is kept, or when nothing matches.
 */
export function joinTable(
  layer: Layer,
  table: Table,
  options: JoinOptions,
): { layer: Layer; report: JoinReport } {
  const layerKeys = keyTexts(readColumn(layer, options.layerKey));
  const tableKeys = keptKeys(table, options);
  const rowOfKey = indexRows(table, tableKeys, options.tableKey);
  const rows = layerKeys.map((key) => key === null ? -1 : rowOfKey.get(key) ?? -1);
  const matches = compareKeys(layerKeys, rowOfKey);
  const keys = { table: table.source, layerKey: options.layerKey, tableKey: options.tableKey };
  if (matches.matched === 0) throw nothingMatches(layer, { ...keys, ...matches });
  const names = namesFor(layer, table, options.tableKey);
  const added = [...names].map(([from, name]): ColumnValues => {
    const { cells } = tableColumn(table, from);
    const values = rows.map((row) => row < 0 ? null : cells[row]);
    return { name, kind: "text", storedAs: "text", values };
  });
  const renamed = [...names].flatMap(([from, to]) => from === to ? [] : [{ from, to }]);
  return {
    layer: { ...layer, added: [...layer.added, ...added] },
    report: { ...keys, ...matches, renamed, notes: notesOn(renamed, layerKeys, rows) },
  };
}

function keyTexts({ values, kind }: ColumnValues): (string | null)[] {
  return Array.from<string | number | null, string | null>(values, (value) => {
    if (value === null || value === "" || Number.isNaN(value)) return null;
    return kind === "boolean" ? String(Boolean(value)) : String(value);
  });
}

/** Keys of the table, row by row; null where the row is not kept or has no key. */
function keptKeys(table: Table, { tableKey, keep = () => true }: JoinOptions): (string | null)[] {
  let kept = 0;
  const keys = tableColumn(table, tableKey).cells.map((cell, row) => {
    if (!keep(row)) return null;
    kept++;
    return cell === "" ? null : cell;
  });
  if (kept > 0) return keys;
  throw new UnfitDataError(
    `Cannot join ${table.source} as none of its ${table.count} rows is selected by --join-where`,
  );
}

function indexRows(
  table: Table,
  keys: readonly (string | null)[],
  tableKey: string,
): Map<string, number> {
  const rowOfKey = new Map<string, number>();
  keys.forEach((key, row) => {
    if (key === null) return;
    if (rowOfKey.has(key)) throw repeatedKeyError(table, tableKey, keys);
    rowOfKey.set(key, row);
  });
  return rowOfKey;
}

function compareKeys(
  layerKeys: readonly (string | null)[],
  rowOfKey: ReadonlyMap<string, number>,
): Matches {
  const wanted = new Set(layerKeys);
  const alone = layerKeys.filter((key) => key === null || !rowOfKey.has(key));
  const unasked = [...rowOfKey.keys()].filter((key) => !wanted.has(key));
  const layerOnly = [...new Set(alone)];
  return {
    matched: layerKeys.length - alone.length,
    layerOnly: layerOnly.slice(0, LISTED_KEYS).map((key) => key ?? NO_KEY),
    layerOnlyCount: alone.length,
    tableOnly: unasked.slice(0, LISTED_KEYS),
    tableOnlyCount: unasked.length,
    hint: joinHint(layerOnly.filter((key) => key !== null), unasked),
  };
}

function nothingMatches(
  layer: Layer,
  report: Matches & Pick<JoinReport, "table" | "layerKey" | "tableKey">,
): UnfitDataError {
  const sample = (keys: readonly string[]) => keys.slice(0, 3).map((key) => `"${key}"`).join(", ");
  return new UnfitDataError(
    `Cannot join ${report.table} to ${layer.source} as no ${report.tableKey} of the table ` +
      `(${sample(report.tableOnly) || "all empty"}) equals any ${report.layerKey} of the layer ` +
      `(${sample(report.layerOnly)}); ` +
      (report.hint ?? "check that --on names the same key on both sides"),
  );
}

/** New name of each table column except the key, in table order. */
function namesFor(layer: Layer, table: Table, tableKey: string): Map<string, string> {
  const taken = new Set(
    [...layer.columns, ...layer.added].map(({ name }) => name.toLowerCase()),
  );
  const names = new Map<string, string>();
  for (const { name } of table.columns) {
    if (name === tableKey) continue;
    let free = name;
    for (let copy = 1; taken.has(free.toLowerCase()); copy++) {
      free = `${name} (${table.source}${copy === 1 ? "" : ` ${copy}`})`;
    }
    taken.add(free.toLowerCase());
    names.set(name, free);
  }
  return names;
}

function notesOn(
  renamed: JoinReport["renamed"],
  layerKeys: readonly (string | null)[],
  rows: readonly number[],
): string[] {
  const notes = renamed.map(({ from, to }) =>
    `The layer has a field "${from}" already, so that of the table is called "${to}"`
  );
  const matchedKeys = layerKeys.filter((_, area) => rows[area] >= 0);
  const distinct = new Set(matchedKeys).size;
  if (distinct < matchedKeys.length) {
    notes.push(
      `${matchedKeys.length} areas were matched by ${distinct} keys: areas that share a key ` +
        "got the same values",
    );
  }
  return notes;
}
