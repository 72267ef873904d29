/**
 * The conditional permutation test of a weighted sum of neighbors, the form behind every local statistic
 * that holds an area's own value and permutes the others.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { BLOCK } from "./dealer.ts";
import { type CountingTask, enumerateArrangements, enumerateSubsets } from "./enumerate_local.ts";
import { gather } from "./gather.ts";
import { checkRows, scaleRows, sortRows } from "./local_rows.ts";
import type { PermuteOptions } from "./options.ts";
import { orderAreas } from "./order_areas.ts";
import { stageOf } from "./pace.ts";
import type { PairTerm } from "./pair_term.ts";
import type { RankedJob } from "./ranked_job.ts";
import { runJob } from "./run_job.ts";
import { seedFromText } from "./seed.ts";
import { type Ledger, openLedger, type SumCounts } from "./sum_counts.ts";
import { AREAS_PER_UNIT, TAIL_HITS, type WeighedJob } from "./weighed_job.ts";

/** Options of {@link permuteNeighborSums}, all of which are settled. */
export interface SumOptions extends PermuteOptions {
  readonly permutations: number;
  /** Areas to test, ascending; all by default. */
  readonly areas?: Uint32Array;
  /**
   * What a neighbor adds to the sum.
   * @default "score"
   */
  readonly term?: PairTerm;
}

/** Draws that every area of unequal weights gets before the stopping rule is asked. */
const FIRST_DRAWS = 10 * BLOCK;

/**
 * Counts, for each area, how often the weighted sum of its neighbors' terms would be as large or as small
 * if the other n - 1 scores were permuted. `z` are standard scores, already checked; each row is scaled to a
 * largest weight of 1, and sums within 1e-10 count as equal. An area without a weight other than 0 is alone.
 *
 * Scores under equal weights are ranked among shared draws; all else is weighed, and goes on beyond 10,240
 * draws only where a tail is still rare. Where fewer cases exist than permutations are asked
 * for, they are enumerated. Cost: see `ranked_job.ts` and `weighed_job.ts`.
 *
 * @throws RangeError for weights that are not finite and for areas with more neighbors than there are other areas.
 */
export async function permuteNeighborSums(
  z: Float64Array,
  weights: Weights,
  options: SumOptions,
): Promise<SumCounts> {
  checkRows(weights);
  const ledger = openLedger(z.length);
  const seed = seedFromText(options.seed ?? "nearkin");
  const { term = "score" } = options;
  const { subsets, arrangements, ranked, weighed } = sortRows(weights, options);
  const steps = [
    { areas: subsets, count: enumerateSubsets },
    { areas: arrangements, count: enumerateArrangements },
    { areas: ranked, count: sampleRanked },
    { areas: weighed, count: sampleWeighed },
  ].filter(({ areas }) => areas.length > 0);
  for (const [step, { areas, count }] of steps.entries()) {
    const part = stageOf(options, step / steps.length, (step + 1) / steps.length);
    await count(ledger, { z, weights, term, seed, areas, options: part });
  }
  return ledger.counts;
}

async function sampleRanked(ledger: Ledger, sampling: CountingTask): Promise<void> {
  const { z, weights, seed, areas, options } = sampling;
  const { offsets, observed } = scaleRows(weights, areas, sampling);
  const { places, degrees, starts } = orderAreas(
    areas.map((_, a) => offsets[a + 1] - offsets[a]),
    observed,
  );
  const order = gather(areas, places);
  const job: RankedJob = {
    kind: "ranked",
    seed,
    permutations: options.permutations,
    z: testedFirst(z, order),
    observed: gather(observed, places),
    degrees,
    starts,
  };
  const parts = await runJob(job, options);
  for (let a = 0; a < order.length; a++) {
    let atLeast = 0, atMost = 0;
    for (const part of parts) {
      // A worker's share may lie below 0, as areas that drew themselves are corrected; only the sum is a count.
      atLeast += part.atLeast[a] | 0;
      atMost += part.atMost[a] | 0;
    }
    ledger.enter(order[a], {
      atLeast,
      atMost,
      permutations: options.permutations,
      enumerated: false,
    });
  }
}

/** Scores of the areas in `order`, followed by those of all others. */
function testedFirst(z: Float64Array, order: Uint32Array): Float64Array {
  const arranged = new Float64Array(z.length);
  const isTested = new Uint8Array(z.length);
  for (let place = 0; place < order.length; place++) {
    arranged[place] = z[order[place]];
    isTested[order[place]] = 1;
  }
  let next = order.length;
  for (let area = 0; area < z.length; area++) if (!isTested[area]) arranged[next++] = z[area];
  return arranged;
}

/** First a fixed number of draws for all, then more for those that are still rare in a tail. */
async function sampleWeighed(ledger: Ledger, sampling: CountingTask): Promise<void> {
  const { areas, options } = sampling;
  const first = Math.min(options.permutations, FIRST_DRAWS);
  if (first === options.permutations) {
    return await weigh(ledger, { ...sampling, from: 0, to: first, stopping: false });
  }
  const [part, rest] = [stageOf(options, 0, 0.5), stageOf(options, 0.5, 1)];
  await weigh(ledger, { ...sampling, options: part, from: 0, to: first, stopping: false });
  const rare = areas.filter((a) =>
    Math.min(ledger.counts.atLeast[a], ledger.counts.atMost[a]) < TAIL_HITS
  );
  await weigh(ledger, {
    ...sampling,
    areas: rare,
    options: rest,
    from: first,
    to: options.permutations,
    stopping: true,
  });
}

type Weighing = CountingTask & { from: number; to: number; stopping: boolean };

async function weigh(ledger: Ledger, weighing: Weighing): Promise<void> {
  const { z, weights, term, seed, areas, from, to, stopping, options } = weighing;
  if (areas.length === 0) return;
  const job: WeighedJob = {
    kind: "weighed",
    seed,
    from,
    to,
    stopping,
    z,
    term,
    areas,
    ...scaleRows(weights, areas, weighing),
    atLeast: gather(ledger.counts.atLeast, areas),
    atMost: gather(ledger.counts.atMost, areas),
  };
  for (const part of (await runJob(job, options)).flat()) {
    part.drawn.forEach((permutations, a) =>
      ledger.enter(areas[part.unit * AREAS_PER_UNIT + a], {
        atLeast: part.atLeast[a],
        atMost: part.atMost[a],
        permutations,
        enumerated: false,
        stopped: part.stopped[a] === 1,
      })
    );
  }
}
