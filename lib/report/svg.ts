/**
 * The frame every figure shares: one SVG that stands alone as a file and inside the page.
 *
 * @module
 */
import { type Markup, markup, type Part } from "./markup.ts";

/** Colors of everything that is not a class; dark enough to be read on white. */
export const INK = {
  text: "#221F1A",
  muted: "#5F5950",
  axis: "#8A8377",
  grid: "#E4DFD6",
  mark: "#B0460E",
} as const;

/** Fonts that machines have, so that nothing is fetched. */
export const SANS = "-apple-system, 'Segoe UI', Roboto, Helvetica, Arial, sans-serif";

/** Size of text in figures, in their own units. */
export const TEXT_SIZE = 14;

/** Width that a text takes, by the mean width of a letter: figures are drawn without fonts at hand. */
export function textWidth(text: string, size: number = TEXT_SIZE): number {
  return 0.54 * size * text.length;
}

/** What a figure is. */
export interface FigureFrame {
  /** Says in a sentence what is seen, for those who cannot see it. */
  readonly label: string;
  readonly width: number;
  readonly height: number;
}

/** An SVG with text set in the page's font; ids inside must begin with the figure's own name. */
export function svgFigure({ label, width, height }: FigureFrame, ...content: Part[]): Markup {
  return markup`<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" width="${width}" height="${height}" role="img" aria-label="${label}" font-family="${SANS}" font-size="${TEXT_SIZE}" fill="${INK.text}">
${content}
</svg>`;
}

/** Attributes of a text that are not left as they are. */
export interface TextStyle {
  readonly anchor?: "start" | "middle" | "end";
  readonly fill?: string;
  readonly size?: number;
  readonly weight?: number;
  /** Color of a halo that keeps the text legible on top of marks. */
  readonly halo?: string;
  /** Quarter turns against the clock. */
  readonly turned?: boolean;
}

/** A line of text with its baseline at (x, y). */
export function svgText(x: number, y: number, text: string, style: TextStyle = {}): Markup {
  const { anchor, fill, size, weight, halo, turned } = style;
  return markup`<text x="${short(x)}" y="${short(y)}"${
    anchor && anchor !== "start" ? markup` text-anchor="${anchor}"` : null
  }${fill ? markup` fill="${fill}"` : null}${size ? markup` font-size="${size}"` : null}${
    weight ? markup` font-weight="${weight}"` : null
  }${
    halo
      ? markup` stroke="${halo}" stroke-width="3" stroke-linejoin="round" paint-order="stroke"`
      : null
  }${turned ? markup` transform="rotate(-90 ${short(x)} ${short(y)})"` : null}>${text}</text>`;
}

/** Attributes of a straight line. */
export interface LineStyle {
  readonly stroke?: string;
  readonly width?: number;
  readonly dash?: string;
}

/** A straight line between two points given as [x, y]. */
export function svgLine(
  [x1, y1]: readonly [number, number],
  [x2, y2]: readonly [number, number],
  { stroke = INK.axis, width = 1, dash }: LineStyle = {},
): Markup {
  return markup`<line x1="${short(x1)}" y1="${short(y1)}" x2="${short(x2)}" y2="${
    short(y2)
  }" stroke="${stroke}" stroke-width="${width}"${
    dash ? markup` stroke-dasharray="${dash}"` : null
  }/>`;
}

/** Figure coordinates to a hundredth: enough for any screen, and the same in every engine. */
export function short(value: number): number {
  return Math.round(100 * value) / 100;
}
