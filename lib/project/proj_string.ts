/**
 * Projections as proj strings, with what proj4 leaves open filled in.
 *
 * @module
 */

/**
 * Origins that are 0 where a string does not give them; without them proj4 computes with nothing.
 */
const ORIGINS = ["lat_0", "lon_0", "x_0", "y_0"];

/** What proj4 calls Web Mercator: the formulas of a sphere, fed with latitudes of WGS 84. */
const WEB_MERCATOR = "+proj=merc +a=6378137 +b=6378137";

/** Degrees, minutes and seconds such as `36d10'30"N`. */
const SEXAGESIMAL = /=(-?)(\d+)d(?:(\d+(?:\.\d+)?)'?)?(?:(\d+(?:\.\d+)?)"?)?([NSEW]?)(?=\s|$)/g;

/**
 * A proj string that proj4 reads as it is meant: with angles in decimal degrees and all origins
 * written out.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.equal(
 *   completeProj("+proj=laea +lat_0=49d30"),
 *   "+proj=laea +lat_0=49.5 +lon_0=0 +x_0=0 +y_0=0",
 * );
 * ```
 */
export function completeProj(text: string): string {
  const decimal = text.trim().replace(SEXAGESIMAL, (_, minus, degrees, minutes, seconds, side) => {
    const size = Number(degrees) + Number(minutes ?? 0) / 60 + Number(seconds ?? 0) / 3600;
    return `=${minus === "-" || side === "S" || side === "W" ? -size : size}`;
  });
  if (/\+proj=webmerc\b/.test(decimal)) return completeProj(WEB_MERCATOR);
  const valueOf = (key: string) => new RegExp(`\\+${key}=(\\S+)`).exec(decimal)?.[1];
  const missing = ORIGINS.filter((key) => valueOf(key) === undefined);
  const isOneParallelCone = valueOf("proj") === "lcc" && valueOf("lat_2") === undefined;
  const originOf = (key: string) =>
    key === "lat_0" && isOneParallelCone ? (valueOf("lat_1") ?? 0) : 0;
  return [decimal, ...missing.map((key) => `+${key}=${originOf(key)}`)].join(" ");
}
