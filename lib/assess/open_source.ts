/**
 * Opening what the user named: a vector layer, or a table that carries coordinates.
 *
 * @module
 */
import type { Layer } from "../layer/layer.ts";
import { resolveCrs } from "../read/crs.ts";
import { isTable, readTable } from "../read/table.ts";
import { tableLayer } from "../read/table_layer.ts";
import { readLayer } from "../read/vector.ts";
import type { SourceOptions } from "./options.ts";

/**
 * Reads a layer whatever it came in. Tables (CSV, TSV, XLSX) become layers through their x/y or WKT columns; all
 * else goes through GDAL.
 *
 * @param options `crs` is used only where the file itself declares none.
 * @throws {UnreadableError} naming the file.
 */
export async function openSource(
  path: string,
  options: SourceOptions = {},
): Promise<{ layer: Layer; notes: readonly string[] }> {
  if (isTable(path)) {
    const table = await readTable(path, options);
    return { layer: await tableLayer(table, options), notes: [] };
  }
  const layer = await readLayer(path, { layer: options.layer, encoding: options.encoding });
  if (!options.crs) return { layer, notes: [] };
  if (!layer.crs) return { layer: { ...layer, crs: await resolveCrs(options.crs) }, notes: [] };
  const note = `--crs ${options.crs} was not used as ${layer.source} declares ${layer.crs.name}`;
  return { layer, notes: [note] };
}
