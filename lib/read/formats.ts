/**
 * Which vector formats can be read and written.
 *
 * @module
 */
import { type GdalDriver, loadGdal } from "./gdal.ts";

/** A vector format. */
export interface Format {
  /** What one types for `--format`, such as `gpkg`; GDAL's own short name where nearkin has none. */
  readonly name: string;
  readonly title: string;
  /** Without dots; empty where the format has none of its own. */
  readonly extensions: readonly string[];
  readonly read: boolean;
  readonly write: boolean;
  /** Formats in everyday use come first in the list. */
  readonly group: "everyday" | "further";
}

/** GDAL's driver, our name, and the endings that GDAL's own list lacks. */
const EVERYDAY: readonly (readonly [driver: string, name: string, more?: readonly string[]])[] = [
  ["FlatGeobuf", "fgb"],
  ["GPKG", "gpkg"],
  ["GeoJSON", "geojson"],
  ["GeoJSONSeq", "geojsonl", ["ndjson", "jsonl"]],
  ["ESRI Shapefile", "shp"],
  ["KML", "kml", ["kmz"]],
  ["GML", "gml"],
  ["MapInfo File", "tab"],
  ["TopoJSON", "topojson"],
  ["CSV", "csv"],
  ["SQLite", "sqlite"],
  ["ODS", "ods"],
  ["XLSX", "xlsx"],
  ["OpenFileGDB", "gdb"],
];

/** Names of the formats that `lib/write/vector.ts` writes; `mif` is MapInfo's text form. */
export const WRITABLE_FORMATS = [
  "fgb",
  "gpkg",
  "geojson",
  "geojsonl",
  "shp",
  "kml",
  "gml",
  "tab",
  "mif",
  "csv",
  "sqlite",
  "ods",
  "xlsx",
] as const;
/** See {@link WRITABLE_FORMATS}. */
export type WritableFormat = typeof WRITABLE_FORMATS[number];

/** Drivers that are no file format of areas: GDAL's own working memory. */
const NOT_FORMATS: ReadonlySet<string> = new Set(["Memory"]);

/** All vector formats of the GDAL in use, everyday ones first, then by title. */
export async function listFormats(): Promise<Format[]> {
  const gdal = await loadGdal();
  const formats = gdal.drivers()
    .filter(({ driver, reads }) => reads && !NOT_FORMATS.has(driver))
    .map(formatOf);
  const rank = ({ name }: Format) => {
    const place = EVERYDAY.findIndex((known) => known[1] === name);
    return place < 0 ? EVERYDAY.length : place;
  };
  return formats.sort((a, b) => rank(a) - rank(b) || (a.title < b.title ? -1 : 1));
}

function formatOf({ driver, title, extensions, reads }: GdalDriver): Format {
  const everyday = EVERYDAY.find((known) => known[0] === driver);
  const name = everyday?.[1] ?? driver;
  return {
    name,
    title,
    extensions: [...extensions, ...(everyday?.[2] ?? [])],
    read: reads,
    write: WRITABLE_FORMATS.some((writable) => writable === name),
    group: everyday === undefined ? "further" : "everyday",
  };
}
