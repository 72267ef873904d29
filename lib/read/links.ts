/**
 * Neighbor links given as a table: travel times, flows, a list someone agreed on.
 *
 * @module
 */
import { UnfitDataError, UnreadableError } from "../layer/errors.ts";
import { suggestion } from "../layer/nearest_name.ts";
import type { Table } from "../layer/layer.ts";
import { readTable, type TableOptions } from "./table.ts";

/** Directed links by position, in the order of the file. */
export interface LinkList {
  readonly from: Uint32Array;
  readonly to: Uint32Array;
  /** Null where the file has no `weight` column. */
  readonly weight: Float64Array | null;
}

/** How many unknown ids a message lists. */
const LISTED = 5;

/**
 * Reads a table with the columns `from`, `to` and, if there is one, `weight`; others are ignored.
 *
 * @param names Id of each area; what stands in `from` and `to` is looked up here.
 * @throws {UnreadableError} without the two columns, or for a weight that is no number.
 * @throws {UnfitDataError} for ids that no area has, all counted and the first listed.
 */
export async function readLinks(
  path: string,
  names: readonly string[],
  options: TableOptions = {},
): Promise<LinkList> {
  const table = await readTable(path, options);
  const positions = new Map(names.map((name, at) => [name, at]));
  const from = cellsOf(table, "from"), to = cellsOf(table, "to");
  const unknown = new Set([...from, ...to].filter((name) => !positions.has(name)));
  if (unknown.size > 0) {
    const listed = [...unknown].slice(0, LISTED).map((name) => `"${name}"`).join(", ");
    throw new UnfitDataError(
      `Cannot use the links of ${table.source} as ${unknown.size} of its ids name no area (${listed}` +
        `${unknown.size > LISTED ? ", …" : ""}); --id chooses the field that holds the ids`,
    );
  }
  const positionsOf = (cells: readonly string[]) =>
    Uint32Array.from(cells, (name) => positions.get(name)!);
  return { from: positionsOf(from), to: positionsOf(to), weight: weightsOf(table) };
}

function cellsOf(table: Table, name: string): readonly string[] {
  const column = table.columns.find((column) => column.name.toLowerCase() === name);
  if (column) return column.cells.map((cell) => cell.trim());
  const names = table.columns.map((column) => column.name);
  throw new UnreadableError(
    `Cannot read links from ${table.source} as it has no column "${name}" (it has ${
      names.join(", ")
    })${suggestion(name, names)}`,
  );
}

function weightsOf(table: Table): Float64Array | null {
  const column = table.columns.find(({ name }) => name.toLowerCase() === "weight");
  if (!column) return null;
  return Float64Array.from(column.cells, (cell, row) => {
    const weight = Number(cell);
    if (cell.trim() !== "" && Number.isFinite(weight)) return weight;
    throw new UnreadableError(
      `Cannot read the weight "${cell}" in row ${row + 1} of ${table.source}; write a plain number`,
    );
  });
}
