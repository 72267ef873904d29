/**
 * How GDAL should open a file so that text comes through as the file has it.
 *
 * @module
 */
import { extname } from "node:path";
import type { NamedBytes } from "./gdal_folder.ts";

/** What the caller may ask for. */
export interface OpenChoices {
  readonly encoding?: string;
  readonly openOptions?: readonly string[];
}

/**
 * GDAL open options for one file.
 *
 * GeoJSON: text that looks like a date stays the text it is, arrays become text. Shapefile: the encoding asked
 * for; else, without a `.cpg` file, UTF-8 where the table's bytes can be nothing else.
 */
export function openOptionsFor(
  name: string,
  files: readonly NamedBytes[],
  { encoding, openOptions = [] }: OpenChoices,
): string[] {
  switch (extname(name).toLowerCase()) {
    case ".geojson":
    case ".json":
      return ["DATE_AS_STRING=YES", "ARRAY_AS_STRING=YES", ...openOptions];
    case ".shp":
    case ".dbf":
      return [...encodingOption(encoding ?? guessEncoding(name, files)), ...openOptions];
    default:
      return [...openOptions];
  }
}

function encodingOption(encoding: string | undefined): string[] {
  return encoding === undefined ? [] : [`ENCODING=${encoding}`];
}

/** GDAL takes an unmarked table for Latin-1, but much software writes UTF-8 without the mark. */
function guessEncoding(name: string, files: readonly NamedBytes[]): string | undefined {
  const stem = name.slice(0, -extname(name).length).toLowerCase();
  const beside = (ending: string) =>
    files.find((file) => file.name.toLowerCase() === stem + ending);
  const table = beside(".dbf")?.bytes;
  if (table === undefined || beside(".cpg") !== undefined) return undefined;
  return isUtf8BeyondAscii(table.subarray(headerLength(table))) ? "UTF-8" : undefined;
}

/** Length of a dBase header, stored in its bytes 8 and 9. */
function headerLength(table: Uint8Array): number {
  return table.length < 32 ? table.length : table[8] | table[9] << 8;
}

function isUtf8BeyondAscii(bytes: Uint8Array): boolean {
  if (!bytes.some((byte) => byte > 127)) return false;
  try {
    new TextDecoder("utf-8", { fatal: true }).decode(bytes);
    return true;
  } catch {
    return false;
  }
}
