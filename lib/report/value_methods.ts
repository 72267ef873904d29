/**
 * How the tested values were made from what was read.
 *
 * @module
 */
import type { RateResults } from "../write/rate_results.ts";
import type { Run } from "../write/results.ts";
import type { Fact } from "./html_parts.ts";
import { wholeText } from "./number_text.ts";

/** Words for each way, as behind "the value tested". */
const MADE: Readonly<Record<Run["transform"], string>> = {
  none: "as it was read",
  log: "its natural logarithm",
  log1p: "the natural logarithm of 1 plus it",
  sqrt: "its square root",
  rank: "its rank among all used areas, ties sharing their mean rank",
  "normal-scores": "its normal score (Blom 1958), from the rank among all used areas",
  "freeman-tukey": "its Freeman-Tukey value",
  standardized: "its standardized rate",
};

/** What was tested, in a few words. */
export function transformWords({ transform }: Run): string {
  return MADE[transform];
}

/** Facts on transforms and rates for the methods; none for a value tested as it was read. */
export function valueMethods(run: Run): Fact[] {
  const { rate, transform } = run;
  if (rate === null) {
    return transform === "none" ? [] : [[
      "Transform",
      `What was tested of each value is ${
        MADE[transform]
      }. Transformed values are rounded to 13 significant digits.`,
    ]];
  }
  return [
    ["Tested rates", testedText(run)],
    ["Shrunken rates", SHRUNKEN],
    ["Funnel", funnelText(rate)],
    ["Chance at one risk", riskText(rate)],
  ];
}

function testedText({ transform }: Run): string {
  const standardized =
    "With the overall rate b, the population-weighted variance s² of the rates around it, the mean population n̄ and " +
    "a = max(0, s² − b/n̄), the standardized rate of an area with the rate r and the population n is " +
    "(r − b) / √(a + b/n) (Assunção & Reis 1999).";
  return transform === "standardized"
    ? `${standardized} It is what was tested, rounded to 13 significant digits.`
    : "Tested were Freeman-Tukey values, √1000 (√(y/n) + √((y + 1)/n)) for y cases in a population of n (Freeman & Tukey " +
      `1950), rounded to 13 significant digits. ${standardized} The empirical-Bayes index uses these.`;
}

const SHRUNKEN =
  "b + (r − b) a / (a + b/n) with the moments above (Marshall 1991); for the local form b, a and n̄ are those of the " +
  "area and its neighbors under the main definition, and an area without a neighbor has none.";

function funnelText({ share }: RateResults): string {
  return `Exact ${
    share ? "binomial" : "Poisson"
  } limits of the count that the overall rate would give the area's population (Spiegelhalter 2005), without interpolation: a count above the limit has at most 2.5\u00A0% or 0.1\u00A0% chance, and one below it likewise.`;
}

function riskText({ constantRisk: { maps }, share }: RateResults): string {
  return `On ${
    wholeText(maps)
  } maps the same number of cases was dealt out over the populations at one risk for all (${
    share ? "multivariate hypergeometric, as nobody counts twice" : "multinomial"
  }; Waller & Gotway 2004); the values were made anew on each, with their own mean and variance. Moran's I is compared two-sided. Over-dispersion is Σ y (y − 1) / p over its expectation, with p an area's share of the population (Potthoff & Whittinghill 1966), one-sided on the same maps.`;
}
