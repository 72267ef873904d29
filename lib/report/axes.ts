/**
 * Axes of the charts.
 *
 * @module
 */
// @ts-types="@types/d3-scale"
import { type ScaleLinear, scaleLinear } from "d3-scale";
import { type Markup, markup } from "./markup.ts";
import { INK, svgLine, svgText } from "./svg.ts";

/** The rectangle in which a chart draws its marks. */
export interface PlotArea {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** From data to figure coordinates. */
export type LinearScale = ScaleLinear<number, number>;

/** A scale from `domain` onto `range`. */
export function linearScale(
  domain: readonly [number, number],
  range: readonly [number, number],
): LinearScale {
  return scaleLinear(domain, range);
}

/** What is written along an axis. */
export interface AxisText {
  readonly title: string;
  /** About how many ticks. @default 6 */
  readonly ticks?: number;
  /** Lines across the plot at every tick. @default false */
  readonly grid?: boolean;
}

/** An axis below the plot with its title in the middle. */
export function bottomAxis(
  scale: LinearScale,
  area: PlotArea,
  { title, ticks = 6, grid = false }: AxisText,
): Markup {
  const { left, right, top, bottom } = area;
  const format = scale.tickFormat(ticks);
  const marks = scale.ticks(ticks).map((value) => {
    const x = scale(value);
    return [
      grid && svgLine([x, top], [x, bottom], { stroke: INK.grid }),
      svgLine([x, bottom], [x, bottom + 5]),
      svgText(x, bottom + 20, format(value), { anchor: "middle", fill: INK.muted }),
    ];
  });
  const middle = (left + right) / 2;
  return markup`<g>${marks}${svgLine([left, bottom], [right, bottom])}${
    svgText(middle, bottom + 43, title, { anchor: "middle" })
  }</g>`;
}

/** An axis left of the plot with its title turned beside it. */
export function leftAxis(
  scale: LinearScale,
  area: PlotArea,
  { title, ticks = 6, grid = false }: AxisText,
): Markup {
  const { left, right, top, bottom } = area;
  const format = scale.tickFormat(ticks);
  const marks = scale.ticks(ticks).map((value) => {
    const y = scale(value);
    return [
      grid && svgLine([left, y], [right, y], { stroke: INK.grid }),
      svgLine([left - 5, y], [left, y]),
      svgText(left - 9, y + 4.5, format(value), { anchor: "end", fill: INK.muted }),
    ];
  });
  const middle = (top + bottom) / 2;
  return markup`<g>${marks}${svgLine([left, top], [left, bottom])}${
    svgText(left - 48, middle, title, { anchor: "middle", turned: true })
  }</g>`;
}
