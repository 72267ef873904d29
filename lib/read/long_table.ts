/**
 * Tables with several rows per area: which column tells the rows apart.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import type { Table } from "../layer/layer.ts";

type TableColumn = Table["columns"][number];

/** Repeated keys looked at when searching for the column that tells their rows apart. */
const SAMPLED_KEYS = 200;
/** Columns tried in pairs, the first ones that could be dimensions. */
const PAIRED_COLUMNS = 20;

/**
 * The error for a table in which keys repeat. It names the first repeated key with its rows, says how many others
 * there are, and proposes the filter that would leave one row per key.
 *
 * @param keys Key of each row; null where the row does not take part.
 */
export function repeatedKeyError(
  table: Table,
  tableKey: string,
  keys: readonly (string | null)[],
): UnfitDataError {
  const groups = repeatedGroups(keys);
  const [key, rows] = groups[0];
  const listed = rows.slice(0, 3).map((row) => row + 1).join(", ") +
    (rows.length > 3 ? ", ..." : "");
  const others = groups.length === 1 ? "" : ` and ${groups.length - 1} more keys repeat`;
  const sample = groups.slice(0, SAMPLED_KEYS).map(([, rows]) => rows);
  const proposal = proposeFilter(table, tableKey, sample);
  return new UnfitDataError(
    `Cannot join ${table.source} on ${tableKey} as key "${key}" stands in ${rows.length} rows ` +
      `(${listed})${others}; a table with several rows per area needs ` +
      (proposal === null
        ? "--join-where 'FIELD = value' to pick one row of each area"
        : `a filter that picks one row of each area, such as --join-where "${proposal}"`),
  );
}

function repeatedGroups(keys: readonly (string | null)[]): [string, number[]][] {
  const rowsOf = new Map<string, number[]>();
  keys.forEach((key, row) => {
    if (key === null) return;
    const rows = rowsOf.get(key);
    if (rows) rows.push(row);
    else rowsOf.set(key, [row]);
  });
  return [...rowsOf].filter(([, rows]) => rows.length > 1);
}

/**
 * The condition on one or two columns that picks exactly one row in the most groups and never more. Of equals the
 * columns with the fewest values win: a year or a sex has few, a measurement many. Null where no condition does
 * it in more than half of the groups.
 */
function proposeFilter(
  table: Table,
  tableKey: string,
  groups: readonly number[][],
): string | null {
  const columns = table.columns.filter(({ name }) => name !== tableKey);
  const conditions = [
    ...columns.map((column) => [column]),
    ...pairsOf(columns.filter((column) => repeatsValues(column, groups)).slice(0, PAIRED_COLUMNS)),
  ].map((columns) => bestCondition(columns, groups));
  const best = conditions.reduce<Condition | null>((best, condition) => {
    if (condition.covered * 2 <= groups.length) return best;
    const better = best === null || condition.covered > best.covered ||
      (condition.covered === best.covered && condition.values < best.values);
    return better ? condition : best;
  }, null);
  if (best === null) return null;
  return best.columns
    .map(({ name, cells }) => `${fieldText(name)} = ${valueText(cells[best.row])}`)
    .join(" AND ");
}

/** The values that some columns have in one row. */
interface Condition {
  readonly columns: readonly TableColumn[];
  readonly row: number;
  /** Groups in which exactly one row has these values; 0 if any group has more. */
  readonly covered: number;
  /** How many different values the columns have in all. */
  readonly values: number;
}

/** Of values that cover equally many groups the last, which in a table of years is the latest. */
function bestCondition(
  columns: readonly TableColumn[],
  groups: readonly number[][],
): Condition {
  const found = new Map<string, { row: number; covered: number; lastGroup: number }>();
  groups.forEach((rows, group) => {
    for (const row of rows) {
      const key = JSON.stringify(columns.map(({ cells }) => cells[row]));
      const value = found.get(key) ?? { row, covered: 0, lastGroup: -1 };
      value.covered = value.lastGroup === group ? -Infinity : value.covered + 1;
      value.lastGroup = group;
      found.set(key, value);
    }
  });
  const best = [...found.values()].reduce((a, b) => b.covered >= a.covered ? b : a);
  return { columns, row: best.row, covered: Math.max(0, best.covered), values: found.size };
}

/** Whether a column could be one dimension of several: its values come back in other rows. */
function repeatsValues({ cells }: TableColumn, groups: readonly number[][]): boolean {
  const sampled = groups.flat();
  const values = new Set(sampled.map((row) => cells[row])).size;
  return values > 1 && values < sampled.length;
}

function pairsOf(columns: readonly TableColumn[]): TableColumn[][] {
  return columns.flatMap((a, c) => columns.slice(c + 1).map((b) => [a, b]));
}

function fieldText(name: string): string {
  return /^[A-Za-z_]\w*$/.test(name) ? name : `\\"${name}\\"`;
}

function valueText(value: string): string {
  return /^(0|[1-9]\d*)$/.test(value) ? value : `'${value.replaceAll("'", "''")}'`;
}
