/**
 * The bar that says how long a stretch of the map is.
 *
 * @module
 */
import { type Markup, markup } from "./markup.ts";
import { lengthText } from "./number_text.ts";
import { INK, svgLine, svgText } from "./svg.ts";

/** Where the bar stands and how wide the map is, in figure units. */
export interface BarPlace {
  readonly left: number;
  readonly top: number;
  readonly mapWidth: number;
}

/**
 * A bar of a round length, at most a quarter as long as the map is wide.
 *
 * @param metersPerUnit Meters in one figure unit; null draws nothing.
 */
export function scaleBar(metersPerUnit: number | null, place: BarPlace): Markup | null {
  if (metersPerUnit === null) return null;
  const meters = roundBelow(metersPerUnit * Math.max(60, place.mapWidth / 4));
  const { left, top } = place;
  const right = left + meters / metersPerUnit;
  const ink = { stroke: INK.muted, width: 1.5 };
  return markup`<g>${svgLine([left, top], [right, top], ink)}${
    svgLine([left, top - 4], [left, top + 4], ink)
  }${svgLine([right, top - 4], [right, top + 4], ink)}${
    svgText(right + 8, top + 4.5, lengthText(meters), { fill: INK.muted })
  }</g>`;
}

/** The largest of 1, 2, 5 times a power of ten that does not exceed a number. */
function roundBelow(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value));
  return power * ([5, 2, 1].find((step) => step * power <= value) ?? 1);
}
