/**
 * The map as a whole: scatterplot, reference distribution and the numbers of Moran's I.
 *
 * @module
 */
import { facts, figure, section } from "./html_parts.ts";
import { type Markup, markup } from "./markup.ts";
import { decimalText, pText, valueText, wholeText } from "./number_text.ts";
import type { FigureName } from "./plots.ts";
import type { ReportInput } from "./report_input.ts";

/** Both charts side by side, then every number of the global test. */
export function globalSection(
  input: ReportInput,
  figures: ReadonlyMap<FigureName, string>,
): Markup {
  return section(
    "whole",
    "The map as a whole",
    markup`<div class="pair">
${figure(figures.get("moran_scatter"), scatterCaption(input))}<div>${
      figure(figures.get("reference_distribution"), histogramCaption(input))
    }</div>
</div>
`,
    numbers(input),
  );
}

function scatterCaption({ results, areas }: ReportInput): string {
  const { neighbors } = results.runs[0];
  const alone = neighbors.islands > 0
    ? " Areas without a neighbor have height 0 and are part of the slope."
    : "";
  const many = areas.class.length > 5000
    ? " Hexagons show how many areas lie where, darker for more; colored ones hold mostly areas of that class."
    : " Colored areas stand out, gray ones do not.";
  return "Each area's own value against its surroundings. In the upper right and lower left areas are like their " +
    `neighbors, in the other corners unlike them. The slope of the line is Moran's I.${many}${alone}`;
}

function histogramCaption({ results }: ReportInput): string {
  const { permutations, enumerated } = results.runs[0].global.moranI;
  return enumerated
    ? `Moran's I of all ${
      wholeText(permutations)
    } arrangements of the values. The shaded band holds the middle 95 %.`
    : `Moran's I of ${
      wholeText(permutations)
    } maps on which the same values were dealt out to the areas at ` +
      "random. The shaded band holds the middle 95 %. The farther out the observed I lies, the less chance explains it.";
}

function numbers({ results }: ReportInput): Markup {
  const { global: { moranI }, local: { level } } = results.runs[0];
  const { permutations, atLeast, atMost, enumerated, pInterval } = moranI;
  const maps = enumerated ? "arrangements" : "permutations";
  return facts([
    ["Moran's I", `${decimalText(moranI.value, 4)}, expected ${decimalText(moranI.expected, 4)}`],
    [
      "Variance",
      `${valueText(moranI.varianceRandomization)} under randomization, ${
        valueText(moranI.varianceNormality)
      } under normality; z = ${decimalText(moranI.z)} (randomization)`,
    ],
    [
      "Permutation test",
      `p = ${pText(moranI.p, level)}, ${moranI.alternative}: of ${
        wholeText(permutations)
      } ${maps}, ${wholeText(atLeast)} have an I at least as large and ${
        wholeText(atMost)
      } one at most as large`,
    ],
    pInterval && [
      "99 % interval of p",
      `${pText(pInterval[0], level)} to ${
        pText(pInterval[1], level)
      } (what more permutations could still change)`,
    ],
  ]);
}
