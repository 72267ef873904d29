/**
 * All figures of a report as files of their own.
 *
 * @module
 */
import { classMap } from "./class_map.ts";
import { linksMap } from "./links_map.ts";
import { moranScatter } from "./moran_scatter.ts";
import { neighborCountChart } from "./neighbor_counts.ts";
import { referenceHistogram } from "./reference_distribution.ts";
import type { ReportInput } from "./report_input.ts";
import { sweepFigure } from "./sweep_figure.ts";

/** Names of the figures, in the order of the page. */
export const FIGURE_NAMES = [
  "class_map",
  "moran_scatter",
  "reference_distribution",
  "sweep",
  "neighbor_counts",
  "links_map",
] as const;

/** See {@link FIGURE_NAMES}. */
export type FigureName = typeof FIGURE_NAMES[number];

/**
 * Draws every figure that the findings allow: name to a complete SVG document. The map is missing where
 * no area has a shape, the sweep where none was run, the histogram where all permutations are equal.
 * Cost: for 100,000 areas about a second.
 */
export function plotFigures(input: ReportInput): Map<FigureName, string> {
  const drawn = {
    class_map: classMap(input),
    moran_scatter: moranScatter(input),
    reference_distribution: referenceHistogram(input),
    sweep: sweepFigure(input),
    neighbor_counts: neighborCountChart(input),
    links_map: linksMap(input),
  };
  const figures = new Map<FigureName, string>();
  for (const name of FIGURE_NAMES) {
    const figure = drawn[name];
    if (figure) figures.set(name, figure.markup);
  }
  return figures;
}
