/**
 * The specification curve: Moran's I under every definition of neighbor that was tried.
 *
 * @module
 */
import type { DefinitionResult } from "../write/results.ts";
import { bottomAxis, type LinearScale, linearScale, type PlotArea } from "./axes.ts";
import { FAMILY_LOOKS } from "./family_looks.ts";
import { type Markup, markup } from "./markup.ts";
import { decimalText, pText } from "./number_text.ts";
import type { ReportInput } from "./report_input.ts";
import { INK, short, svgFigure, svgLine, svgText, textWidth } from "./svg.ts";
import { byFamily, definitionText } from "./sweep_order.ts";

const WIDTH = 1080;
const PLOT = { left: 300, right: 840, top: 44 } as const;
const COLUMNS = { value: 905, p: 985, adjusted: 1070 } as const;
const ROW = 24;
const FAMILY_ROW = 32;
const FOOT = 86;
const RADIUS = 5.5;

/** The title above a family's definitions. */
interface TitleLine {
  readonly y: number;
  readonly color: string;
  readonly title: string;
}

/** The line of one definition. */
interface DefinitionLine {
  readonly y: number;
  readonly color: string;
  readonly definition: DefinitionResult;
}

/** All lines from the top down, and the height of the figure. */
interface Layout {
  readonly titles: readonly TitleLine[];
  readonly lines: readonly DefinitionLine[];
  readonly height: number;
}

/**
 * Draws one line a definition, by family and size of I (specification curve: Simonsohn, Simmons & Nelson 2020):
 * a full mark where its own p is at most the level, a ring around it where the step-down
 * adjusted p is so too, a hollow mark else.
 *
 * @returns Null without a sweep.
 */
export function sweepFigure({ results }: ReportInput): Markup | null {
  const { sweep } = results;
  if (sweep === null) return null;
  const { level } = results.runs[0].local;
  const expected = results.runs[0].global.moranI.expected;
  const { titles, lines, height } = layOut(sweep.definitions);
  const area: PlotArea = { ...PLOT, bottom: height - FOOT };
  const x = linearScale(domainOf(sweep.definitions, expected), [PLOT.left, PLOT.right]);
  const main = lines.find(({ definition }) => definition.main);
  return svgFigure(
    {
      label: `Moran's I under ${sweep.definitions.length} definitions of neighbor, from ${
        decimalText(sweep.joint.smallest)
      } to ${decimalText(sweep.joint.largest)}`,
      width: WIDTH,
      height,
    },
    main ? stripe(main.y) : null,
    columnHeads(),
    bottomAxis(x, area, { title: "Moran's I", grid: true, ticks: 8 }),
    referenceLines(x, area, [
      { name: "expected", value: expected },
      { name: "main", value: main?.definition.value ?? null },
    ]),
    titles.map(({ y, color, title }) => svgText(8, y, title, { fill: color, weight: 600 })),
    lines.map((line) => definitionLine(line, x, level)),
    key(level, height - 14),
  );
}

function layOut(definitions: readonly DefinitionResult[]): Layout {
  const titles: TitleLine[] = [], lines: DefinitionLine[] = [];
  let y: number = PLOT.top;
  for (const group of byFamily(definitions)) {
    const { title, color } = FAMILY_LOOKS[group.family];
    titles.push({ y: y + 20, color, title });
    y += FAMILY_ROW;
    for (const definition of group.definitions) {
      lines.push({ y: y + ROW / 2, color, definition });
      y += ROW;
    }
  }
  return { titles, lines, height: y + 10 + FOOT };
}

/** All values and the expectation, with some room. */
function domainOf(
  definitions: readonly DefinitionResult[],
  expected: number | null,
): [number, number] {
  const values = [...definitions.map(({ value }) => value), expected]
    .filter((value) => value !== null);
  if (values.length === 0) return [-1, 1];
  const low = Math.min(...values), high = Math.max(...values);
  const room = 0.08 * (high - low) || 0.1;
  return [low - room, high + room];
}

