/**
 * The legend of the class map: how it is drawn, what it means, how many areas.
 *
 * @module
 */
import { isFlagged, isFragile } from "../write/class_looks.ts";
import { AREA_CLASSES, type AreaClass } from "../write/results.ts";
import { CLASS_WORDS, countClasses } from "./class_words.ts";
import { UNITS } from "./map_frame.ts";
import { groupStyle, type MapGroup, type MapSizes, type ShapeKind } from "./map_groups.ts";
import { markCorners } from "./map_marks.ts";
import { type Markup, markup, trusted } from "./markup.ts";
import { wholeText } from "./number_text.ts";
import { relativePath } from "./relative_path.ts";
import type { ReportInput } from "./report_input.ts";
import { INK, svgText } from "./svg.ts";

/** One entry. */
export interface LegendEntry {
  readonly name: AreaClass;
  readonly fragile: boolean;
  readonly title: string;
  readonly words: string;
  readonly count: number;
}

/** Size of an entry in figure units. */
export const LEGEND_ROW = { width: 340, height: 46 } as const;

const TITLE_SIZE = 15;
const SWATCH = { width: 30, height: 22 } as const;

/** The four flagged classes always, the others where there are such areas. */
export function legendEntries({ areas }: ReportInput): LegendEntry[] {
  const counts = countClasses(areas);
  const shown = AREA_CLASSES.filter((name) => isFlagged(name) || counts[name] > 0);
  const entries = shown.map((name) => ({
    name,
    fragile: false,
    title: name as string,
    words: CLASS_WORDS[name],
    count: counts[name],
  }));
  const fragile = areas.steady?.filter(isFragile).length ?? 0;
  if (fragile === 0) return entries;
  return [...entries, {
    name: "high among high",
    fragile: true,
    title: "half strength, dashed",
    words: "fragile: most definitions disagree",
    count: fragile,
  }];
}

/** Entries in columns, filled from the top; the first one's upper left corner at (0, 0). */
export function drawLegend(
  entries: readonly LegendEntry[],
  { columns, kind, sizes }: {
    readonly columns: number;
    readonly kind: ShapeKind;
    readonly sizes: MapSizes;
  },
): Markup {
  const rows = Math.ceil(entries.length / columns);
  return markup`<g>${
    entries.map((entry, i) => {
      const x = Math.floor(i / rows) * LEGEND_ROW.width, y = i % rows * LEGEND_ROW.height;
      return markup`<g transform="translate(${x} ${y})">${swatch({ ...entry, kind }, sizes)}${
        entryText(entry)
      }</g>
`;
    })
  }</g>`;
}

function entryText({ title, count, words }: LegendEntry): Markup {
  const left = SWATCH.width + 12, right = LEGEND_ROW.width - 30;
  return markup`${svgText(left, 15, title, { size: TITLE_SIZE, weight: 600 })}${
    svgText(right, 15, wholeText(count), { size: TITLE_SIZE, anchor: "end" })
  }${svgText(left, 33, words, { fill: INK.muted })}`;
}

function swatch(group: Omit<MapGroup, "rows">, sizes: MapSizes): Markup {
  const width = UNITS * SWATCH.width, height = UNITS * SWATCH.height;
  const path = relativePath();
  if (group.kind === "polygon") path.ring([0, 0, width, 0, width, height, 0, height]);
  else if (group.kind === "line") path.line([0, height / 2, width, height / 2]);
  else {
    const corners = markCorners(group.name, 12);
    path.ring(corners.map((offset, i) => offset + (i % 2 === 0 ? width : height) / 2));
  }
  const style = groupStyle(group, { ...sizes, outline: 1.6 });
  return markup`<path transform="scale(${1 / UNITS})" d="${trusted(path.text())}" ${style}/>`;
}
