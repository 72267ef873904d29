/**
 * A result layer in whatever format a colleague's viewer opens.
 *
 * @module
 */
import { decodeLayer } from "../layer/decode_layer.ts";
import { UnwritableError, UsageError } from "../layer/errors.ts";
import { encodeFgbHeader, readFgbHeader } from "../layer/fgb_header.ts";
import { suggestion } from "../layer/nearest_name.ts";
import { WRITABLE_FORMATS, type WritableFormat } from "../read/formats.ts";
import { loadGdal } from "../read/gdal.ts";
import { GdalError, GdalFolder, type NamedBytes } from "../read/gdal_folder.ts";
import { fitNames, type Renamed, renamedFields } from "./field_names.ts";
import { charsetFor, lackingTypes, refuseNulls } from "./format_limits.ts";
import { FIXED_DAY, OUTPUT_FORMATS, type OutputFormat } from "./output_formats.ts";
import { packFiles } from "./pack_files.ts";
import { addSpatialIndex } from "./spatial_index.ts";

/** A layer in another format. */
export interface Converted {
  /** One file, or several that belong together; names without folders. */
  readonly files: readonly NamedBytes[];
  /** Fields whose names the format does not allow. */
  readonly renamed: readonly Renamed[];
  /** What else GDAL had to change, in its words. */
  readonly warnings: readonly string[];
}

/**
 * Writes FlatGeobuf bytes (as from `appendColumns`) in another format.
 *
 * FlatGeobuf gains its spatial index, which reorders the features; all else keeps the order of rows. GeoJSON
 * and KML are in longitude and latitude of WGS 84, as their standards ask. A Shapefile comes zipped.
 * Field names that a format does not take are changed by `fitNames` and reported, never cut
 * silently. MapInfo has no null numbers, so it takes only layers without. The same input gives the same
 * bytes, whatever the day.
 *
 * @param name File name without ending, and name of the layer.
 * @throws UsageError for a format that is not in `WRITABLE_FORMATS`.
 * @throws UnwritableError where the format cannot hold the layer, with GDAL's reason.
 * Cost for 100,000 polygons: FlatGeobuf 0.3 s, GeoPackage 1 s, Shapefile 2 s, text formats 5 to 10 s.
 */
export async function convertFgb(
  fgb: Uint8Array,
  name: string,
  format: string,
): Promise<Converted> {
  const known = knownFormat(format);
  if (known === "fgb") {
    const { fgb: plain, geometry } = decodeLayer(fgb, name);
    const bytes = addSpatialIndex(plain, geometry);
    return { files: [{ name: `${name}.fgb`, bytes }], renamed: [], warnings: [] };
  }
  return await convertThroughGdal(fgb, name, OUTPUT_FORMATS[known]);
}

/** A format by its name in any letter case. @throws UsageError that lists the formats. */
export function knownFormat(format: string): WritableFormat {
  const known = WRITABLE_FORMATS.find((writable) => writable === format.toLowerCase());
  if (known !== undefined) return known;
  throw new UsageError(
    `Cannot write format "${format}"; the formats are ${WRITABLE_FORMATS.join(", ")}${
      suggestion(format, WRITABLE_FORMATS)
    }`,
  );
}

async function convertThroughGdal(
  fgb: Uint8Array,
  name: string,
  format: OutputFormat,
): Promise<Converted> {
  if (format.nulls === "none") refuseNulls(decodeLayer(fgb, name), format);
  const { header, featuresAt } = readFgbHeader(fgb);
  const names = header.columns.map((column) => column.name);
  const fitted = format.names ? fitNames(names, format.names) : names;
  const columns = header.columns.map((column, i) => ({ ...column, name: fitted[i] }));
  const head = encodeFgbHeader({ ...header, name, columns, indexNodeSize: 0 });
  const source = new Uint8Array(head.length + fgb.length - featuresAt);
  source.set(head);
  source.set(fgb.subarray(featuresAt), head.length);
  const charset = charsetFor(source, format);
  const args = [...charset.args, ...ownColumnArgs(format, fitted), ...typeArgs(format)];
  const { files, warnings } = await translate(source, name, format, args);
  return {
    files: packFiles(files, name, format),
    renamed: renamedFields(names, fitted),
    warnings: [...lackingTypes(header.columns, format), ...charset.warnings, ...warnings],
  };
}

async function translate(
  source: Uint8Array,
  name: string,
  format: OutputFormat,
  formatArgs: readonly string[],
): Promise<{ files: NamedBytes[]; warnings: readonly string[] }> {
  using folder = new GdalFolder(await loadGdal());
  folder.put("source.fgb", source);
  folder.makeFolder("out");
  const args = ["-f", format.driver, "-nln", name, ...(format.args ?? [])];
  const config = { OGR_CURRENT_DATE: `${FIXED_DAY}T00:00:00.000Z` };
  try {
    const warnings = folder.translate(
      folder.open("source.fgb"),
      `out/${name}.${format.extension}`,
      { args: [...args, ...formatArgs], config },
    );
    const plain = warnings.map((line) => line.replace(/^Warning \d+: /, "").replace(/\.$/, ""));
    return { files: folder.files("out"), warnings: [...new Set(plain)] };
  } catch (cause) {
    if (!(cause instanceof GdalError)) throw cause;
    throw new UnwritableError(
      `Cannot write layer "${name}" as ${format.title} (${cause.message}); choose another format`,
      { cause },
    );
  }
}

function typeArgs({ lacks = {} }: OutputFormat): string[] {
  const pairs = Object.entries(lacks).map(([type, instead]) => `${type}=${instead}`);
  return pairs.length === 0 ? [] : ["-mapFieldType", pairs.join(",")];
}

/** Databases keep a key and the geometry as columns, whose names no field may have. */
function ownColumnArgs({ ownColumns = {} }: OutputFormat, fields: readonly string[]): string[] {
  const taken = new Set(fields.map((field) => field.toLowerCase()));
  return Object.entries(ownColumns).flatMap(([option, wanted]) => {
    let column = wanted;
    for (let k = 2; taken.has(column); k++) column = `${wanted}_${k}`;
    return ["-lco", `${option}=${column}`];
  });
}
