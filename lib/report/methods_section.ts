/**
 * How the numbers were made: every definition and default a reviewer would ask for.
 *
 * @module
 */
import { definitionsTried } from "../sweep/verdict_input.ts";
import type { Results, Run } from "../write/results.ts";
import { type Fact, facts, section } from "./html_parts.ts";
import { type Markup, markup } from "./markup.ts";
import { pText, wholeText } from "./number_text.ts";
import { citedIn, REFERENCES } from "./references.ts";
import type { ReportInput } from "./report_input.ts";
import { glossary } from "./rule_glossary.ts";
import { valueMethods } from "./value_methods.ts";

/** Methods as they were used in this run, then the papers they come from. */
export function methodsSection({ results }: ReportInput): Markup {
  const methods = facts(methodFacts(results));
  return section(
    "methods",
    "Methods",
    methods,
    markup`<h3>References</h3>
<ul class="references">
${
      citedIn(methods.markup.replaceAll("&amp;", "&")).map((name) =>
        markup`<li>${REFERENCES[name]}</li>\n`
      )
    }</ul>
`,
  );
}

function methodFacts(results: Results): (Fact | null)[] {
  const [run] = results.runs;
  return [
    ...valueMethods(run),
    ["Values", VALUES],
    ["Neighbors", neighborsText(results)],
    ["Distances", distancesText(results)],
    ["Weights", weightsText(run)],
    ["Moran's I", MORAN],
    ["Test of the map", globalText(results)],
    ["Test of each area", localText(run)],
    ["Many tests at once", adjustmentText(run)],
    ["Classes", CLASSES],
    results.sweep && ["Other definitions", sweepText(results)],
    results.sweep && ["Agreement and steadiness", STEADINESS],
    ["Chance", chanceText(results)],
  ];
}

const VALUES =
  "z is the distance of a value from the mean, in population standard deviations (divisor n), over all " +
  "areas with a usable value. Numbers count as tied when they differ by at most 10⁻¹⁰ standard deviations. " +
  "Areas without a usable value are taken out together with their links and stay in the outcome as rows.";

function neighborsText({ runs, sweep }: Results): Markup {
  const rules = sweep
    ? sweep.definitions.flatMap(({ rule, sameAs }) => [rule, ...sameAs])
    : [runs[0].neighbors.rule];
  const terms = glossary(rules).map(([term, words]) => markup`<br><code>${term}</code>: ${words}`);
  return markup`Main definition: <code>${
    runs[0].neighbors.rule
  }</code>. Contiguity is decided in the layer's own coordinates; points are equal, and touch a side, within 10⁻⁹ of the layer's diagonal. An area without a neighbor stays in n and in the mean, with weights of 0 (class alone). The terms mean:${terms}`;
}

function distancesText({ layer }: Results): string {
  if (layer.metricCrs === null) return "No distance entered this run.";
  const { name, definition, unit } = layer.metricCrs;
  const where = name === definition ? name : `${name} (${definition})`;
  const rounded = unit === "m"
    ? " Coordinates are rounded to 10⁻⁶ m before they are compared."
    : "";
  return `Between representative points, found in the layer's coordinates and measured in ${where}.${rounded}`;
}

function weightsText({ weights, standardize }: Run): string {
  const base = weights === "equal"
    ? "Every neighbor counts alike"
    : `Neighbors count by ${weights}`;
  switch (standardize) {
    case "row":
      return `${base}; each area's weights are divided by their sum, so that its spatial lag is the mean of its neighbors.`;
    case "total":
      return `${base}; all weights are divided by one number so that they sum to the number of areas with a neighbor.`;
    case "variance":
      return `${base}; weights are scaled to even out their variance (Tiefelsdorf, Griffith & Boots 1999).`;
    case "none":
      return `${base}; weights are used as they are, so that areas with many neighbors have more say.`;
  }
}

