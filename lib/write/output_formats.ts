/**
 * How GDAL is told to write each format.
 *
 * @module
 */
import type { WritableFormat } from "../read/formats.ts";
import type { NameRule } from "./field_names.ts";

/** One format that is written through GDAL. */
export interface OutputFormat {
  /** GDAL's driver. */
  readonly driver: string;
  readonly extension: string;
  readonly title: string;
  /** Further arguments as for ogr2ogr. @default [] */
  readonly args?: readonly string[];
  /** GDAL configuration during the writing. @default {} */
  readonly config?: Readonly<Record<string, string>>;
  /** What names of fields the format takes. @default any */
  readonly names?: NameRule;
  /** How the files that GDAL writes are handed over: as they are, in one zip archive, or, being an
   * archive already, with its clock times removed. @default "loose" */
  readonly packing?: "loose" | "zip" | "rezip";
}

/**
 * A clock that stands still: formats that note when they were written then come out the same each time.
 */
const FIXED_DAY = "2000-01-01";

/** MapInfo's rule for names of columns. */
const MAPINFO_NAMES: NameRule = { bytes: 31, plain: true };

/** All formats but FlatGeobuf, which is written without GDAL. */
export const OUTPUT_FORMATS: Readonly<Record<Exclude<WritableFormat, "fgb">, OutputFormat>> = {
  gpkg: {
    driver: "GPKG",
    extension: "gpkg",
    title: "GeoPackage",
    args: ["-lco", "FID=nearkin_fid", "-lco", "GEOMETRY_NAME=nearkin_geometry"],
    config: { OGR_CURRENT_DATE: `${FIXED_DAY}T00:00:00.000Z` },
    names: {},
  },
};
