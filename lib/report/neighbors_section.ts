/**
 * Who is whose neighbor under the main definition.
 *
 * @module
 */
import { counted } from "../sweep/phrases.ts";
import { type Fact, facts, figure, section } from "./html_parts.ts";
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
        `Areas by their number of neighbors under the main definition (${neighbors.rule}).`,
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
        ["Density", percentOf(neighbors.density)],
        ["Longest link", lengthIn(input, neighbors.longestLink)],
        ...distanceFacts(input),
        ...boundaryFacts(input),
      ])
    }</div>
</div>
${
      figure(
        figures.get("links_map"),
        "Each pair of neighbors as a line between the points of its areas; areas without a neighbor as squares. " +
          "links.fgb holds every link with its weight and length.",
      )
    }
`,
  );
}

const STANDARDIZED = {
  row: "each area's weights sum to 1",
  none: "as they are",
  total: "all weights sum to the number of areas with a neighbor",
  variance: "scaled to even out their variance",
} as const;

/** Distances that a band would need, and points that are one. */
function distanceFacts(input: ReportInput): (Fact | null)[] {
  const { noneAlone, oneComponent, sharingPlaces } = input.results.runs[0].diagnostics;
  return [
    noneAlone === null ? null : ["No area alone within", lengthIn(input, noneAlone)],
    oneComponent === null ? null : ["One piece within", lengthIn(input, oneComponent)],
    sharingPlaces ? ["At the point of another", counted(sharingPlaces, "area")] : null,
  ];
}

/** How the boundaries fit together. */
function boundaryFacts({ results }: ReportInput): (Fact | null)[] {
  const { boundaries, selfCrossing } = results.runs[0].diagnostics;
  if (boundaries === null) return [];
  const { nearVertexPairs, junctionPairs, overlapPairs, snappedPairs, nearMisses } = boundaries;
  const unlessNone = (term: string, count: number): Fact | null =>
    count > 0 ? [term, counted(count, "pair")] : null;
  return [
    unlessNone("Touching within rounding only", nearVertexPairs),
    unlessNone("Touching at T-junctions only", junctionPairs),
    unlessNone("Overlapping", overlapPairs),
    unlessNone("Joined by snap", snappedPairs),
    ["Nearly touching", counted(nearMisses, "pair")],
    selfCrossing > 0 ? ["Crossing themselves", counted(selfCrossing, "area")] : null,
  ];
}

function percentOf(share: number | null): string {
  return share === null ? "not defined" : `${valueText(100 * share)} % of all that could be`;
}

function lengthIn({ results }: ReportInput, length: number | null): string {
  if (length === null) return "not measured";
  const unit = results.layer.metricCrs?.unit ?? "m";
  return unit === "m" ? lengthText(length) : `${valueText(length)} ${unit}`;
}
