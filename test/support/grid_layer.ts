/**
 * Square areas side by side, as GeoJSON, for tests that need a small file.
 *
 * @module
 */

/** A GeoJSON feature of any properties. */
export interface GridFeature {
  readonly type: "Feature";
  readonly properties: Readonly<Record<string, unknown>>;
  readonly geometry: { readonly type: string; readonly coordinates: unknown } | null;
}

/** A whole GeoJSON text of square areas of 1 km, numbered row by row from the southwest. */
export function gridLayer(
  size: { readonly columns: number; readonly rows: number },
  properties: (at: number) => Readonly<Record<string, unknown>>,
  change: (feature: GridFeature, at: number) => GridFeature = (feature) => feature,
): string {
  const features = Array.from({ length: size.columns * size.rows }, (_, at) => {
    const x = 500_000 + 1000 * (at % size.columns);
    const y = 5_000_000 + 1000 * Math.floor(at / size.columns);
    const ring = [[0, 0], [1000, 0], [1000, 1000], [0, 1000], [0, 0]]
      .map(([dx, dy]) => [x + dx, y + dy]);
    return change({
      type: "Feature",
      properties: properties(at),
      geometry: { type: "Polygon", coordinates: [ring] },
    }, at);
  });
  const crs = { type: "name", properties: { name: "urn:ogc:def:crs:EPSG::25832" } };
  return JSON.stringify({ type: "FeatureCollection", crs, features });
}
