/**
 * The files that make up a vector source: what the user named, and what belongs to it.
 *
 * @module
 */
import { unzipSync } from "fflate";
import { readdir, readFile, stat } from "node:fs/promises";
import { basename, dirname, extname, join } from "node:path";
import { UnreadableError } from "../layer/errors.ts";
import { suggestion } from "../layer/nearest_name.ts";
import type { NamedBytes } from "./gdal_folder.ts";
import { kmlToGeoJson } from "./kml.ts";

/** Files in memory and which of them to open. */
export interface SourceFiles {
  /** File name of what the user named, without folders. */
  readonly name: string;
  readonly files: readonly NamedBytes[];
  /** Names of the files (or folders) to open as datasets, sorted. */
  readonly datasets: readonly string[];
}

/** Endings that complete a file of another ending; they lie beside it under the same name. */
const COMPANIONS: Readonly<Record<string, readonly string[]>> = {
  ".shp": [".shx", ".dbf", ".prj", ".cpg"],
  ".dbf": [".cpg"],
  ".tab": [".dat", ".map", ".id", ".ind"],
  ".mif": [".mid"],
  ".gml": [".xsd", ".gfs"],
  ".csv": [".csvt", ".prj"],
  ".gpkg": [".gpkg-wal"],
};

/** Endings worth opening inside an archive. */
const OPENED_IN_ARCHIVES: ReadonlySet<string> = new Set(
  (".shp .tab .mif .gpkg .geojson .json .geojsonl .ndjson .fgb .kml .gml .topojson .sqlite .gdb " +
    ".dxf .e00 .gpx .jml .gmt").split(" "),
);

/**
 * Reads a file with its side files, the members of a zip archive, or a file geodatabase folder (`.gdb`).
 * @throws UnreadableError where there is no such file, or it cannot be read.
 */
export async function readSourceFiles(path: string): Promise<SourceFiles> {
  const name = basename(path);
  const found = await stat(path).catch((cause) => explain(path, cause));
  if (found.isDirectory()) return await readFolder(path, name);
  const main = { name, bytes: await readBytes(path) };
  if (isZip(main.bytes)) return unpack(main);
  const companions = await readCompanions(path);
  return withoutKml({ name, files: [main, ...companions], datasets: [name] });
}

/** The same for bytes that are in memory already; a zip archive is unpacked. */
export function sourceFilesOf(name: string, bytes: Uint8Array): SourceFiles {
  const main = { name, bytes };
  return isZip(bytes) ? unpack(main) : withoutKml({ name, files: [main], datasets: [name] });
}

async function readFolder(path: string, name: string): Promise<SourceFiles> {
  const isGeodatabase = extname(name).toLowerCase() === ".gdb";
  const inside = await readdir(path);
  if (!isGeodatabase) {
    const layers = inside.filter((entry) => OPENED_IN_ARCHIVES.has(extname(entry).toLowerCase()));
    const hint = layers.length > 0
      ? `name a file in it, such as ${layers.sort()[0]}`
      : "name a file";
    throw new UnreadableError(`Cannot read ${path} as it is a folder; ${hint}`);
  }
  const files = await Promise.all(inside.map(async (entry) => ({
    name: `${name}/${entry}`,
    bytes: await readBytes(join(path, entry)),
  })));
  return { name, files, datasets: [name] };
}

/** Side files get the spelling in which GDAL looks for them, as its memory tells letter case apart. */
async function readCompanions(path: string): Promise<NamedBytes[]> {
  const ending = extname(path);
  const wanted = COMPANIONS[ending.toLowerCase()] ?? [];
  if (wanted.length === 0) return [];
  const stem = basename(path, ending);
  const beside = await readdir(dirname(path));
  const found = wanted.flatMap((side) => {
    const spelled = (stem + side).toLowerCase();
    const name = beside.find((candidate) => candidate.toLowerCase() === spelled);
    return name === undefined ? [] : [{ name, as: stem + side }];
  });
  return await Promise.all(
    found.map(async ({ name, as }) => ({
      name: as,
      bytes: await readBytes(join(dirname(path), name)),
    })),
  );
}

async function readBytes(path: string): Promise<Uint8Array> {
  return await readFile(path).catch((cause) => explain(path, cause));
}

async function explain(path: string, cause: NodeJS.ErrnoException): Promise<never> {
  const name = basename(path);
  switch (cause.code) {
    case "ENOENT":
    case "ENOTDIR": {
      const beside = await readdir(dirname(path)).catch(() => []);
      throw new UnreadableError(
        `Cannot read ${path} as there is no such file${suggestion(name, beside)}`,
      );
    }
    case "EACCES":
    case "EPERM":
      throw new UnreadableError(`Cannot read ${path} as reading it is not permitted`, { cause });
    case "ERR_FS_FILE_TOO_LARGE":
      throw new UnreadableError(
        `Cannot read ${path} as it is larger than 2 GB; cut it into smaller files`,
        { cause },
      );
    default:
      throw new UnreadableError(`Cannot read ${path} (${cause.message})`, { cause });
  }
}

function isZip(bytes: Uint8Array): boolean {
  return bytes[0] === 0x50 && bytes[1] === 0x4b && bytes[2] === 0x03 && bytes[3] === 0x04;
}

/** Spreadsheets are zip archives that GDAL opens whole; so is anything without a known member. */
function unpack(archive: NamedBytes): SourceFiles {
  const whole = { name: archive.name, files: [archive], datasets: [archive.name] };
  const members = unzip(archive);
  const datasets = new Set<string>();
  for (const name of Object.keys(members)) {
    const geodatabase = /^(.*\.gdb)\//i.exec(name)?.[1];
    if (geodatabase !== undefined) datasets.add(geodatabase);
    else if (isWorthOpening(name)) datasets.add(name);
  }
  if (datasets.size === 0) return whole;
  const files = Object.entries(members).map(([name, bytes]) => ({ name, bytes }));
  return withoutKml({ name: archive.name, files, datasets: [...datasets].sort() });
}

/** Replaces KML files by GeoJSON of the same content; those without a placemark only point to others. */
function withoutKml(source: SourceFiles): SourceFiles {
  const isKml = (name: string) => extname(name).toLowerCase() === ".kml";
  const converted = new Map(
    source.files.filter(({ name }) => isKml(name))
      .map(({ name, bytes }) => [name, kmlToGeoJson(basename(name), bytes)]),
  );
  if (converted.size === 0) return source;
  const renamed = (name: string) => converted.has(name) ? `${name}.geojson` : name;
  const files = source.files.map(({ name, bytes }) => {
    const geoJson = converted.get(name);
    return { name: renamed(name), bytes: geoJson ? new TextEncoder().encode(geoJson.text) : bytes };
  });
  const filled = source.datasets.filter((name) => converted.get(name)?.count !== 0);
  const datasets = (filled.length > 0 ? filled : source.datasets).map(renamed);
  return { ...source, files, datasets };
}

function unzip({ name, bytes }: NamedBytes): Record<string, Uint8Array> {
  try {
    return unzipSync(bytes, { filter: (member) => !isClutter(member.name) });
  } catch (cause) {
    throw new UnreadableError(`Cannot unpack ${name} as the zip archive is damaged`, { cause });
  }
}

/** Folders, and what some systems add to archives they make. */
function isClutter(name: string): boolean {
  return name.endsWith("/") || name.startsWith("__MACOSX/") || basename(name).startsWith("._");
}

function isWorthOpening(name: string): boolean {
  return OPENED_IN_ARCHIVES.has(extname(name).toLowerCase());
}
