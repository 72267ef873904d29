/**
 * Findings on a rate as `results.json` and the layer hold them.
 *
 * @module
 */
import { FUNNEL_WORDS, type FunnelWord } from "../prepare/funnel.ts";
import type { AreaRates, RateResults } from "../write/rate_results.ts";
import type { RateFindings } from "./rate_findings.ts";
import { figure, type Places, spread, spreadNumbers } from "./spread.ts";

/** Numbers of the whole map; undefined ones are null. */
export function rateResults(found: RateFindings): RateResults {
  const { plan, moments, risk, funnel } = found;
  const { index, atLeast, p } = risk.overdispersion;
  return {
    cases: plan.cases,
    population: plan.population,
    per: plan.per,
    share: plan.share,
    totalCases: found.totalCases,
    totalPopulation: found.totalPopulation,
    overall: plan.per * moments.rate,
    between: plan.per * Math.sqrt(moments.between),
    tested: plan.transform,
    overdispersion: { index: figure(index), atLeast, p: figure(p) },
    constantRisk: {
      maps: risk.maps,
      mean: figure(risk.moran.mean),
      atLeast: risk.moran.atLeast,
      atMost: risk.moran.atMost,
      p: risk.moran.p,
    },
    funnel: Object.fromEntries(
      FUNNEL_WORDS.map((word) => [word, funnel.filter((other) => other === word).length]),
    ) as RateResults["funnel"],
  };
}

/** Rates of the used areas spread over all rows of the layer. */
export function areaRates(found: RateFindings, places: Places): AreaRates {
  const shown = (rates: Float64Array) =>
    spreadNumbers(rates.map((rate) => found.plan.per * rate), places);
  return {
    rate: shown(found.raw),
    shrunk: shown(found.shrunk),
    shrunkLocal: shown(found.shrunkLocal),
    funnel: spread<FunnelWord | null>(found.funnel, { ...places, fill: null }),
  };
}
