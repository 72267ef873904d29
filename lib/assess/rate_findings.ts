/**
 * What a rate adds to the findings: rates on safer ground, and two checks against chance.
 *
 * @module
 */
import { checkConstantRisk, type ConstantRisk } from "../inference/constant_risk.ts";
import { type FunnelWord, funnelWords } from "../prepare/funnel.ts";
import { type RateMoments, rateMoments, rawRates } from "../prepare/rate_moments.ts";
import { localShrunkenRates, shrunkenRates } from "../prepare/shrunken_rates.ts";
import { standardizedRates } from "../prepare/standardized_rates.ts";
import { type EbIndex, ebIndex } from "../statistics/eb_index.ts";
import type { WorkOptions } from "./options.ts";
import type { RatePlan } from "./plan_indicator.ts";
import type { Study } from "./study.ts";
import { rateValues } from "./tested_values.ts";

/** Findings on the used areas; rates are cases per one of the population. */
export interface RateFindings {
  readonly plan: RatePlan;
  readonly moments: RateMoments;
  readonly totalCases: number;
  readonly totalPopulation: number;
  readonly raw: Float64Array;
  readonly shrunk: Float64Array;
  /** NaN where an area is alone. */
  readonly shrunkLocal: Float64Array;
  readonly funnel: readonly FunnelWord[];
  readonly ebIndex: EbIndex;
  readonly risk: ConstantRisk;
}

/** Findings on a rate under the main definition of neighbor; null where the indicator is none. */
export async function rateFindings(
  { plan, indicator, main }: Study,
  { signal, onProgress }: WorkOptions,
): Promise<RateFindings | null> {
  const counts = indicator.rateCounts;
  if (counts === null || plan.indicator.kind !== "rate") return null;
  return {
    plan: plan.indicator,
    moments: rateMoments(counts),
    totalCases: sumOf(counts.cases),
    totalPopulation: sumOf(counts.population),
    raw: rawRates(counts),
    shrunk: shrunkenRates(counts),
    shrunkLocal: localShrunkenRates(counts, main.topology),
    funnel: funnelWords(counts),
    ebIndex: ebIndex(standardizedRates(counts), main.weights),
    risk: await checkConstantRisk(counts, main.weights, {
      valuesOf: rateValues(plan.indicator),
      permutations: plan.permutations,
      seed: plan.seed,
      signal,
      onProgress: onProgress && ((share) => onProgress("Dealing out cases at one risk", share)),
    }),
  };
}

function sumOf(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0);
}
