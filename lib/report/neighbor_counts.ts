/**
 * How many neighbors areas have.
 *
 * @module
 */
import type { NeighborSummary } from "../write/results.ts";
import { bottomAxis, leftAxis, linearScale, type PlotArea } from "./axes.ts";
import { type Markup, markup } from "./markup.ts";
import { decimalText, wholeText } from "./number_text.ts";
import type { ReportInput } from "./report_input.ts";
import { short, svgFigure } from "./svg.ts";

const SIZE = { width: 524, height: 280 } as const;
const PLOT: PlotArea = { left: 62, top: 14, right: 510, bottom: 224 };

/** More bars than this would be too thin to be told apart. */
const MOST_BARS = 40;

/** Areas with `from` to `to` neighbors, both included. */
export interface CountBar {
  readonly from: number;
  readonly to: number;
  readonly areas: number;
}

/** One bar for each number of neighbors, or for equal stretches of numbers where they run far. */
export function countBars(counts: NeighborSummary["neighborCounts"]): CountBar[] {
  if (counts.length === 0) return [];
  const numbers = counts.map(({ neighbors }) => neighbors);
  const least = Math.min(...numbers), most = Math.max(...numbers);
  const width = Math.ceil((most - least + 1) / MOST_BARS);
  const areas = new Array<number>(Math.ceil((most - least + 1) / width)).fill(0);
  for (const count of counts) areas[Math.floor((count.neighbors - least) / width)] += count.areas;
  return areas.map((areas, bar) => {
    const from = least + bar * width;
    return { from, to: from + width - 1, areas };
  });
}

/** Draws the bar chart; null without areas. */
export function neighborCountChart({ results }: ReportInput): Markup | null {
  const { neighbors } = results.runs[0];
  const bars = countBars(neighbors.neighborCounts);
  if (bars.length === 0) return null;
  const ends = [bars[0].from - 0.6, bars[bars.length - 1].to + 0.6] as const;
  const x = linearScale(ends, [PLOT.left, PLOT.right]);
  const fullest = Math.max(...bars.map(({ areas }) => areas));
  const y = linearScale([0, fullest * 1.05], [PLOT.bottom, PLOT.top]);
  const marks = bars.filter(({ areas }) => areas > 0).map(({ from, to, areas }) => {
    const left = x(from - 0.42), right = x(to + 0.42);
    return markup`<rect x="${short(left)}" y="${short(y(areas))}" width="${
      short(right - left)
    }" height="${short(PLOT.bottom - y(areas))}"><title>${
      barText({ from, to, areas })
    }</title></rect>`;
  });
  const ticks = Math.min(12, ends[1] - ends[0]);
  return svgFigure(
    {
      label: `Bar chart of the number of neighbors: from ${neighbors.minNeighbors} to ${
        wholeText(neighbors.maxNeighbors)
      }, on average ${decimalText(neighbors.meanNeighbors)}`,
      ...SIZE,
    },
    leftAxis(y, PLOT, { title: "Number of areas", ticks: 5, grid: true }),
    markup`<g fill="#6E7F8D">${marks}</g>`,
    bottomAxis(x, PLOT, { title: "Number of neighbors", ticks }),
  );
}

function barText({ from, to, areas }: CountBar): string {
  const range = from === to ? wholeText(from) : `${wholeText(from)} to ${wholeText(to)}`;
  return `${wholeText(areas)} areas with ${range} neighbors`;
}
