/**
 * The report: one page for people, complete in one file.
 *
 * @module
 */
import { dataSection } from "./data_section.ts";
import { flaggedSection } from "./flagged_section.ts";
import { globalSection } from "./global_section.ts";
import { figure, section } from "./html_parts.ts";
import { type Markup, markup, trusted } from "./markup.ts";
import { methodsSection } from "./methods_section.ts";
import { neighborsSection } from "./neighbors_section.ts";
import { cautionsSection, rerunSection } from "./page_closing.ts";
import { pageHeader } from "./page_opening.ts";
import { PAGE_STYLE } from "./page_style.ts";
import { type FigureName, plotFigures } from "./plots.ts";
import { ratesSection } from "./rates_section.ts";
import type { ReportInput } from "./report_input.ts";
import { sweepSection } from "./sweep_section.ts";

/** Parts of the page that its contents list, by id. */
const CONTENTS = {
  map: "Map",
  areas: "Areas that stand out",
  whole: "The map as a whole",
  rates: "Rates",
  sweep: "Would it still stand?",
  neighbors: "Neighbors",
  data: "Data",
  methods: "Methods",
  cautions: "Cautions",
  rerun: "Files and rerunning",
} as const;

/**
 * The whole report as one HTML document: verdict first, then the map, the areas, the tests, the other definitions,
 * and everything a reviewer would ask for. It fetches nothing, runs no script, prints on A4, and says the
 * same in words and patterns as in color. The same input gives the same bytes.
 *
 * @param figures The figures where they are drawn already; drawn here otherwise.
 */
export function reportPage(
  input: ReportInput,
  figures: ReadonlyMap<FigureName, string> = plotFigures(input),
): string {
  const { results } = input;
  return markup`<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="generator" content="${results.tool.name} ${results.tool.version}">
<title>${results.runs[0].indicator} – nearkin report</title>
<style>${trusted(PAGE_STYLE)}</style>
</head>
<body>
${pageHeader(input)}<nav aria-label="Contents"><ul>${
    contentsOf(input).map(([id, title]) => markup`<li><a href="#${id}">${title}</a></li>`)
  }</ul></nav>
<main>
${mapSection(input, figures)}${flaggedSection(input)}${globalSection(input, figures)}${
    ratesSection(input)
  }${sweepSection(input, figures)}${neighborsSection(input, figures)}${dataSection(input)}${
    methodsSection(input)
  }${cautionsSection(input)}${rerunSection(input)}</main>
<footer>Made with ${results.tool.name} ${results.tool.version}.</footer>
</body>
</html>
`.markup;
}

/** Parts that this page has, by id and title. */
function contentsOf({ results }: ReportInput): [string, string][] {
  const isRate = results.runs[0].rate !== null;
  return Object.entries(CONTENTS).filter(([id]) => id !== "rates" || isRate);
}

function mapSection(input: ReportInput, figures: ReadonlyMap<FigureName, string>): Markup {
  const { local, neighbors } = input.results.runs[0];
  const map = figure(
    figures.get("class_map"),
    `Classes at level ${local.level} under the main definition of neighbor (${neighbors.rule}). Solid: like their ` +
      "surroundings; hatched: unlike them.",
  );
  return section(
    "map",
    CONTENTS.map,
    map ?? markup`<p>No area of the layer has a shape to draw.</p>\n`,
  );
}
