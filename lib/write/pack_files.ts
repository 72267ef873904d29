/**
 * How the files of one layer are handed over.
 *
 * @module
 */
import { unzipSync, type Zippable, zipSync } from "fflate";
import type { NamedBytes } from "../read/gdal_folder.ts";
import type { OutputFormat } from "./output_formats.ts";

/** The earliest time a zip archive can note. */
const NO_TIME = new Date(1980, 0, 1);

/** Packs the files that GDAL wrote for the layer `name` in the way of their format. */
export function packFiles(
  files: readonly NamedBytes[],
  name: string,
  { packing }: OutputFormat,
): NamedBytes[] {
  switch (packing) {
    case "zip":
      return [{ name: `${name}.zip`, bytes: zip(files) }];
    case "repack":
      return files.map(({ name, bytes }) => ({ name, bytes: zip(members(bytes)) }));
    default:
      return [...files];
  }
}

function members(archive: Uint8Array): NamedBytes[] {
  return Object.entries(unzipSync(archive)).map(([name, bytes]) => ({ name, bytes }));
}

/** Packs in the order given. OpenDocument wants its `mimetype` first and uncompressed. */
function zip(files: readonly NamedBytes[]): Uint8Array {
  const entries: Zippable = {};
  for (const { name, bytes } of files) {
    entries[name] = [bytes, { mtime: NO_TIME, level: name === "mimetype" ? 0 : 6 }];
  }
  return zipSync(entries);
}
