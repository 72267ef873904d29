/**
 * The class map: which areas stand out, and how.
 *
 * @module
 */
import { isFlagged } from "../write/class_looks.ts";
import { AREA_CLASSES } from "../write/results.ts";
import { countClasses } from "./class_words.ts";
import { hatchPatterns } from "./hatches.ts";
import { fitMap, type MapFrame, type MapRoom, UNITS } from "./map_frame.ts";
import {
  drawGroup,
  MAP_NAME,
  type MapGroup,
  mapGroups,
  mapSizes,
  type ShapeKind,
} from "./map_groups.ts";
import { drawLegend, LEGEND_ROW, legendEntries, type LegendEntry } from "./map_legend.ts";
import { type Markup, markup } from "./markup.ts";
import { wholeText } from "./number_text.ts";
import type { ReportInput } from "./report_input.ts";
import { scaleBar } from "./scale_bar.ts";
import { svgFigure } from "./svg.ts";

/** Widest a map is drawn, in figure units: the width of the page. */
const FULL_WIDTH = 1080;
/** Layers wider than this have the legend below, others beside. */
const WIDE_RATIO = 1.3;
const LEGEND_COLUMNS = 3;
const GAP = 36;
/** Around the map, so that marks and outlines at its border are whole. */
const MARGIN = 8;

/**
 * Draws the map with legend and scale bar. Up to 3,000 areas each carries a tooltip; areas of larger layers are
 * merged by class. Coordinates are whole units of a map at most 2,160 wide, so that 100,000 areas take a few
 * megabytes. Cost: one pass over the vertices; 100,000 areas of 24 vertices in about a second.
 *
 * @returns Null where no area has a shape.
 */
export function classMap(input: ReportInput): Markup | null {
  const frame = fitMap(input, mapRoom);
  if (frame === null) return null;
  const groups = mapGroups(input);
  const sizes = mapSizes(frame, input.areas.class.length);
  const entries = legendEntries(input);
  const layout = layOut(frame, entries);
  const kind = commonKind(groups);
  const scale = 1 / UNITS;
  return svgFigure(
    { label: describe(input), width: layout.width, height: layout.height },
    hatchPatterns(MAP_NAME, sizes.tile),
    markup`<g transform="translate(${MARGIN} ${MARGIN}) scale(${scale})">
${groups.map((group) => drawGroup(input, group, { frame, sizes }))}</g>
`,
    markup`<g transform="translate(${layout.legendLeft} ${layout.legendTop})">${
      drawLegend(entries, { columns: layout.columns, kind, sizes })
    }</g>`,
    scaleBar(frame.metersPerUnit, { left: MARGIN, top: layout.barTop, mapWidth: frame.width }),
  );
}

function mapRoom(ratio: number): MapRoom {
  return ratio >= WIDE_RATIO
    ? { width: FULL_WIDTH - 2 * MARGIN, height: 760 }
    : { width: FULL_WIDTH - 2 * MARGIN - GAP - LEGEND_ROW.width, height: 820 };
}

interface Layout {
  readonly width: number;
  readonly height: number;
  readonly columns: number;
  readonly legendLeft: number;
  readonly legendTop: number;
  readonly barTop: number;
}

function layOut(frame: MapFrame, entries: readonly LegendEntry[]): Layout {
  const barTop = Math.round(frame.height) + 2 * MARGIN + 14;
  const below = barTop + 18;
  if (frame.width / frame.height >= WIDE_RATIO) {
    const rows = Math.ceil(entries.length / LEGEND_COLUMNS);
    return {
      width: FULL_WIDTH,
      height: below + 10 + rows * LEGEND_ROW.height,
      columns: LEGEND_COLUMNS,
      legendLeft: MARGIN,
      legendTop: below + 10,
      barTop,
    };
  }
  const legendLeft = Math.round(frame.width) + 2 * MARGIN + GAP;
  return {
    width: legendLeft + LEGEND_ROW.width,
    height: Math.max(below, entries.length * LEGEND_ROW.height),
    columns: 1,
    legendLeft,
    legendTop: MARGIN,
    barTop,
  };
}

/** Kind of most areas, by which the legend is drawn. */
function commonKind(groups: readonly MapGroup[]): ShapeKind {
  const counts = { polygon: 0, line: 0, point: 0 };
  for (const { kind, rows } of groups) counts[kind] += rows.length;
  return (["polygon", "line", "point"] as const).reduce((best, kind) =>
    counts[kind] > counts[best] ? kind : best
  );
}

function describe({ areas }: ReportInput): string {
  const counts = countClasses(areas);
  const listed = AREA_CLASSES.filter((name) => isFlagged(name) || counts[name] > 0)
    .map((name) => `${wholeText(counts[name])} ${name}`);
  return `Map of ${wholeText(areas.class.length)} areas by class: ${listed.join(", ")}`;
}
