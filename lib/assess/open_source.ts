/**
 * Opening what the user named: a vector layer, or a table that carries coordinates.
 *
 * @module
 */
import { extname } from "node:path";
import type { Layer } from "../layer/layer.ts";
import { resolveCrs } from "../read/crs.ts";
import { readTable } from "../read/table.ts";
import { tableLayer } from "../read/table_layer.ts";
import { readLayer } from "../read/vector.ts";
import type { SourceOptions } from "./options.ts";

const TABLE_ENDINGS = new Set([".csv", ".tsv", ".txt", ".xlsx"]);

/**
 * Reads a layer whatever it came in. Tables (CSV, TSV, XLSX) become layers through their x/y or WKT columns; all
 * else goes through GDAL.
 *
 * @param options `crs` is used only where the file itself declares none.
 * @throws {UnreadableError} naming the file.
 */
export async function openSource(path: string, options: SourceOptions = {}): Promise<Layer> {
  const layer = TABLE_ENDINGS.has(extname(path).toLowerCase())
    ? await tableLayer(await readTable(path, options), options)
    : await readLayer(path, { layer: options.layer });
  if (layer.crs || !options.crs) return layer;
  return { ...layer, crs: await resolveCrs(options.crs) };
}
