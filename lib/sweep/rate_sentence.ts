/**
 * The sentence of a verdict on a rate: "more variable than chance" and "clustered" are two findings.
 *
 * @module
 */
import { pValue } from "./phrases.ts";
import type { Finding, VerdictInput } from "./verdict_input.ts";

/**
 * Whether rates differ more between areas than by chance, and what that means beside the finding on the map; null where
 * the indicator is no rate, or has too few cases to tell. It adds to the finding and never goes beyond it.
 */
export function rateSentence({ run }: VerdictInput, finding: Finding): string | null {
  const { rate, local: { level } } = run;
  if (!rate || rate.overdispersion.p === null) return null;
  const { p } = rate.overdispersion;
  const isVaried = p <= level;
  const by = `between areas than by chance at one risk for all (over-dispersion ${
    pValue(p, level)
  })`;
  if (finding === "not shown") {
    return isVaried
      ? `The rates do differ more ${by}, but no pattern in where they do is shown.`
      : `The rates differ no more ${by}: nothing beyond chance is shown, neither in their size nor in their place.`;
  }
  const spread = isVaried
    ? `The rates also differ more ${by}.`
    : `Yet the rates differ no more ${by}: the differences that are ${finding} are small.`;
  return `${spread}${chanceClause(rate.constantRisk.p, level)}`;
}

/** What maps of constant risk say to the main definition's I. */
function chanceClause(p: number | null, level: number): string {
  if (p === null) return "";
  const result = `With the cases dealt out at one risk for all, the main definition's I has ${
    pValue(p, level)
  }`;
  return p <= level
    ? ` ${result}.`
    : ` ${result}: such a map could come about without any risk differing.`;
}
