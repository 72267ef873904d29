/**
 * Who is whose neighbor under the main definition.
 *
 * @module
 */
import { counted } from "../sweep/phrases.ts";
import { facts, figure, section } from "./html_parts.ts";
import { type Markup, markup } from "./markup.ts";
import { decimalText, lengthText, valueText, wholeText } from "./number_text.ts";
import type { FigureName } from "./plots.ts";
import type { ReportInput } from "./report_input.ts";

/** Bar chart of the number of neighbors beside the numbers that tell whether the links make sense. */
export function neighborsSection(
  input: ReportInput,
  figures: ReadonlyMap<FigureName, string>,
): Markup {
  const { neighbors, weights, standardize } = input.results.runs[0];
  return section(
    "neighbors",
    "Neighbors",
    markup`<div class="pair">
${
      figure(
        figures.get("neighbor_counts"),
        `Areas by their number of neighbors under the main definition (${neighbors.rule}). links.fgb shows every link on a map.`,
      )
    }<div>${
      facts([
        ["Rule", markup`<code>${neighbors.rule}</code>`],
        ["Weights", `${weights}, ${STANDARDIZED[standardize]}`],
        [
          "Links",
          `${counted(neighbors.pairs, "pair")}, ${wholeText(neighbors.links)} directed links`,
        ],
        [
          "Per area",
          `${decimalText(neighbors.meanNeighbors)} on average, ${
            wholeText(neighbors.minNeighbors)
          } to ${wholeText(neighbors.maxNeighbors)}`,
        ],
        ["Without a neighbor", counted(neighbors.islands, "area")],
        ["Connected pieces", wholeText(neighbors.components)],
        ["One-way links", wholeText(neighbors.oneWayLinks)],
        ["Longest link", longestLink(input)],
      ])
    }</div>
</div>
`,
  );
}

const STANDARDIZED = {
  row: "each area's weights sum to 1",
  none: "as they are",
  total: "all weights sum to the number of areas with a neighbor",
  variance: "scaled to even out their variance",
} as const;

function longestLink({ results }: ReportInput): string {
  const { longestLink } = results.runs[0].neighbors;
  if (longestLink === null) return "not measured";
  const unit = results.layer.metricCrs?.unit ?? "m";
  return unit === "m" ? lengthText(longestLink) : `${valueText(longestLink)} ${unit}`;
}
