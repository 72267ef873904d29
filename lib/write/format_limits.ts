/**
 * What formats cannot hold: found before anything is lost.
 *
 * @module
 */
import { readColumns } from "../layer/column.ts";
import { decodeLayer } from "../layer/decode_layer.ts";
import { UnwritableError } from "../layer/errors.ts";
import { FGB_TYPES, type FgbColumn } from "../layer/fgb_header.ts";
import type { Layer } from "../layer/layer.ts";
import type { FieldType, OutputFormat } from "./output_formats.ts";

/**
 * Refuses a layer with null numbers for a format that would write 0.
 * @throws UnwritableError naming the first such field.
 */
export function refuseNulls(layer: Layer, { title }: OutputFormat): void {
  const names = layer.columns.filter(({ kind }) => kind !== "text").map(({ name }) => name);
  const holey = readColumns(layer, names).find(({ values }) => {
    return values instanceof Float64Array ? values.some(Number.isNaN) : values.includes(null);
  });
  if (holey === undefined) return;
  throw new UnwritableError(
    `Cannot write layer "${layer.source}" as ${title} as that has no nulls and field "${holey.name}" holds some; choose gpkg or shp`,
  );
}

const OGR_TYPES: Readonly<Record<number, FieldType>> = {
  [FGB_TYPES.long]: "Integer64",
  [FGB_TYPES.datetime]: "DateTime",
  [FGB_TYPES.binary]: "Binary",
};

/** A sentence for each field whose type the format lacks. */
export function lackingTypes(
  columns: readonly FgbColumn[],
  { lacks, title }: OutputFormat,
): string[] {
  return columns.flatMap(({ name, type }) => {
    const instead = lacks?.[OGR_TYPES[type]];
    if (instead === undefined) return [];
    return [`Field "${name}" is ${instead} as ${title} has no ${OGR_TYPES[type]}`];
  });
}

/** GDAL arguments that name a code page where the format knows no Unicode, and a warning where none fits. */
export function charsetFor(
  fgb: Uint8Array,
  format: OutputFormat,
): { args: readonly string[]; warnings: readonly string[] } {
  if (format.charset === undefined) return { args: [], warnings: [] };
  switch (windowsCharset(decodeLayer(fgb, ""))) {
    case "ascii":
      return { args: [], warnings: [] };
    case "CP1252":
      return { args: ["-lco", "ENCODING=CP1252"], warnings: [] };
    case "none":
      return {
        args: [],
        warnings: [
          `Text is UTF-8, which programs other than GDAL may not expect in ${format.title}`,
        ],
      };
  }
}

/**
 * The code page that holds all text of a layer: none needed, 1252 (western European), or none that does
 * (then text is best written as UTF-8 without a mark).
 */
function windowsCharset(layer: Layer): "ascii" | "CP1252" | "none" {
  const bytes = Uint8Array.from({ length: 256 }, (_, byte) => byte);
  const western = new TextDecoder("windows-1252").decode(bytes);
  const names = layer.columns.filter(({ kind }) => kind === "text").map(({ name }) => name);
  const used = new Set<string>();
  for (const { values } of readColumns(layer, names)) {
    for (const text of values) for (const character of String(text ?? "")) used.add(character);
  }
  const within = (allowed: string) => [...used].every((character) => allowed.includes(character));
  return within(western.slice(0, 128)) ? "ascii" : within(western) ? "CP1252" : "none";
}
