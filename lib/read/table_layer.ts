/**
 * A layer from a table that carries coordinates: x and y columns, or one column of geometry text.
 *
 * @module
 */
import { basename, extname } from "node:path";
import { UnreadableError, UsageError } from "../layer/errors.ts";
import { GEOMETRY_KINDS } from "../layer/geometry.ts";
import type { Crs, Layer, Table } from "../layer/layer.ts";
import { resolveCrs } from "./crs.ts";
import { detectNumberFormat, numberParser } from "./number_format.ts";
import { columnList, tableColumn } from "./table.ts";
import { readVectorBytes } from "./vector.ts";

/** Options of {@link tableLayer}; columns that are left out are found by their names. */
export interface TableLayerOptions {
  /** Column of x, easting or longitude. */
  readonly x?: string;
  /** Column of y, northing or latitude. */
  readonly y?: string;
  /** Column of geometry as WKT (or hexadecimal WKB). */
  readonly wkt?: string;
  /** CRS of the coordinates, such as `EPSG:25832`. @default WGS 84 for columns called lon and lat, else none */
  readonly crs?: string;
}

const WKT_NAMES = ["wkt", "geom", "geometry", "the_geom"];
const DEGREE_NAMES = [["longitude", "latitude"], ["lon", "lat"], ["long", "lat"], ["lng", "lat"]];
const PLANE_NAMES = [["easting", "northing"], ["eastings", "northings"], ["x", "y"]];

/** The columns that hold the geometry, by name. */
type Place =
  | { readonly kind: "wkt"; readonly wkt: string }
  | { readonly kind: "xy"; readonly x: string; readonly y: string };

/**
 * Builds a layer of points, or of whatever a geometry column holds; row for row as in the table, rows without
 * coordinates without geometry. Without options it takes a column called wkt, geom, geometry or the_geom, else
 * longitude and latitude (lon, long or lng, lat), easting and northing, or x and y, in any letter case. Coordinates may
 * have a decimal comma. x and y stay fields; the geometry column does not.
 *
 * A column becomes a number field where every filled cell is a plain number without leading zeros; all else stays text.
 * Columns called longitude and latitude with values in the range of degrees are taken for WGS 84, and the
 * CRS name says that this was assumed.
 *
 * Cost: that of a CSV file of the same size through GDAL.
 *
 * @throws {UsageError} when the columns named do not exist, or none are found.
 * @throws {UnreadableError} naming the row whose coordinates cannot be read.
 */
export async function tableLayer(table: Table, options: TableLayerOptions = {}): Promise<Layer> {
  const place = placeOf(table, options);
  const shapes = place.kind === "wkt"
    ? tableColumn(table, place.wkt).cells.map(shapeText)
    : pointTexts(table, place);
  const name = `${basename(table.source, extname(table.source))}.csv`;
  const shapeName = unusedName(table);
  const bytes = csvFor(table, place, shapeName, shapes);
  const layer = await readVectorBytes(name, bytes, { openOptions: openOptions(shapeName) });
  checkShapes(table, place, shapes, layer);
  return { ...layer, source: table.source, crs: await crsOf(table, place, options) };
}

function placeOf(table: Table, { x, y, wkt }: TableLayerOptions): Place {
  if (wkt !== undefined) {
    if (x === undefined && y === undefined) {
      return { kind: "wkt", wkt: tableColumn(table, wkt).name };
    }
    throw new UsageError("Cannot use --wkt together with --x and --y; a layer has one geometry");
  }
  if (x !== undefined && y !== undefined) {
    return { kind: "xy", x: tableColumn(table, x).name, y: tableColumn(table, y).name };
  }
  if (x !== undefined || y !== undefined) {
    throw new UsageError(
      `Cannot use --${x === undefined ? "y" : "x"} alone; name both --x and --y`,
    );
  }
  return findPlace(table);
}

function findPlace(table: Table): Place {
  const called = (wanted: string) =>
    table.columns.find(({ name }) => name.toLowerCase() === wanted)?.name;
  for (const candidate of WKT_NAMES) {
    const wkt = called(candidate);
    if (wkt !== undefined) return { kind: "wkt", wkt };
  }
  for (const [xName, yName] of [...DEGREE_NAMES, ...PLANE_NAMES]) {
    const x = called(xName), y = called(yName);
    if (x !== undefined && y !== undefined) return { kind: "xy", x, y };
  }
  throw new UsageError(
    `Cannot find coordinates in ${table.source}, which has ${columnList(table)}; ` +
      "name the columns with --x and --y, or with --wkt, or join the table to a layer with --join",
  );
}

/** An empty geometry is no geometry. */
function shapeText(cell: string): string {
  const text = cell.trim();
  return /\bEMPTY$/i.test(text) ? "" : text;
}

