/**
 * CRS definitions as well-known text, made digestible for proj4.
 *
 * @module
 */

/** What the stored x and y count, in this order. */
export type AxisLayout = "east north" | "west south" | "south west";

/** What {@link readWkt} finds. */
export interface WktFacts {
  /** The horizontal CRS inside, worded so that proj4 reads it right. */
  readonly wkt: string;
  /** Longitude of the prime meridian from Greenwich in degrees. */
  readonly primeMeridian: number;
  /**
   * South-oriented grids keep their own order of axes in files; all others are stored as east,
   * north.
   */
  readonly layout: AxisLayout;
}

/**
 * Names that proj4 2.22 passes over in silence or refuses, and what it calls the same thing. With
 * the first three left as they are, a Swiss or Hungarian layer would come out tens of kilometers
 * off.
 */
const REWORDED: readonly [from: string, to: string][] = [
  ["Azimuth of initial line", "Azimuth at projection centre"],
  ["Scale factor on initial line", "Scale factor at projection centre"],
  ["Easting at projection centre", "False easting"],
  ["Northing at projection centre", "False northing"],
  ["Modified Azimuthal Equidistant", "Azimuthal Equidistant"],
  ["Transverse Mercator (South Orientated)", "Transverse Mercator"],
];

/**
 * Cylindrical projections, and their names in proj4, which calls their standard parallel `lat_ts`.
 */
const CYLINDRICAL: readonly [from: string, to: string][] = [
  ["Lambert Cylindrical Equal Area", "cea"],
  ["Mercator (variant B)", "merc"],
  ["Equidistant Cylindrical", "eqc"],
  ["Equidistant Cylindrical (Spherical)", "eqc"],
];

/**
 * Takes the horizontal CRS out of a compound or bound one and rewords what proj4 would misread.
 * Datum shifts are left out on purpose: they move all areas alike.
 */
export function readWkt(text: string): WktFacts {
  const wkt = horizontalCrs(text);
  return { wkt: reworded(wkt), primeMeridian: primeMeridianOf(wkt), layout: layoutOf(wkt) };
}

/** The first projected or geographic CRS of a text, with everything up to its closing bracket. */
function horizontalCrs(text: string): string {
  const start = text.search(/\b(?:PROJCRS|PROJECTEDCRS|PROJCS|GEOGCRS|GEODCRS|GEOGCS)\[/);
  if (start < 0) return text;
  let depth = 0, quoted = false;
  for (let at = start; at < text.length; at++) {
    if (text[at] === '"') quoted = !quoted;
    if (quoted) continue;
    if (text[at] === "[") depth++;
    if (text[at] === "]" && --depth === 0) return text.slice(start, at + 1);
  }
  return text.slice(start);
}

function reworded(wkt: string): string {
  let text = wkt;
  for (const [from, to] of REWORDED) text = text.replace(`"${from}"`, `"${to}"`);
  for (const [from, to] of CYLINDRICAL) {
    const method = `METHOD["${from}"`;
    if (!text.includes(method)) continue;
    text = text.replace(method, `METHOD["${to}"`)
      .replace('"Latitude of 1st standard parallel"', '"lat_ts"');
  }
  return text;
}

/** In degrees; version 2 states the unit, version 1 as GDAL writes it always means degrees. */
function primeMeridianOf(wkt: string): number {
  const match = /PRIMEM\["[^"]*",\s*([^,\]]+)(?:,\s*ANGLEUNIT\["[^"]*",\s*([^,\]]+))?/.exec(wkt);
  if (!match) return 0;
  const [, angle, radians] = match;
  return radians === undefined ? Number(angle) : Number(angle) * Number(radians) * 180 / Math.PI;
}

function layoutOf(wkt: string): AxisLayout {
  const axes = [...wkt.matchAll(/AXIS\["[^"]*",\s*(\w+)/g)].map((match) => match[1].toLowerCase());
  const order = axes.slice(0, 2).join(" ");
  return order === "west south" || order === "south west" ? order : "east north";
}
