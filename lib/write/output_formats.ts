/**
 * How GDAL is told to write each format.
 *
 * @module
 */
import type { WritableFormat } from "../read/formats.ts";
import type { NameRule } from "./field_names.ts";

/** GDAL's names of the field types that some formats lack. */
export type FieldType = "Integer64" | "DateTime" | "Binary";

/** One format that is written through GDAL. */
export interface OutputFormat {
  /** GDAL's driver. */
  readonly driver: string;
  readonly extension: string;
  readonly title: string;
  /** Further arguments as for ogr2ogr. @default none */
  readonly args?: readonly string[];
  /** Creation options that name a column of GDAL's own, and the name it should have if no field does. */
  readonly ownColumns?: Readonly<Record<string, string>>;
  /** What field names the format takes; without it any. */
  readonly names?: NameRule;
  /** Field types that the format does not have, and what stands in for them. */
  readonly lacks?: Readonly<Partial<Record<FieldType, "Real" | "String">>>;
  /** Set where a number, a boolean or a date cannot be null: 0 would stand for it. @default nulls are kept */
  readonly nulls?: "none";
  /** `windows` where text beyond ASCII needs a Windows code page to be named. @default Unicode */
  readonly charset?: "windows";
  /**
   * How the files that GDAL writes are handed over: as they are, in one zip archive, or, being an archive
   * already, packed again without clock times. @default "loose"
   */
  readonly packing?: "loose" | "zip" | "repack";
}

/** Stands for the time of writing in formats that note it, so that the same input gives the same bytes. */
export const FIXED_DAY = "2000-01-01";

const MAPINFO_NAMES: NameRule = { bytes: 31, letters: "ascii" };

/** All formats but FlatGeobuf, which is written without GDAL. */
export const OUTPUT_FORMATS: Readonly<Record<Exclude<WritableFormat, "fgb">, OutputFormat>> = {
  gpkg: {
    driver: "GPKG",
    extension: "gpkg",
    title: "GeoPackage",
    ownColumns: { FID: "fid", GEOMETRY_NAME: "geom" },
    // Column names of SQLite do not tell letter case apart.
    names: {},
  },
  geojson: {
    driver: "GeoJSON",
    extension: "geojson",
    title: "GeoJSON",
    // The standard of 2016: longitude and latitude of WGS 84.
    args: ["-lco", "RFC7946=YES"],
    lacks: { Binary: "String" },
  },
  geojsonl: {
    driver: "GeoJSONSeq",
    extension: "geojsonl",
    title: "newline-delimited GeoJSON",
    lacks: { DateTime: "String", Binary: "String" },
  },
  shp: {
    driver: "ESRI Shapefile",
    extension: "shp",
    title: "Shapefile",
    args: ["-lco", "ENCODING=UTF-8", "-lco", `DBF_DATE_LAST_UPDATE=${FIXED_DAY}`],
    names: { bytes: 10 },
    lacks: { DateTime: "String", Binary: "String" },
    packing: "zip",
  },
  kml: {
    driver: "KML",
    extension: "kml",
    title: "KML",
    lacks: { Integer64: "Real", DateTime: "String", Binary: "String" },
  },
  gml: {
    driver: "GML",
    extension: "gml",
    title: "GML",
    names: { letters: "any" },
    lacks: { Binary: "String" },
  },
  tab: {
    driver: "MapInfo File",
    extension: "tab",
    title: "MapInfo TAB",
    names: MAPINFO_NAMES,
    lacks: { Integer64: "Real", Binary: "String" },
    nulls: "none",
    charset: "windows",
  },
  mif: {
    driver: "MapInfo File",
    extension: "mif",
    title: "MapInfo MIF",
    args: ["-dsco", "FORMAT=MIF"],
    names: MAPINFO_NAMES,
    lacks: { Integer64: "Real", Binary: "String" },
    nulls: "none",
    charset: "windows",
  },
  csv: { driver: "CSV", extension: "csv", title: "CSV", lacks: { Binary: "String" } },
  sqlite: {
    driver: "SQLite",
    extension: "sqlite",
    title: "SQLite",
    args: ["-lco", "LAUNDER=NO"],
    ownColumns: { FID: "ogc_fid", GEOMETRY_NAME: "geometry" },
    names: {},
  },
  ods: {
    driver: "ODS",
    extension: "ods",
    title: "OpenDocument spreadsheet",
    packing: "repack",
    lacks: { Binary: "String" },
  },
  xlsx: {
    driver: "XLSX",
    extension: "xlsx",
    title: "Excel workbook",
    packing: "repack",
    lacks: { Binary: "String" },
  },
};
