/**
 * Checksums of the input files, so that a reviewer knows they have the same ones.
 *
 * @module
 */
import { createHash } from "node:crypto";
import { readdir, readFile, stat } from "node:fs/promises";
import { basename, dirname, extname, join } from "node:path";

/** One input file. */
export interface RecordedInput {
  /** What it was used for: `layer`, `table` or `links`. */
  readonly role: string;
  /** The path as the user gave it. */
  readonly path: string;
  readonly bytes: number;
  /** SHA-256 in hexadecimal. */
  readonly sha256: string;
}

/** Endings of formats that keep one layer in several files of one name. */
const SETS = [
  [".shp", ".shx", ".dbf", ".prj", ".cpg"],
  [".tab", ".dat", ".map", ".id", ".ind"],
  [".mif", ".mid"],
];

/** Size and SHA-256 of a file, of every file of its set (Shapefile, MapInfo), or of every file in a folder. */
export async function recordInput(role: string, path: string): Promise<RecordedInput[]> {
  const records: RecordedInput[] = [];
  for (const file of await filesOf(path)) {
    const bytes = await readFile(file);
    records.push({ role, path: file, bytes: bytes.length, sha256: sha256(bytes) });
  }
  return records;
}

async function filesOf(path: string): Promise<string[]> {
  if ((await stat(path)).isDirectory()) {
    return (await readdir(path)).sort().map((name) => join(path, name));
  }
  const ending = extname(path).toLowerCase();
  const set = SETS.find((endings) => endings[0] === ending);
  if (!set) return [path];
  const stem = basename(path, extname(path));
  const siblings = (await readdir(dirname(path))).sort().filter((name) =>
    basename(name, extname(name)) === stem && set.includes(extname(name).toLowerCase())
  );
  return siblings.map((name) => join(dirname(path), name));
}

function sha256(bytes: Uint8Array): string {
  return createHash("sha256").update(bytes).digest("hex");
}
