/**
 * Jobs for the engine and its peers: the same numbers, in memory and in a file.
 *
 * @module
 */
import { writeFileSync } from "node:fs";
import { gather } from "../../lib/inference/gather.ts";
import { scaleRows } from "../../lib/inference/local_rows.ts";
import { orderAreas } from "../../lib/inference/order_areas.ts";
import { pairLinks } from "../../lib/inference/pair_links.ts";
import { drawsOf, type RankedJob, rankedSlice } from "../../lib/inference/ranked_job.ts";
import { seedFromText } from "../../lib/inference/seed.ts";
import { type ShuffleJob, shuffleJob } from "../../lib/inference/shuffle_job.ts";
import { drawsOfRows, type WeighedJob } from "../../lib/inference/weighed_job.ts";
import { standardize } from "../../lib/statistics/standardize.ts";
import { weightSums } from "../../lib/weights/sums.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { normalNumbers } from "../support/maps.ts";

const seed = seedFromText("bench");

/** Scores that have no pattern. */
export function benchScores(n: number): Float64Array {
  return standardize(normalNumbers(n, "bench")).z;
}

/** All areas of a map with equal weights in a row. */
export function rankedJob(weights: Weights, permutations: number): RankedJob {
  const z = benchScores(weights.offsets.length - 1);
  const { offsets, observed } = scaleRows(weights, Uint32Array.from(z.keys()), { z });
  return rankedJobOf(z, Uint32Array.from(z, (_, i) => offsets[i + 1] - offsets[i]), {
    observed,
    permutations,
  });
}

/** A distance band in which each even number of neighbors up to `largest` occurs, areas standing in a ring. */
export function bandJob(n: number, largest: number, permutations: number): RankedJob {
  const z = benchScores(n);
  const degrees = Uint32Array.from(z, (_, i) => 2 + 2 * (i % (largest / 2)));
  const before = new Float64Array(3 * n + 1);
  for (let i = 0; i < 3 * n; i++) before[i + 1] = before[i] + z[i % n];
  const observed = Float64Array.from(z, (own, i) => {
    const reach = degrees[i] / 2;
    return before[n + i + reach + 1] - before[n + i - reach] - own;
  });
  return rankedJobOf(z, degrees, { observed, permutations });
}

function rankedJobOf(
  z: Float64Array,
  neighbors: Uint32Array,
  { observed, permutations }: { observed: Float64Array; permutations: number },
): RankedJob {
  const { places, degrees, starts } = orderAreas(neighbors, observed);
  return {
    kind: "ranked",
    seed,
    permutations,
    z: gather(z, places),
    observed: gather(observed, places),
    degrees,
    starts,
  };
}

/** All areas of a map with unequal weights in a row, no stopping. */
export function weighedJob(weights: Weights, permutations: number): WeighedJob {
  const z = benchScores(weights.offsets.length - 1);
  const areas = Uint32Array.from(z.keys());
  const none = new Uint32Array(z.length);
  return {
    kind: "weighed",
    seed,
    from: 0,
    to: permutations,
    stopping: false,
    z,
    term: "score",
    areas,
    ...scaleRows(weights, areas, { z }),
    atLeast: none,
    atMost: none,
  };
}

/** Moran's I under one definition. */
export function globalJob(weights: Weights, permutations: number): ShuffleJob {
  return shuffleJob({
    z: benchScores(weights.offsets.length - 1),
    seed,
    permutations,
    definitions: [pairLinks(weights)],
    totals: [weightSums(weights).s0],
  });
}

/** Writes a job in the form that the native peers read: a head of integers, then the arrays. */
export function writeJob(path: string, job: RankedJob | WeighedJob | ShuffleJob): void {
  const arrays = jobArrays(job);
  const bytes = new Uint8Array(arrays.reduce((sum, array) => sum + array.byteLength, 0));
  let at = 0;
  for (const array of arrays) {
    bytes.set(new Uint8Array(array.buffer, array.byteOffset, array.byteLength), at);
    at += array.byteLength;
  }
  writeFileSync(path, bytes);
}

function jobArrays(
  job: RankedJob | WeighedJob | ShuffleJob,
): (Uint32Array | Float64Array | Float32Array)[] {
  const n = job.z.length, { low, high } = job.seed;
  switch (job.kind) {
    case "ranked": {
      const { observed, degrees, starts, permutations } = job;
      const slice = Math.min(rankedSlice(job), permutations);
      const head = [
        n,
        observed.length,
        degrees.length,
        drawsOf(job),
        slice,
        low,
        high,
        permutations,
      ];
      return [Uint32Array.from(head), job.z, observed, degrees, starts];
    }
    case "weighed": {
      const { areas, observed, weights, offsets, to } = job;
      const head = [n, areas.length, drawsOfRows(job), low, high, to, weights.length];
      return [Uint32Array.from(head), job.z, observed, weights, offsets];
    }
    case "shuffle": {
      const [{ offsets, indices, values }] = job.definitions;
      const head = [n, indices.length, low, high, job.permutations];
      return [
        Uint32Array.from(head),
        Float32Array.from(job.z),
        offsets,
        indices,
        Float32Array.from(values),
      ];
    }
  }
}
