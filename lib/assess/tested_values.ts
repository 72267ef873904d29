/**
 * From what was read to the numbers that are tested.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { freemanTukey } from "../prepare/freeman_tukey.ts";
import type { RateCounts } from "../prepare/rate_moments.ts";
import { roundDigits } from "../prepare/round_digits.ts";
import { standardizedRates } from "../prepare/standardized_rates.ts";
import { transformValues } from "../prepare/transform.ts";
import type { IndicatorPlan, RatePlan } from "./plan_indicator.ts";
import type { ReadIndicator } from "./read_indicator.ts";

/** Numbers of the used areas. */
export interface TestedValues {
  readonly values: Float64Array;
  /** Cases and population of a rate; null for a value. */
  readonly rateCounts: RateCounts | null;
}

/**
 * The tested numbers of the used rows: a value or its transform, or the standardized rate.
 *
 * @throws {UnfitDataError} where a value cannot be transformed, or a rate has no cases at all.
 */
export function testedValues(
  read: ReadIndicator,
  used: Uint32Array,
  plan: IndicatorPlan,
): TestedValues {
  const pick = (all: Float64Array) => Float64Array.from(used, (row) => all[row]);
  if (plan.kind === "value") {
    const nameOf = (at: number) => `row ${used[at] + 1} (_row ${used[at]}) of field ${plan.field}`;
    return {
      values: transformValues(pick(read.shown), plan.transform, { nameOf }),
      rateCounts: null,
    };
  }
  const { cases, population, share } = read.rateCounts!;
  const counts = { cases: pick(cases), population: pick(population), share };
  if (counts.cases.every((count) => count === 0)) {
    throw new UnfitDataError(
      `Cannot test the rate ${plan.cases}/${plan.population} as none of its ${used.length} areas has any cases`,
    );
  }
  return { values: roundDigits(rateValues(plan)(counts)), rateCounts: counts };
}

/** How counts become the values that are tested, on the observed map and on any simulated one. */
export function rateValues({ transform }: RatePlan): (counts: RateCounts) => Float64Array {
  return transform === "freeman-tukey" ? freemanTukey : standardizedRates;
}
