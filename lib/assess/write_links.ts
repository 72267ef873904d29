/**
 * Links as a file: a table, or lines in any vector format.
 *
 * @module
 */
import { dirname, extname, join, parse } from "node:path";
import { linksCsv } from "../write/links_csv.ts";
import { linksFgb } from "../write/links_layer.ts";
import { type FolderOptions, writeFiles } from "../write/outcome_folder.ts";
import { convertFgb, knownFormat } from "../write/vector.ts";
import type { BuiltLinks } from "./build_links.ts";

/** The format of a links file by its ending. @throws {UsageError} that lists the formats. */
export function linksFormat(path: string): string {
  return knownFormat(extname(path).slice(1));
}

/**
 * Writes links where the user asked for them: a table for `.csv`, else lines between the points of the areas. The
 * rule `links:FILE` reads both back, with every weight bit for bit where the format keeps whole doubles.
 *
 * @returns Paths of the files written; a Shapefile comes as one archive.
 * @throws {UsageError} for an ending that no format has.
 * @throws {UnwritableError} when a file is there and `force` is off, or the disk refuses.
 */
export async function writeLinks(
  built: BuiltLinks,
  path: string,
  options: FolderOptions = {},
): Promise<string[]> {
  const files = await linkFiles(built, path);
  await writeFiles(files, options);
  return [...files.keys()];
}

async function linkFiles(
  { links, names, named, places, crs }: BuiltLinks,
  path: string,
): Promise<Map<string, Uint8Array | string>> {
  const format = linksFormat(path);
  if (format === "csv") return new Map([[path, linksCsv(links, names)]]);
  const fgb = linksFgb({ crs, points: places, links, ids: named ? names : undefined });
  if (format === "fgb") return new Map([[path, fgb]]);
  const { files } = await convertFgb(fgb, parse(path).name, format);
  return new Map(files.map(({ name, bytes }) => [join(dirname(path), name), bytes]));
}
