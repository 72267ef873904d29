/**
 * The permutation distribution in few numbers, for results.json and the report.
 *
 * @module
 */
import type { ReferenceDistribution } from "../write/results.ts";

const QUANTILES = [0.005, 0.025, 0.05, 0.25, 0.5, 0.75, 0.95, 0.975, 0.995];
const BINS = 40;

/**
 * Mean, standard deviation (divisor m), quantiles (smallest value that at least that share of draws does
 * not exceed) and a histogram of 40 bins over the whole range; no bins where all draws are equal.
 *
 * @param drawn The statistic of each permutation.
 */
export function referenceDistribution(drawn: Float64Array): ReferenceDistribution {
  const sorted = drawn.toSorted();
  const count = sorted.length;
  const mean = sorted.reduce((sum, value) => sum + value, 0) / count;
  const square = sorted.reduce((sum, value) => sum + (value - mean) ** 2, 0) / count;
  return {
    mean,
    sd: Math.sqrt(square),
    quantiles: QUANTILES.map((at) => ({
      at,
      value: sorted[Math.max(0, Math.ceil(at * count) - 1)],
    })),
    bins: histogram(sorted),
  };
}

function histogram(sorted: Float64Array): ReferenceDistribution["bins"] {
  const start = sorted[0], end = sorted[sorted.length - 1];
  const width = (end - start) / BINS;
  if (!(width > 0)) return null;
  const counts = new Array<number>(BINS).fill(0);
  for (const value of sorted) counts[Math.min(BINS - 1, Math.floor((value - start) / width))]++;
  return { start, width, counts };
}