function pointTexts(table: Table, place: Place & { kind: "xy" }): string[] {
  const xs = coordinates(table, place.x), ys = coordinates(table, place.y);
  return Array.from(xs, (x, row) => Number.isNaN(x + ys[row]) ? "" : `POINT (${x} ${ys[row]})`);
}

/** One coordinate of each row, NaN where the cell is empty. */
function coordinates(table: Table, name: string): Float64Array {
  const { cells } = tableColumn(table, name);
  const filled = cells.filter((cell) => cell.trim() !== "");
  // A coordinate such as 13,405 has a decimal comma; nobody groups the digits of degrees.
  const parse = numberParser(detectNumberFormat(filled, { thousands: "none" }).format);
  return Float64Array.from(cells, (cell, row) => {
    if (cell.trim() === "") return NaN;
    const value = parse(cell);
    if (value !== null && Number.isFinite(value)) return value;
    throw new UnreadableError(
      `Cannot read coordinate "${cell}" of column ${name} in row ${row + 1} of ${table.source}; ` +
        "mend it, or leave the cell empty for a row without geometry",
    );
  });
}

function unusedName({ columns }: Table): string {
  let name = "_shape";
  while (columns.some((column) => column.name === name)) name += "_";
  return name;
}

/** Types are found by GDAL in unquoted cells only, so quoting decides which columns stay text. */
function openOptions(shapeName: string): string[] {
  return [
    ...["HEADERS=YES", "SEPARATOR=COMMA", "MAX_LINE_SIZE=-1"],
    ...["AUTODETECT_TYPE=YES", "AUTODETECT_SIZE_LIMIT=0", "QUOTED_FIELDS_AS_STRING=YES"],
    ...[`GEOM_POSSIBLE_NAMES=${shapeName}`, "KEEP_GEOM_COLUMNS=NO"],
  ];
}

function csvFor(
  table: Table,
  place: Place,
  shapeName: string,
  shapes: readonly string[],
): Uint8Array {
  const columns = table.columns.filter(({ name }) => place.kind === "xy" || name !== place.wkt);
  const cellOf = columns.map(({ cells }) =>
    isNumeric(cells) ? (row: number) => cells[row].trim() : (row: number) => quoted(cells[row])
  );
  const lines = [[shapeName, ...columns.map(({ name }) => name)].map(quoted).join(",")];
  shapes.forEach((shape, row) => {
    lines.push([quoted(shape), ...cellOf.map((cell) => cell(row))].join(","));
  });
  return new TextEncoder().encode(lines.join("\n") + "\n");
}

function quoted(text: string): string {
  return `"${text.replaceAll('"', '""')}"`;
}

/** Whole numbers must fit 64 bits; `0042`, `+5` and `1.` are left as texts. */
const PLAIN_NUMBER = /^-?(?:0|[1-9]\d{0,17})(?:\.\d+)?(?:[eE][+-]?\d{1,2})?$/;

function isNumeric(cells: readonly string[]): boolean {
  const filled = cells.map((cell) => cell.trim()).filter((cell) => cell !== "");
  return filled.length > 0 && filled.every((cell) => PLAIN_NUMBER.test(cell));
}

function checkShapes(table: Table, place: Place, shapes: readonly string[], layer: Layer): void {
  const none = GEOMETRY_KINDS.indexOf("none");
  const row = shapes.findIndex((shape, row) => shape !== "" && layer.geometry.kinds[row] === none);
  if (row < 0) return;
  const shape = shapes[row].length > 40 ? `${shapes[row].slice(0, 40)}...` : shapes[row];
  const column = place.kind === "wkt" ? ` of column ${place.wkt}` : "";
  throw new UnreadableError(
    `Cannot read the geometry "${shape}"${column} in row ${row + 1} of ${table.source}; ` +
      "it must be WKT such as POINT (13.4 52.5)",
  );
}

async function crsOf(table: Table, place: Place, { crs }: TableLayerOptions): Promise<Crs | null> {
  if (crs !== undefined) return await resolveCrs(crs);
  if (place.kind !== "xy" || !inDegrees(table, place)) return null;
  const assumed = await resolveCrs("EPSG:4326");
  return { ...assumed, name: `${assumed.name}, assumed from columns ${place.x} and ${place.y}` };
}

function inDegrees(table: Table, { x, y }: Place & { kind: "xy" }): boolean {
  const [xName, yName] = [x.toLowerCase(), y.toLowerCase()];
  if (!DEGREE_NAMES.some(([lon, lat]) => lon === xName && lat === yName)) return false;
  const within = (name: string, limit: number) =>
    coordinates(table, name).every((value) => Number.isNaN(value) || Math.abs(value) <= limit);
  return within(x, 180) && within(y, 90);
}
