/**
 * A rate against chance: is it more variable than one risk for all would make it, and which areas are?
 *
 * @module
 */
import { FUNNEL_WORDS } from "../prepare/funnel.ts";
import { counted } from "../sweep/phrases.ts";
import type { RateResults } from "../write/rate_results.ts";
import type { Run } from "../write/results.ts";
import { facts, section, table } from "./html_parts.ts";
import { type Markup, markup, type Part } from "./markup.ts";
import { decimalText, pText, valueText, wholeText } from "./number_text.ts";
import { areaName, type ReportInput } from "./report_input.ts";

/** Areas listed on the page; `areas.csv` has all. */
const MOST_LISTED = 30;

/** Explanation, numbers and the areas farthest from the overall rate; null where the indicator is no rate. */
export function ratesSection(input: ReportInput): Markup | null {
  const [run] = input.results.runs;
  if (run.rate === null) return null;
  return section(
    "rates",
    "Rates",
    markup`<p>${EXPLANATION}</p>\n`,
    numbers(run, run.rate),
    farthestTable(input, run.rate),
  );
}

const EXPLANATION =
  "Rates of small populations swing widely by chance alone. Therefore the raw rates are shown but not tested: what " +
  "is tested puts small and large populations on one scale. A shrunken rate is moved toward the rate of the " +
  "whole map, or of the area and its neighbors, the more so the smaller the population. The funnel word says where an area's " +
  "count lies against what the overall rate would give its population: outside 95\u00A0% or 99.8\u00A0% limits, or inside. " +
  "With many areas some lie outside the limits by chance, and a map can be more variable than chance without being " +
  "clustered.";

function numbers({ local: { level }, global }: Run, rate: RateResults): Markup {
  const { overdispersion, constantRisk } = rate;
  return facts([
    [
      "Overall rate",
      `${valueText(rate.overall)} per ${wholeText(rate.per)}: ${
        counted(rate.totalCases, "case")
      } (${rate.cases}) in a population of ${valueText(rate.totalPopulation)} (${rate.population})`,
    ],
    [
      "Between areas",
      rate.between === 0
        ? "no more variation than chance leaves"
        : `standard deviation ${valueText(rate.between)} per ${wholeText(rate.per)} beyond chance`,
    ],
    [
      "More variable than chance?",
      `index of over-dispersion ${decimalText(overdispersion.index, 3)} (1 by chance), p = ${
        pText(overdispersion.p, level)
      }: ${wholeText(overdispersion.atLeast)} of ${
        wholeText(constantRisk.maps)
      } maps with one risk for all vary at least as much`,
    ],
    [
      "I at one risk for all",
      `on these maps Moran's I is ${decimalText(constantRisk.mean, 4)} on average; p = ${
        pText(constantRisk.p, level)
      }, two-sided: ${wholeText(constantRisk.atLeast)} have an I at least as large and ${
        wholeText(constantRisk.atMost)
      } one at most as large`,
    ],
    global.ebIndex && [
      "Empirical-Bayes index",
      `${decimalText(global.ebIndex.value, 4)} centered, ${
        decimalText(global.ebIndex.asPublished, 4)
      } as published`,
    ],
    [
      "Funnel limits",
      FUNNEL_WORDS.map((word) => `${word}: ${counted(rate.funnel[word], "area")}`).join("; "),
    ],
  ]);
}

/** Areas whose shrunken rate is farthest from the overall one: of those that chance explains least. */
function farthestTable(input: ReportInput, { overall, per }: RateResults): Markup | null {
  const { rates } = input.areas;
  if (rates === null || overall === null) return null;
  const distance = (row: number) => Math.abs(rates.shrunk[row] - overall);
  const rows = [...rates.shrunk.keys()]
    .filter((row) => rates.funnel[row] !== null && rates.funnel[row] !== "inside")
    .sort((a, b) => distance(b) - distance(a) || a - b);
  if (rows.length === 0) return null;
  const listed = rows.slice(0, MOST_LISTED);
  const numbered = ["Raw", "Shrunken", "Locally shrunken"].map((title) => ({
    title,
    numbers: true,
  }));
  const cells = (row: number): Part[] => [
    areaName(input, row),
    valueText(rates.rate[row]),
    valueText(rates.shrunk[row]),
    valueText(rates.shrunkLocal[row]),
    rates.funnel[row],
  ];
  return table(
    `Rates per ${wholeText(per)} of the ${
      listed.length < rows.length ? `${listed.length} of ` : ""
    }${
      wholeText(rows.length)
    } areas outside the 95\u00A0% limits, the shrunken rate farthest from the overall one first; areas.csv has all areas`,
    [{ title: "Area" }, ...numbered, { title: "Funnel" }],
    listed.map(cells),
  );
}
