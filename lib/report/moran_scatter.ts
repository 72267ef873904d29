/**
 * The Moran scatterplot: each area against its surroundings.
 *
 * @module
 */
import { CLASS_LOOKS, isFlagged } from "../write/class_looks.ts";
import { AREA_CLASSES, type AreaClass } from "../write/results.ts";
import { areaTooltip } from "./area_tooltip.ts";
import { bottomAxis, leftAxis, type LinearScale, linearScale, type PlotArea } from "./axes.ts";
import { densityCells } from "./density_cells.ts";
import { type Markup, markup } from "./markup.ts";
import { decimalText, wholeText } from "./number_text.ts";
import type { ReportInput } from "./report_input.ts";
import { fitLine, type ScatterPoints, scatterPoints } from "./scatter_points.ts";
import { INK, short, svgFigure, svgLine, svgText } from "./svg.ts";

const SIZE = { width: 524, height: 480 } as const;
const PLOT: PlotArea = { left: 62, top: 34, right: 510, bottom: 424 };

/** More areas than this are gathered into hexagons. */
const MOST_CIRCLES = 5000;
/** More than this have no tooltips. */
const MOST_WITH_TOOLTIP = 3000;
const HEXAGON = 5;

/** Where both ways from data to figure meet. */
interface Scales {
  readonly x: LinearScale;
  readonly y: LinearScale;
}

/**
 * Draws the scatterplot; the slope of its line is Moran's I (see {@link scatterPoints}). Beyond 5,000 areas hexagons
 * show how many lie where, darker for more, in the color of a class that most of theirs belong to.
 */
export function moranScatter(input: ReportInput): Markup {
  const points = scatterPoints(input.areas, input.s0);
  const scales = {
    x: linearScale(extent(points.x), [PLOT.left, PLOT.right]),
    y: linearScale(extent(points.y), [PLOT.bottom, PLOT.top]),
  };
  const many = points.rows.length > MOST_CIRCLES;
  return svgFigure(
    { label: describe(input, points), ...SIZE },
    bottomAxis(scales.x, PLOT, { title: "Value of the area (standard deviations from the mean)" }),
    leftAxis(scales.y, PLOT, { title: lagTitle(input, points) }),
    quadrantLines(scales),
    many ? hexagons(input, points, scales) : circles(input, points, scales),
    slopeLine(points, scales),
    quadrantNames(),
  );
}

/** The range of the values with 0 and some room at both ends. */
function extent(values: Float64Array): [number, number] {
  let low = 0, high = 0;
  for (const value of values) {
    if (value < low) low = value;
    if (value > high) high = value;
  }
  const room = 0.08 * (high - low) || 1;
  return [low - room, high + room];
}

/** What y is: the mean of the neighbors only where rows add up to 1 and all areas have some. */
function lagTitle({ results, s0 }: ReportInput, { rows }: ScatterPoints): string {
  const isRow = results.runs[0].standardize === "row";
  if (isRow && Math.abs(s0 - rows.length) < 1e-6 * s0) {
    return "Mean of its neighbors (standard deviations)";
  }
  return isRow
    ? "Mean of its neighbors × n/S0 (standard deviations)"
    : "Weighted sum over its neighbors × n/S0";
}

function quadrantLines({ x, y }: Scales): Markup {
  const style = { stroke: INK.axis, width: 1, dash: "2 3" };
  return markup`${svgLine([x(0), PLOT.top], [x(0), PLOT.bottom], style)}${
    svgLine([PLOT.left, y(0)], [PLOT.right, y(0)], style)
  }`;
}

/** One group a class, flagged ones on top. */
function circles(input: ReportInput, { rows, x, y }: ScatterPoints, scales: Scales): Markup {
  const { areas } = input;
  const radius = rows.length > 1000 ? 2.4 : 3.4;
  const tooltips = rows.length <= MOST_WITH_TOOLTIP;
  const ordered = [...AREA_CLASSES].sort((a, b) => Number(isFlagged(a)) - Number(isFlagged(b)));
  const groups = ordered.map((name) => {
    const marks = [...rows.keys()].filter((i) => areas.class[rows[i]] === name).map((i) =>
      markup`<circle cx="${short(scales.x(x[i]))}" cy="${short(scales.y(y[i]))}" r="${radius}"${
        tooltips ? markup`><title>${areaTooltip(input, rows[i])}</title></circle>` : markup`/>`
      }`
    );
    return marks.length === 0 ? null : markup`<g ${circleStyle(name)}>${marks}</g>
`;
  });
  return markup`${groups}`;
}

