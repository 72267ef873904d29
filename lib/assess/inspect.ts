/**
 * What is in a file, and what would fit it.
 *
 * @module
 */
import { extname } from "node:path";
import { readColumn } from "../layer/column.ts";
import { GEOMETRY_KINDS } from "../layer/geometry.ts";
import type { Column, Layer } from "../layer/layer.ts";
import { diagnose, type GroundDiagnostics } from "../neighbors/diagnose.ts";
import { openSpace } from "../neighbors/open_space.ts";
import { type GeometryHealth, geometryHealth } from "../read/inspect_geometry.ts";
import { isTable } from "../read/table.ts";
import { type LayerInfo, listLayers } from "../read/vector.ts";
import { layGround } from "./lay_ground.ts";
import { openSource } from "./open_source.ts";
import type { SourceOptions } from "./options.ts";

/** A field and what its values look like. */
export interface FieldSummary extends Column {
  /** Rows without a value (null or empty text). */
  readonly missing: number;
  /** Different values. */
  readonly distinct: number;
  /** Smallest and largest number or text; null where there is no value. */
  readonly smallest: number | string | null;
  readonly largest: number | string | null;
}

/** What {@link inspect} finds. */
export interface Inspection {
  readonly source: string;
  /** All layers of the file; empty for a table. */
  readonly layers: readonly LayerInfo[];
  readonly layer: string;
  readonly features: number;
  readonly shape: Layer["shape"];
  readonly crs: string | null;
  readonly fields: readonly FieldSummary[];
  readonly geometry: GeometryHealth;
  /** In map units where the layer has no CRS; null for fewer than two areas, or where no CRS fits the extent. */
  readonly distances: {
    /** Smallest distance at which every area has another within reach. */
    readonly noneAlone: number;
    /** Smallest distance at which all areas hang together. */
    readonly oneComponent: number;
    readonly unit: string;
  } | null;
  /** How boundaries fit together; null where there are no polygons. */
  readonly boundaries: GroundDiagnostics["boundaries"];
  /** Areas whose point is that of another one too; null where no distance can be measured. */
  readonly sharingPlaces: number | null;
  /** An `assess` command to paste; null for rows without geometry, which have no neighbors. */
  readonly suggestion: string | null;
}

/**
 * Looks at one layer of a file: the one asked for, else the first that has geometry, and lists the others.
 *
 * @throws What reading the layer throws. Cost: a pass over everything in the layer.
 */
export async function inspect(path: string, options: SourceOptions = {}): Promise<Inspection> {
  const layers = isTable(path) ? [] : await listLayers(path);
  const { layer } = await openSource(path, {
    ...options,
    layer: options.layer ?? firstWithGeometry(layers),
  });
  const fields = layer.columns.map(({ name }) => summarizeField(layer, name));
  return {
    source: layer.source,
    layers,
    layer: layer.name,
    features: layer.count,
    shape: layer.shape,
    crs: layer.crs && [layer.crs.name, layer.crs.code].filter(Boolean).join(" · "),
    fields,
    geometry: geometryHealth(layer),
    ...await groundOf(layer),
    suggestion: suggestCommand(path, layer, { fields, chosen: layers.length > 1 }),
  };
}

function firstWithGeometry(layers: readonly LayerInfo[]): string | undefined {
  return layers.find(({ geometry, count }) => geometry !== null && count !== 0)?.name;
}

function summarizeField(layer: Layer, name: string): FieldSummary {
  const { values, ...column } = readColumn(layer, name);
  const present: (number | string)[] = [];
  for (const value of values) {
    if (value !== null && value !== "" && !Number.isNaN(value)) present.push(value);
  }
  let [smallest = null, largest = null]: (number | string | null)[] = [present[0], present[0]];
  for (const value of present) {
    if (value < smallest!) smallest = value;
    if (value > largest!) largest = value;
  }
  return {
    ...column,
    missing: layer.count - present.length,
    distinct: new Set(present).size,
    smallest,
    largest,
  };
}

async function groundOf(
  layer: Layer,
): Promise<Pick<Inspection, "distances" | "boundaries" | "sharingPlaces">> {
  const none = GEOMETRY_KINDS.indexOf("none");
  const kept = Uint32Array.from(layer.geometry.kinds.keys())
    .filter((row) => layer.geometry.kinds[row] !== none);
  const usable = new Uint8Array(kept.length).fill(1);
  const metric = layer.crs ? "auto" : "planar";
  const laid = await layGround(layer, { kept, usable }, { rules: [], metric, names: [] });
  const { points, ellipsoid, geometry } = laid.ground;
  const hasPolygons = geometry?.kinds.includes(GEOMETRY_KINDS.indexOf("polygon")) ?? false;
  const { noneAlone, oneComponent, boundaries, sharingPlaces } = diagnose({
    space: points && openSpace(points, ellipsoid),
    contiguity: hasPolygons ? laid.contiguity : null,
    snap: null,
  });
  const distances = laid.metric && noneAlone !== null && oneComponent !== null
    ? { noneAlone, oneComponent, unit: laid.metric.unit }
    : null;
  return { distances, boundaries, sharingPlaces };
}

/** Names of fields that measure or number areas rather than say something about them. */
const HOUSEKEEPING = /^(area|perimeter|shape_?\w*|length|.*(id|no|_)|fips|x|y|lon|lat)$/i;

function suggestCommand(
  path: string,
  layer: Layer,
  { fields, chosen }: { readonly fields: readonly FieldSummary[]; readonly chosen: boolean },
): string | null {
  if (layer.shape === "none") return null;
  const full = (field: FieldSummary) => field.missing === 0 && field.distinct === layer.count;
  const id = fields.find((field) => full(field) && field.kind === "text") ??
    fields.find((field) => full(field) && field.kind === "integer");
  const varied = (field: FieldSummary) =>
    field !== id && field.distinct > 2 && !HOUSEKEEPING.test(field.name);
  const value = fields.find((field) => field.kind === "number" && varied(field)) ??
    fields.find((field) => field.kind === "integer" && varied(field) && !full(field));
  const parts = ["nearkin", "assess", shellWord(path)];
  if (chosen) parts.push("--layer", shellWord(layer.name));
  parts.push("--value", value ? shellWord(value.name) : "FIELD");
  if (id) parts.push("--id", shellWord(id.name));
  if (!layer.crs) parts.push("--metric", "planar");
  return [...parts, "--out", shellWord(`${baseName(path)}-outcome`)].join(" ");
}

function baseName(path: string): string {
  const name = path.split(/[/\\]/).at(-1)!;
  return name.slice(0, name.length - extname(name).length) || name;
}

/** Quotes a word where a shell would not take it as it stands. */
function shellWord(text: string): string {
  return /^[\p{L}\p{N}_./:@%+,=-]+$/u.test(text) ? text : `'${text.replaceAll("'", "'\\''")}'`;
}