function columnHeads(): Markup {
  const style = { anchor: "end", fill: INK.muted } as const;
  return markup`${svgText(COLUMNS.value, PLOT.top - 6, "I", style)}${
    svgText(COLUMNS.p, PLOT.top - 6, "own p", style)
  }${svgText(COLUMNS.adjusted, PLOT.top - 6, "adjusted p", style)}`;
}

/** Lines through the whole plot; names move apart where the lines stand close. */
function referenceLines(
  x: LinearScale,
  { top, bottom }: PlotArea,
  marks: readonly { readonly name: string; readonly value: number | null }[],
): Markup {
  const known = marks.flatMap(({ name, value }) => value === null ? [] : [{ name, at: x(value) }])
    .sort((a, b) => a.at - b.at);
  const isTight = known.length === 2 && known[1].at - known[0].at < 70;
  return markup`${
    known.map(({ name, at }, i) => [
      svgLine([at, top], [at, bottom], { stroke: INK.text, dash: "5 3" }),
      svgText(at, top - 6, name, { anchor: isTight ? (i === 0 ? "end" : "start") : "middle" }),
    ])
  }`;
}

function definitionLine(
  { y, color, definition }: DefinitionLine,
  x: LinearScale,
  level: number,
): Markup {
  const { value, p, pAdjusted, main } = definition;
  const baseline = y + 4.5;
  const numbers = { anchor: "end", weight: main ? 600 : 400 } as const;
  return markup`${ruleName(definition, baseline)}${
    value === null ? null : definitionMark([x(value), y], color, {
      passes: p !== null && p <= level,
      passesAdjusted: pAdjusted !== null && pAdjusted <= level,
    })
  }${svgText(COLUMNS.value, baseline, decimalText(value, 3), numbers)}${
    svgText(COLUMNS.p, baseline, pText(p, level), numbers)
  }${svgText(COLUMNS.adjusted, baseline, pText(pAdjusted, level), numbers)}
`;
}

/** A band behind the main definition. */
function stripe(y: number): Markup {
  return markup`<rect x="0" y="${y - ROW / 2}" width="${WIDTH}" height="${ROW}" fill="#F3EFE8"/>`;
}

/** The rule, cut where it is too long, with all of it in a tooltip. */
function ruleName(definition: DefinitionResult, baseline: number): Markup {
  const text = definitionText(definition) + (definition.main ? " (main)" : "");
  const room = PLOT.left - 40;
  const fits = textWidth(text) <= room;
  const shown = fits ? text : `${text.slice(0, Math.floor(room / textWidth("x")) - 1)}…`;
  const weight = definition.main ? 600 : 400;
  const name = svgText(24, baseline, shown, { weight });
  return fits ? name : markup`<g><title>${text}</title>${name}</g>`;
}

function definitionMark(
  [x, y]: readonly [number, number],
  color: string,
  { passes, passesAdjusted }: { readonly passes: boolean; readonly passesAdjusted: boolean },
): Markup {
  const ring = passesAdjusted &&
    markup`<circle cx="${short(x)}" cy="${short(y)}" r="${
      RADIUS + 3
    }" fill="none" stroke="${color}" stroke-width="1.3"/>`;
  return markup`${ring}<circle cx="${short(x)}" cy="${short(y)}" r="${RADIUS}" fill="${
    passes ? color : "#FFFFFF"
  }" stroke="${color}" stroke-width="1.6"/>`;
}

function key(level: number, baseline: number): Markup {
  const entries = [
    { text: `p above ${level}`, passes: false, passesAdjusted: false },
    { text: `p at most ${level}`, passes: true, passesAdjusted: false },
    {
      text: `at most ${level} after adjusting for all definitions`,
      passes: true,
      passesAdjusted: true,
    },
  ];
  let left: number = PLOT.left;
  return markup`${
    entries.map(({ text, ...passing }) => {
      const mark = definitionMark([left + 8, baseline - 4.5], INK.muted, passing);
      const label = svgText(left + 24, baseline, text, { fill: INK.muted });
      left += 44 + textWidth(text);
      return [mark, label];
    })
  }`;
}