const MORAN =
  markup`I = n/S₀ · Σ w<sub>ij</sub> z<sub>i</sub> z<sub>j</sub> / Σ z<sub>i</sub>² (Moran 1950), with S₀ the sum of all weights. Where location plays no part it is expected at −1/(n − 1); it is larger where neighbors are alike and smaller where they are unlike. Variances under normality and randomization follow Cliff &amp; Ord 1981. The scatterplot shows n/S₀ times the spatial lag (Anselin 1996), so that its slope is I with any weights.`;

function globalText({ runs }: Results): string {
  const { permutations, enumerated } = runs[0].global.moranI;
  return enumerated
    ? `All ${
      wholeText(permutations)
    } arrangements of the values were counted; p is two-sided, twice the smaller share of arrangements with an I at least, or at most, as large.`
    : `${
      wholeText(permutations)
    } random permutations of the values over the areas. p is two-sided: 2 (r + 1) / (m + 1) with r the smaller number of permutations with an I at least, or at most, as large, ties in both, and m permutations (Phipson & Smyth 2010), so that p is never 0. Its 99\u00A0% interval is that of Clopper & Pearson 1934.`;
}

function localText({ local }: Run): Markup {
  const { permutations, redrawn, floor, level, floorDecides } = local;
  const again = redrawn > 0
    ? ` ${
      wholeText(redrawn)
    } areas stood at the smallest possible p where it decides, and were drawn again with more permutations.`
    : "";
  const open = floorDecides
    ? " Even so, some areas remain at the smallest possible p where a smaller one could change which areas are flagged."
    : "";
  return markup`Local Moran's I is z<sub>i</sub> Σ w<sub>ij</sub> z<sub>j</sub> (Anselin 1995). The area keeps its own value while the others are permuted, ${
    wholeText(permutations)
  } times. p is two-sided as above; the smallest possible is ${
    pText(floor, level)
  }.${again}${open}`;
}

const ADJUSTED: Readonly<Record<Run["local"]["adjust"], string>> = {
  none: "p was not adjusted for the number of areas, so false alarms must be expected",
  bonferroni: "p was multiplied by the number of areas tested (Bonferroni; Dunn 1961)",
  holm: "p was adjusted stepwise (Holm 1979)",
  bh:
    "The false-discovery rate is controlled (Benjamini & Hochberg 1995, for areas as in Caldas de Castro & Singer 2006)",
  by:
    "The false-discovery rate is controlled under any dependence (Benjamini & Yekutieli 2001, for areas as in Caldas de Castro & Singer 2006)",
};

function adjustmentText({ local }: Run): string {
  return `${ADJUSTED[local.adjust]}. ${
    wholeText(local.tested)
  } areas have a p; an area stands out where its adjusted p is at most ${local.level}.`;
}

const CLASSES =
  "An area that stands out is named after the sign of its own z and of the mean z of its neighbors: high among high, " +
  "low among low, high among low, low among high. All other tested areas are no evidence, which does not mean " +
  "that they are average.";

function sweepText(results: Results): string {
  const sweep = results.sweep!;
  const { level } = results.runs[0].local;
  return `${
    definitionsTried(sweep)
  } definitions (specification curve: Simonsohn, Simmons & Nelson 2020), all on the same ${
    wholeText(sweep.permutations)
  } permuted maps; definitions with the same weights are merged. A definition's score is (I − mean) / sd over these maps, the observed one included, and its p the two-sided rank. The joint test ranks the median score, averaged within each kind of definition and then over kinds. The share of definitions with p at most ${level} is compared with the same share on every permuted map, the direction chosen anew on each. The adjusted p of a definition is step-down by the largest score in size (Westfall & Young 1993). Areas were tested with ${
    wholeText(sweep.localPermutations)
  } permutations in each other definition.`;
}

const STEADINESS =
  "Agreement is the share of definitions that give the main definition's class, averaged within each kind and then " +
  "over kinds; definitions under which the area is alone are left out. Areas that some definition flags are called " +
  "steady from 80\u00A0%, mostly from 50\u00A0%, and fragile below; all others are quiet.";

function chanceText({ seed, tool }: Results): string {
  return `Seed "${seed}", one stream of random numbers for each permutation or area, so that any number of processors gives the same numbers. Made with ${tool.name} ${tool.version}.`;
}
