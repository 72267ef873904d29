/**
 * The areas that stand out, one by one.
 *
 * @module
 */
import { isFlagged, isFragile } from "../write/class_looks.ts";
import { STEADY_WORDS } from "./class_words.ts";
import { section, table, type TableColumn } from "./html_parts.ts";
import { type Markup, markup, type Part } from "./markup.ts";
import { decimalText, percentText, pText, valueText, wholeText } from "./number_text.ts";
import { areaName, type ReportInput } from "./report_input.ts";

/** Areas listed on the page; `areas.csv` has all. */
const MOST_LISTED = 200;

/** Rows of the areas that the main definition flags: smallest p first, then the largest local I in size. */
export function flaggedRows({ areas }: ReportInput): number[] {
  return [...areas.class.keys()].filter((row) => isFlagged(areas.class[row])).sort((a, b) =>
    areas.p[a] - areas.p[b] || Math.abs(areas.i[b]) - Math.abs(areas.i[a]) || a - b
  );
}

/** Table of flagged areas, the most striking first. */
export function flaggedSection(input: ReportInput): Markup {
  const rows = flaggedRows(input);
  if (rows.length === 0) {
    return section(
      "areas",
      "Areas that stand out",
      markup`<p>No single area stands out at level ${input.results.runs[0].local.level}.</p>\n`,
    );
  }
  const listed = rows.slice(0, MOST_LISTED);
  const caption = listed.length < rows.length
    ? `The ${MOST_LISTED} areas with the smallest p of ${
      wholeText(rows.length)
    } that stand out; areas.csv has all areas`
    : `${wholeText(rows.length)} areas, smallest p first; areas.csv has all areas`;
  return section(
    "areas",
    "Areas that stand out",
    markup`<p>${explanation(input)}</p>\n`,
    table(caption, columnsOf(input), listed.map((row) => cellsOf(input, row))),
  );
}

function explanation({ areas }: ReportInput): string {
  const steady = areas.steady
    ? ` An area is steady if ${STEADY_WORDS.steady}, mostly if ${STEADY_WORDS.mostly}, and fragile if ${STEADY_WORDS.fragile}.`
    : "";
  return "The score is the distance of the value from the mean in standard deviations. The adjusted p allows for " +
    `the number of areas tested; it decides which areas are listed.${steady}`;
}

function columnsOf({ areas }: ReportInput): TableColumn[] {
  const numbers = ["p", "Adjusted p"].map((title) => ({ title, numbers: true }));
  return [
    { title: "Area" },
    { title: "Class" },
    { title: areas.prefix, numbers: true },
    { title: "Score", numbers: true },
    ...numbers,
    ...(areas.agree ? [{ title: "Agreement", numbers: true }] : []),
    ...(areas.steady ? [{ title: "Steadiness" }] : []),
  ];
}

function cellsOf(input: ReportInput, row: number): Part[] {
  const { areas, results } = input;
  const { level } = results.runs[0].local;
  return [
    areaName(input, row),
    classCell(input, row),
    valueText(areas.value[row]),
    decimalText(areas.z[row]),
    pText(areas.p[row], level),
    pText(areas.q[row], level),
    ...(areas.agree ? [percentText(areas.agree[row])] : []),
    ...(areas.steady ? [areas.steady[row] ?? "–"] : []),
  ];
}

function classCell({ areas }: ReportInput, row: number): Markup {
  const name = areas.class[row];
  const look = `c-${name.replaceAll(" ", "-")}`;
  const fragile = isFragile(areas.steady?.[row]) ? " is-fragile" : "";
  return markup`<span class="swatch ${look}${fragile}"></span>${name}`;
}
