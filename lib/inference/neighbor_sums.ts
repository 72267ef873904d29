/**
 * The conditional permutation test of a weighted sum of neighbors, the form behind every local statistic
 * that holds an area's own value and permutes the others.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { arrangementsOf, countArrangements } from "./arrangement_counts.ts";
import { BLOCK } from "./dealer.ts";
import { gather } from "./gather.ts";
import { type LocalRows, scaleRows, sortRows } from "./local_rows.ts";
import type { PermuteOptions } from "./options.ts";
import { orderAreas } from "./order_areas.ts";
import type { RankedJob } from "./ranked_job.ts";
import { runJob } from "./run_job.ts";
import { type Seed, seedFromText } from "./seed.ts";
import { createSubsetCounter, smallerSide, subsetsOf } from "./subset_counts.ts";
import { type Ledger, openLedger, type SumCounts } from "./sum_counts.ts";
import { AREAS_PER_UNIT, TAIL_HITS, type WeighedJob } from "./weighed_job.ts";

/** Options of {@link permuteNeighborSums}, all of which are settled. */
export interface SumOptions extends PermuteOptions {
  readonly permutations: number;
  /** Areas to test, ascending; all by default. */
  readonly areas?: Uint32Array;
}

/** Draws that every area of unequal weights gets before the stopping rule is asked. */
const FIRST_DRAWS = 10 * BLOCK;

/**
 * Counts, for each area, how often the weighted sum of its neighbors' scores would be as large or as small
 * if the other n - 1 scores were permuted. `z` are standard scores, already checked; each row is scaled to a
 * largest weight of 1, and sums within 1e-10 count as equal.
 *
 * Rows of equal weights are ranked among shared draws; rows of unequal weights are weighed, and go on
 * beyond 10,240 draws only where a tail is still rare. Where fewer cases exist than permutations are asked
 * for, they are enumerated. Cost: see `ranked_job.ts` and `weighed_job.ts`.
 */
export async function permuteNeighborSums(
  z: Float64Array,
  weights: Weights,
  options: SumOptions,
): Promise<SumCounts> {
  const ledger = openLedger(z.length);
  const seed = seedFromText(options.seed ?? "nearkin");
  const rows = sortRows(weights, options);
  enumerateSubsets(ledger, { z, weights, areas: rows.subsets });
  enumerateArrangements(ledger, { z, weights, areas: rows.arrangements });
  await sampleRanked(ledger, { z, weights, seed, rows, options });
  await sampleWeighed(ledger, { z, weights, seed, rows, options });
  return ledger.counts;
}

interface Task {
  readonly z: Float64Array;
  readonly weights: Weights;
}

function enumerateSubsets(ledger: Ledger, task: Task & { areas: Uint32Array }): void {
  const { z, weights, areas } = task;
  if (areas.length === 0) return;
  const { offsets, observed } = scaleRows(weights, areas, z);
  const neighbors = areas.map((_, a) => offsets[a + 1] - offsets[a]);
  const largest = neighbors.reduce((max, k) => Math.max(max, smallerSide(z.length, k)), 0);
  const counter = createSubsetCounter(z, largest);
  areas.forEach((area, a) =>
    ledger.enter(area, {
      ...counter.count(area, neighbors[a], observed[a]),
      permutations: subsetsOf(z.length - 1, neighbors[a]),
      enumerated: true,
    })
  );
}

function enumerateArrangements(ledger: Ledger, task: Task & { areas: Uint32Array }): void {
  const { z, weights, areas } = task;
  const rows = scaleRows(weights, areas, z);
  areas.forEach((area, a) => {
    const row = rows.weights.subarray(rows.offsets[a], rows.offsets[a + 1]);
    ledger.enter(area, {
      ...countArrangements(z, { area, weights: row, observed: rows.observed[a] }),
      permutations: arrangementsOf(z.length - 1, row.length),
      enumerated: true,
    });
  });
}

type Sampling = Task & { seed: Seed; rows: LocalRows; options: SumOptions };

async function sampleRanked(ledger: Ledger, sampling: Sampling): Promise<void> {
  const { z, weights, seed, rows, options } = sampling;
  if (rows.ranked.length === 0) return;
  const { offsets, observed } = scaleRows(weights, rows.ranked, z);
  const { places, degrees, starts } = orderAreas(
    rows.ranked.map((_, a) => offsets[a + 1] - offsets[a]),
    observed,
  );
  const order = gather(rows.ranked, places);
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
async function sampleWeighed(ledger: Ledger, sampling: Sampling): Promise<void> {
  const { rows, options } = sampling;
  const first = Math.min(options.permutations, FIRST_DRAWS);
  await weigh(ledger, { ...sampling, areas: rows.weighed, from: 0, to: first, stopping: false });
  if (first === options.permutations) return;
  const rare = rows.weighed.filter((a) =>
    Math.min(ledger.counts.atLeast[a], ledger.counts.atMost[a]) < TAIL_HITS
  );
  await weigh(ledger, {
    ...sampling,
    areas: rare,
    from: first,
    to: options.permutations,
    stopping: true,
  });
}

type Weighing = Sampling & { areas: Uint32Array; from: number; to: number; stopping: boolean };

async function weigh(ledger: Ledger, weighing: Weighing): Promise<void> {
  const { z, weights, seed, areas, from, to, stopping, options } = weighing;
  if (areas.length === 0) return;
  const job: WeighedJob = {
    kind: "weighed",
    seed,
    from,
    to,
    stopping,
    z,
    areas,
    ...scaleRows(weights, areas, z),
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
