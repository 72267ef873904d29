/**
 * Flat geometry from GeoJSON and TopoJSON objects, for tests that need no GDAL.
 *
 * @module
 */
import type { FlatGeometry } from "../../lib/layer/geometry.ts";

/** A position: x, y. */
export type Position = readonly number[];

/** The GeoJSON geometries that the tests use. */
export type GeoJsonGeometry =
  | { readonly type: "Point"; readonly coordinates: Position }
  | { readonly type: "LineString"; readonly coordinates: readonly Position[] }
  | { readonly type: "Polygon"; readonly coordinates: readonly (readonly Position[])[] }
  | {
    readonly type: "MultiPolygon";
    readonly coordinates: readonly (readonly (readonly Position[])[])[];
  };

/** A feature collection, as far as it matters here. */
export interface GeoJson {
  readonly features: readonly {
    readonly properties: Readonly<Record<string, unknown>>;
    readonly geometry: GeoJsonGeometry | null;
  }[];
}

const KIND = { Point: 1, LineString: 2, Polygon: 3, MultiPolygon: 3 } as const;

/** Flat geometry of features in order; null becomes an area without parts. */
export function flatFromGeometries(geometries: readonly (GeoJsonGeometry | null)[]): FlatGeometry {
  const kinds: number[] = [], xy: number[] = [];
  const partStarts = [0], ringStarts = [0], vertexStarts = [0];
  for (const geometry of geometries) {
    kinds.push(geometry ? KIND[geometry.type] : 0);
    for (const part of geometry ? partsOf(geometry) : []) {
      for (const ring of part) {
        for (const [x, y] of ring) xy.push(x, y);
        vertexStarts.push(xy.length / 2);
      }
      ringStarts.push(vertexStarts.length - 1);
    }
    partStarts.push(ringStarts.length - 1);
  }
  return {
    kinds: Uint8Array.from(kinds),
    partStarts: Uint32Array.from(partStarts),
    ringStarts: Uint32Array.from(ringStarts),
    vertexStarts: Uint32Array.from(vertexStarts),
    xy: Float64Array.from(xy),
  };
}

/** Flat geometry of a feature collection. */
export function flatFromGeoJson(collection: GeoJson): FlatGeometry {
  return flatFromGeometries(collection.features.map((feature) => feature.geometry));
}

function partsOf(geometry: GeoJsonGeometry): readonly (readonly (readonly Position[])[])[] {
  switch (geometry.type) {
    case "Point":
      return [[[geometry.coordinates]]];
    case "LineString":
      return [[geometry.coordinates]];
    case "Polygon":
      return [geometry.coordinates];
    case "MultiPolygon":
      return geometry.coordinates;
  }
}

/** A quantized topology, as far as it matters here. */
export interface TopoJson {
  readonly transform: { readonly scale: Position; readonly translate: Position };
  readonly arcs: readonly (readonly Position[])[];
  readonly objects: Readonly<Record<string, { readonly geometries: readonly TopoGeometry[] }>>;
}

interface TopoGeometry {
  readonly type: "Polygon" | "MultiPolygon" | null;
  readonly properties: Readonly<Record<string, unknown>>;
  // deno-lint-ignore no-explicit-any -- nested as deep as the type says
  readonly arcs: any;
}

/** One object of a topology as a feature collection; arcs are delta-encoded and ~i runs arc i backward. */
export function geoJsonFromTopology(topology: TopoJson, name: string): GeoJson {
  const { scale, translate } = topology.transform;
  const arcs = topology.arcs.map((arc) => {
    let x = 0, y = 0;
    return arc.map(([dx, dy]) => {
      x += dx;
      y += dy;
      return [x * scale[0] + translate[0], y * scale[1] + translate[1]];
    });
  });
  const ring = (indices: readonly number[]): Position[] =>
    indices.flatMap((index, at) => {
      const arc = index < 0 ? arcs[~index].toReversed() : arcs[index];
      return at === 0 ? arc : arc.slice(1);
    });
  const polygon = (rings: readonly (readonly number[])[]) => rings.map(ring);
  return {
    features: topology.objects[name].geometries.map(({ type, properties, arcs }) => ({
      properties,
      geometry: type === null
        ? null
        : type === "Polygon"
        ? { type, coordinates: polygon(arcs) }
        : { type, coordinates: arcs.map(polygon) },
    })),
  };
}

/** The same features with every position moved. */
export function moveGeoJson(
  { features }: GeoJson,
  move: (x: number, y: number) => readonly [number, number],
): GeoJson {
  // deno-lint-ignore no-explicit-any -- nested as deep as the type says
  const moved = (coordinates: any): any =>
    typeof coordinates[0] === "number"
      ? move(coordinates[0], coordinates[1])
      : coordinates.map(moved);
  return {
    features: features.map(({ properties, geometry }) => ({
      properties,
      geometry: geometry && { ...geometry, coordinates: moved(geometry.coordinates) },
    })),
  };
}
