/**
 * From FlatGeobuf bytes to the layer record.
 *
 * @module
 */
import { columnOf } from "./column.ts";
import { decodeGeometry } from "./decode_geometry.ts";
import { findFeatures } from "./fgb_features.ts";
import { encodeFgbHeader, type FgbCrs, readFgbHeader } from "./fgb_header.ts";
import { type FlatGeometry, GEOMETRY_KINDS } from "./geometry.ts";
import type { Crs, Layer } from "./layer.ts";

/**
 * Decodes a FlatGeobuf file held in memory.
 *
 * The bytes are kept as they are but for the header: a spatial index is left out, the number of features is
 * set, and where all features have one geometry type the header says so.
 *
 * @param source File name for people.
 * @throws RangeError where the bytes end within a feature.
 */
export function decodeLayer(bytes: Uint8Array, source: string): Layer {
  const { header, featuresAt } = readFgbHeader(bytes);
  const found = findFeatures(bytes, featuresAt);
  const { geometry, types } = decodeGeometry(bytes, found, header.geometryType);
  const head = encodeFgbHeader({
    ...header,
    geometryType: commonType(types),
    featuresCount: types.length,
    indexNodeSize: 0,
  });
  const fgb = new Uint8Array(head.length + bytes.length - featuresAt);
  fgb.set(head);
  fgb.set(bytes.subarray(featuresAt), head.length);
  const moved = head.length - featuresAt;
  return {
    name: header.name,
    source,
    count: types.length,
    shape: shapeOf(geometry),
    columns: header.columns.map(columnOf),
    geometry,
    crs: crsOf(header.crs),
    fgb,
    featureStarts: found.map((start) => start + moved),
    added: [],
  };
}

/** The one type of all features that have a geometry; 0 where there are several or none. */
function commonType(types: Uint8Array): number {
  const present = new Set(types);
  present.delete(0);
  return present.size === 1 ? [...present][0] : 0;
}

/** What more than half of the features with a geometry are. */
function shapeOf({ kinds }: FlatGeometry): Layer["shape"] {
  const counts = [0, 0, 0, 0];
  for (const kind of kinds) counts[kind]++;
  const present = kinds.length - counts[0];
  if (present === 0) return "none";
  const most = counts.findIndex((count, kind) => kind > 0 && 2 * count > present);
  return most > 0 ? GEOMETRY_KINDS[most] : "mixed";
}

/** Files without a reference system say so in words, too, or call it a plane of their own. */
const NO_CRS = /^(undefined|unknown)\b/i;
const NOT_ON_EARTH = /^(LOCAL_CS|ENGCRS|ENGINEERINGCRS)\[/i;
const GEOGRAPHIC = /^(GEOGCS|GEOGCRS|GEODCRS|GEODETICCRS|GEOGRAPHICCRS)\[/i;
/** What may stand around the part that tells degrees from meters. */
const WRAPPED = /^(?:COMPD_CS|COMPOUNDCRS|BOUNDCRS)\["[^"]*",|^BOUNDCRS\[SOURCECRS\[/i;

/** The reference system of a header, or null where it declares none. */
export function crsOf(stored: FgbCrs | null): Crs | null {
  if (stored === null || !stored.wkt) return null;
  const name = stored.name || (/^[^"]*"([^"]*)"/.exec(stored.wkt)?.[1] ?? "");
  if (name === "" || NO_CRS.test(name) || NOT_ON_EARTH.test(stored.wkt)) return null;
  const code = stored.codeString ?? (stored.code > 0 ? String(stored.code) : null);
  return {
    name,
    code: code === null ? null : `${stored.org ?? "EPSG"}:${code}`,
    wkt: stored.wkt,
    geographic: GEOGRAPHIC.test(stored.wkt.replace(WRAPPED, "")),
  };
}
