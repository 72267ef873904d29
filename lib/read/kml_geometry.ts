/**
 * Geometry of KML placemarks as GeoJSON.
 *
 * @module
 */
import { child, childrenNamed, type KmlElement } from "./kml_elements.ts";

/** A GeoJSON geometry; positions are longitude, latitude, altitude (0 where not given). */
export type KmlGeometry = { readonly type: string } & Readonly<Record<string, unknown>>;

/** The first geometry of a placemark, null where it has none that is known here. */
export function geometryOf(element: KmlElement): KmlGeometry | null {
  for (const part of element.children) {
    const geometry = geometryFrom(part);
    if (geometry !== null) return geometry;
  }
  return null;
}

function geometryFrom(element: KmlElement): KmlGeometry | null {
  switch (element.name) {
    case "Point": {
      const [position] = positionsOf(element);
      return position === undefined ? null : { type: "Point", coordinates: position };
    }
    case "LineString":
    case "LinearRing": {
      const positions = positionsOf(element);
      return positions.length === 0 ? null : { type: "LineString", coordinates: positions };
    }
    case "Polygon":
      return polygonFrom(element);
    case "MultiGeometry":
      return together(element.children.map(geometryFrom).filter((part) => part !== null));
    default:
      return null;
  }
}

function polygonFrom(element: KmlElement): KmlGeometry | null {
  const boundaries = [
    ...childrenNamed(element, "outerBoundaryIs"),
    ...childrenNamed(element, "innerBoundaryIs"),
  ];
  const rings = boundaries.flatMap((boundary) => childrenNamed(boundary, "LinearRing"))
    .map(positionsOf).filter((ring) => ring.length > 0);
  return rings.length === 0 ? null : { type: "Polygon", coordinates: rings };
}

const MULTI_TYPES: Readonly<Record<string, string>> = {
  Point: "MultiPoint",
  LineString: "MultiLineString",
  Polygon: "MultiPolygon",
};

/** A multi-geometry where all parts are of one kind, else a collection. */
function together(parts: readonly KmlGeometry[]): KmlGeometry | null {
  if (parts.length === 0) return null;
  const type = MULTI_TYPES[parts[0].type];
  if (type === undefined || parts.some((part) => part.type !== parts[0].type)) {
    return { type: "GeometryCollection", geometries: parts };
  }
  return { type, coordinates: parts.map((part) => part.coordinates) };
}

const NUMBER = String.raw`[-+]?[\d.]+(?:[eE][-+]?\d+)?`;
const POSITION = new RegExp(`(${NUMBER})\\s*,\\s*(${NUMBER})(?:\\s*,\\s*(${NUMBER}))?`, "g");

function positionsOf(element: KmlElement): number[][] {
  const text = child(element, "coordinates")?.text ?? "";
  return Array.from(
    text.matchAll(POSITION),
    ([, x, y, altitude]) => [Number(x), Number(y), Number(altitude ?? 0)],
  );
}

/** Whether any position of these geometries has an altitude other than 0. */
export function hasAltitude(value: unknown): boolean {
  if (Array.isArray(value)) {
    return typeof value[0] === "number" ? value[2] !== 0 : value.some(hasAltitude);
  }
  return value !== null && typeof value === "object" && Object.values(value).some(hasAltitude);
}
