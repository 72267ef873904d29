/**
 * KML to GeoJSON, since GDAL's reader leaves out the fields that KML keeps as extended data.
 *
 * @module
 */
import {
  child,
  childrenNamed,
  type KmlContent,
  parseKml,
  type Placemark,
  textOf,
} from "./kml_elements.ts";
import { geometryOf, hasAltitude } from "./kml_geometry.ts";

type Value = string | number | boolean | null;

/** A KML file as GeoJSON. */
export interface KmlAsGeoJson {
  readonly text: string;
  /** Number of features. */
  readonly count: number;
}

/**
 * Turns a KML document into a GeoJSON FeatureCollection: every placemark of every folder one feature, in order.
 *
 * Fields: `name`, `description` and, with several folders, `folder`, each only where filled somewhere; then all
 * extended data, with the types of their schema, else as text. Altitudes are kept unless all are 0.
 * Tracks, models and linked files are passed over.
 *
 * @param source File name for messages; the collection is named after it unless its only folder has a name.
 * @throws UnreadableError where the file is not well-formed XML, with the line.
 */
export function kmlToGeoJson(source: string, bytes: Uint8Array): KmlAsGeoJson {
  const content = parseKml(source, bytes);
  const { placemarks } = content;
  const folders = new Set(placemarks.map(({ folder }) => folder));
  const rows = placemarks.map((placemark) => fieldsOf(placemark, content, folders.size > 1));
  const names = new Set(rows.flatMap((row) => [...row.keys()]));
  const geometries = placemarks.map(({ element }) => geometryOf(element));
  const features = rows.map((row, i) => ({
    type: "Feature",
    properties: Object.fromEntries(Array.from(names, (name) => [name, row.get(name) ?? null])),
    geometry: geometries[i],
  }));
  const [only] = folders.size === 1 ? folders : [];
  const name = (only && textOf(only, "name")) || source.replace(/\.[^.]*$/, "");
  const collection = { type: "FeatureCollection", name, features };
  const flat = (_: string, value: unknown) => isPosition(value) ? value.slice(0, 2) : value;
  const text = JSON.stringify(collection, geometries.some(hasAltitude) ? undefined : flat);
  return { text, count: placemarks.length };
}

function isPosition(value: unknown): value is number[] {
  return Array.isArray(value) && typeof value[0] === "number";
}

function fieldsOf(
  { element, folder }: Placemark,
  { types }: KmlContent,
  severalFolders: boolean,
): Map<string, Value> {
  const extended = child(element, "ExtendedData");
  const own = new Map<string, Value>();
  for (const schemaData of childrenNamed(extended, "SchemaData")) {
    for (const { attributes, text } of childrenNamed(schemaData, "SimpleData")) {
      const name = attributes.name ?? "";
      own.set(name, typedValue(text, types.get(name) ?? "string"));
    }
  }
  for (const data of childrenNamed(extended, "Data")) {
    own.set(data.attributes.name ?? "", child(data, "value")?.text ?? null);
  }
  const fields = new Map<string, Value>();
  const add = (name: string, value: string | null) => {
    if (value !== null && !own.has(name)) fields.set(name, value);
  };
  add("name", textOf(element, "name"));
  add("description", textOf(element, "description"));
  if (severalFolders && folder !== undefined) add("folder", textOf(folder, "name"));
  return new Map([...fields, ...own]);
}

/** Text that does not fit its declared type stays text. */
function typedValue(text: string, type: string): Value {
  if (type === "string") return text;
  const trimmed = text.trim();
  if (trimmed === "") return null;
  if (type === "bool") return /^(1|true)$/i.test(trimmed);
  const number = Number(trimmed);
  return Number.isFinite(number) ? number : text;
}