function circleStyle(name: AreaClass): Markup {
  const { fill, ink } = CLASS_LOOKS[name];
  if (isFlagged(name)) return markup`fill="${fill}" stroke="${ink}" stroke-width="1"`;
  return fill === "#FFFFFF"
    ? markup`fill="none" stroke="${ink}"`
    : markup`fill="${ink}" fill-opacity="0.6"`;
}

function hexagons({ areas }: ReportInput, { rows, x, y }: ScatterPoints, scales: Scales): Markup {
  const cells = densityCells(x.map((value) => scales.x(value)), y.map((v) => scales.y(v)), HEXAGON);
  const fullest = cells.reduce((most, { members }) => Math.max(most, members.length), 1);
  const marks = cells.map(({ x, y, members }) => {
    const name = majority(members.map((i) => areas.class[rows[i]]));
    const share = Math.log(1 + members.length) / Math.log(1 + fullest);
    const color = isFlagged(name) ? CLASS_LOOKS[name].ink : INK.text;
    return markup`<use href="#moran-scatter-cell" x="${short(x)}" y="${
      short(y)
    }" fill="${color}" fill-opacity="${short(0.12 + 0.78 * share)}"/>`;
  });
  return markup`<defs><path id="moran-scatter-cell" d="${hexagonPath()}"/></defs>${marks}
`;
}

/** The class of more than half of the areas, else `no evidence`. */
function majority(names: readonly AreaClass[]): AreaClass {
  const counts = new Map<AreaClass, number>();
  for (const name of names) counts.set(name, (counts.get(name) ?? 0) + 1);
  const found = [...counts].find(([, count]) => 2 * count > names.length);
  return found ? found[0] : "no evidence";
}

function hexagonPath(): string {
  const half = short(HEXAGON * Math.sqrt(3) / 2), quarter = HEXAGON / 2;
  return `M0-${HEXAGON}l${half} ${quarter}v${HEXAGON}l-${half} ${quarter}l-${half}-${quarter}v-${HEXAGON}z`;
}

/** The fitted line as far as it lies within the plot, with its slope in words. */
function slopeLine(points: ScatterPoints, { x, y }: Scales): Markup | null {
  const { slope, intercept } = fitLine(points);
  if (Number.isNaN(slope)) return null;
  const [left, right] = x.domain(), [low, high] = y.domain();
  const ends = [left, right].map((value): [number, number] => {
    const height = Math.min(high, Math.max(low, intercept + slope * value));
    const inside = slope === 0 ? value : (height - intercept) / slope;
    return [x(inside), y(height)];
  });
  const label = `slope = Moran's I = ${decimalText(slope, 3)}`;
  return markup`${svgLine(ends[0], ends[1], { stroke: INK.mark, width: 2 })}${
    svgText(PLOT.right, PLOT.top - 14, label, { anchor: "end", fill: INK.mark, weight: 600 })
  }`;
}

/** The classes in the corners they belong to. */
function quadrantNames(): Markup {
  const corners: readonly (readonly [AreaClass, "start" | "end", number])[] = [
    ["low among high", "start", PLOT.top + 14],
    ["high among high", "end", PLOT.top + 14],
    ["low among low", "start", PLOT.bottom - 10],
    ["high among low", "end", PLOT.bottom - 10],
  ];
  return markup`${
    corners.map(([name, anchor, y]) =>
      svgText(anchor === "start" ? PLOT.left + 8 : PLOT.right - 4, y, name, {
        anchor,
        fill: CLASS_LOOKS[name].ink,
        halo: "#FFFFFF",
      })
    )
  }`;
}

function describe({ areas }: ReportInput, points: ScatterPoints): string {
  const flagged = areas.class.filter(isFlagged).length;
  return `Moran scatterplot of ${wholeText(points.rows.length)} areas, ${
    wholeText(flagged)
  } of them flagged: each area's value against its surroundings. The slope is ${
    decimalText(fitLine(points).slope, 3)
  }`;
}
