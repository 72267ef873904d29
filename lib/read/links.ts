/**
 * Neighbor links given as a file: travel times, flows, a list someone agreed on, links that nearkin wrote.
 *
 * @module
 */
import { basename } from "node:path";
import { readColumn } from "../layer/column.ts";
import { UnfitDataError, UnreadableError } from "../layer/errors.ts";
import { suggestion } from "../layer/nearest_name.ts";
import { isTable, readTable, type TableOptions } from "./table.ts";
import { readLayer } from "./vector.ts";

/** Directed links by position, in the order of the file. */
export interface LinkList {
  readonly from: Uint32Array;
  readonly to: Uint32Array;
  /** Null where the file has no `weight` column. */
  readonly weight: Float64Array | null;
}

/** Columns of a file as text. */
interface LinkCells {
  readonly source: string;
  readonly names: readonly string[];
  readonly cellsOf: (name: string) => readonly string[];
}

/** How many unknown ids a message lists. */
const LISTED = 5;

/**
 * Reads the columns `from`, `to` and, if there is one, `weight` of a table or of the lines of a vector file; others
 * are ignored. Without `from` and `to`, `from_row` and `to_row` hold positions, as in links that nearkin wrote.
 *
 * @param names Id of each area; what stands in `from` and `to` is looked up here.
 * @throws {UnreadableError} without the two columns, or for a weight that is no number.
 * @throws {UnfitDataError} for ids that no area has, all counted and the first listed, and for a negative weight.
 */
export async function readLinks(
  path: string,
  names: readonly string[],
  options: TableOptions = {},
): Promise<LinkList> {
  const file = isTable(path) ? await tableCells(path, options) : await layerCells(path);
  const byRow = !has(file, "from") && has(file, "from_row") && has(file, "to_row");
  const positions = new Map(names.map((name, at) => [byRow ? String(at) : name, at]));
  const from = columnOf(file, byRow ? "from_row" : "from");
  const to = columnOf(file, byRow ? "to_row" : "to");
  const unknown = new Set([...from, ...to].filter((name) => !positions.has(name)));
  if (unknown.size > 0) {
    const listed = [...unknown].slice(0, LISTED).map((name) => `"${name}"`).join(", ");
    throw new UnfitDataError(
      `Cannot use the links of ${file.source} as ${unknown.size} of its ids name no area (${listed}` +
        `${unknown.size > LISTED ? ", …" : ""}); --id chooses the field that holds the ids`,
    );
  }
  const positionsOf = (cells: readonly string[]) =>
    Uint32Array.from(cells, (name) => positions.get(name)!);
  return { from: positionsOf(from), to: positionsOf(to), weight: weightsOf(file) };
}

async function tableCells(path: string, options: TableOptions): Promise<LinkCells> {
  const { source, columns } = await readTable(path, options);
  return {
    source,
    names: columns.map(({ name }) => name),
    cellsOf: (name) => columns.find((column) => column.name === name)!.cells,
  };
}

async function layerCells(path: string): Promise<LinkCells> {
  const layer = await readLayer(path);
  return {
    source: basename(path),
    names: layer.columns.map(({ name }) => name),
    cellsOf: (name) => {
      const { values } = readColumn(layer, name);
      return Array.from<string | number | null, string>(
        values,
        (value) => value === null ? "" : String(value),
      );
    },
  };
}

function nameIn({ names }: LinkCells, wanted: string): string | undefined {
  return names.find((name) => name.toLowerCase() === wanted);
}

function has(file: LinkCells, wanted: string): boolean {
  return nameIn(file, wanted) !== undefined;
}

function columnOf(file: LinkCells, wanted: string): readonly string[] {
  const name = nameIn(file, wanted);
  if (name !== undefined) return file.cellsOf(name).map((cell) => cell.trim());
  throw new UnreadableError(
    `Cannot read links from ${file.source} as it has no column "${wanted}" (it has ${
      file.names.join(", ")
    })${suggestion(wanted, file.names)}`,
  );
}

function weightsOf(file: LinkCells): Float64Array | null {
  const name = nameIn(file, "weight");
  if (name === undefined) return null;
  return Float64Array.from(file.cellsOf(name), (cell, row) => {
    const weight = Number(cell);
    const where = `in row ${row + 1} of ${file.source}`;
    if (cell.trim() === "" || !Number.isFinite(weight)) {
      throw new UnreadableError(`Cannot read the weight "${cell}" ${where}; write a plain number`);
    }
    if (weight >= 0) return weight;
    throw new UnfitDataError(
      `Cannot use the weight ${cell.trim()} ${where} as weights must not be negative`,
    );
  });
}
