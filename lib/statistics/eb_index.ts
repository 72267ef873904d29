/**
 * The empirical-Bayes index: Moran's I of rates that allow for unequal populations.
 *
 * @module
 */
import { compensatedSum } from "../weights/compensated_sum.ts";
import { spatialLag } from "../weights/lag.ts";
import { weightSums } from "../weights/sums.ts";
import type { Weights } from "../weights/weights.ts";
import { checkWeightSum } from "./moran.ts";
import { standardize } from "./standardize.ts";

/** The index in both forms; positive where neighbors have similar rates. */
export interface EbIndex {
  /** Moran's I of the standardized rates, centered on their mean. */
  readonly value: number;
  /** As published, with the standardized rates themselves in the numerator. */
  readonly asPublished: number;
}

/**
 * The index of Assunção & Reis 1999 (Statistics in Medicine 18, 2147–2162): n/S0 · Σ w_ij z_i z_j / Σ (z - z̄)² of
 * the standardized rates z, which the paper does not center in the numerator. Both forms agree as far as the mean of z is
 * near 0. Cost: two passes over the links.
 *
 * @param rates Standardized rates as from `standardizedRates`.
 * @throws What `standardize` and `checkWeightSum` throw.
 */
export function ebIndex(rates: Float64Array, weights: Weights): EbIndex {
  const { z, sd } = standardize(rates);
  const { s0 } = weightSums(weights);
  checkWeightSum(s0);
  const products = (scores: Float64Array) =>
    compensatedSum(spatialLag(weights, scores).map((lag, i) => lag * scores[i])) / s0;
  return { value: products(z), asPublished: products(rates) / sd ** 2 };
}
