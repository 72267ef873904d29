/**
 * FlatGeobuf files by the format's own JavaScript package: another writer than GDAL, which lays out its
 * features in another way.
 *
 * @module
 */
import { serialize } from "flatgeobuf/lib/mjs/geojson.js";

/** A GeoJSON geometry of any type, or none. */
export type AnyGeometry = { readonly type: string; readonly [key: string]: unknown } | null;

/** A feature to write. */
export interface TestFeature {
  readonly geometry: AnyGeometry;
  readonly properties?: Readonly<Record<string, unknown>>;
}

/** Writes features that all have a geometry. */
export function fgbOf(features: readonly TestFeature[]): Uint8Array {
  const collection = {
    type: "FeatureCollection",
    features: features.map(({ geometry, properties = {} }) => ({
      type: "Feature",
      geometry,
      properties,
    })),
  };
  return serialize(collection as unknown as Parameters<typeof serialize>[0]);
}
