/**
 * Global statistics of shuffled maps: one shuffle serves every definition of a sweep.
 *
 * @module
 */
import { TIE } from "../statistics/standardize.ts";
import type { Counter, Workload } from "./job.ts";
import { type PairLinks, quadraticForm } from "./pair_links.ts";
import type { Seed } from "./seed.ts";
import { shuffleInto } from "./shuffle.ts";
import { openStream } from "./stream.ts";

/** What the shuffles need to know; plain data that can be posted to a worker. */
export interface ShuffleJob {
  readonly kind: "shuffle";
  readonly seed: Seed;
  readonly permutations: number;
  /** Standard scores, length n. */
  readonly z: Float64Array;
  readonly definitions: readonly PairLinks[];
  /** Σ w_ij z_i z_j on the observed map, for each definition. */
  readonly observed: Float64Array;
  /** How close a sum in single precision may come to the observed one before it is computed again. */
  readonly doubt: Float64Array;
}

/** Sums of some units: `sums[d]` holds Σ w_ij z_i z_j of definition d for each permutation of the unit. */
export type ShufflePart = readonly {
  readonly unit: number;
  readonly sums: readonly Float64Array[];
}[];

/** Permutations in a unit: four batches of the kernel's eight. */
export const SHUFFLES_PER_UNIT = 32;

/** From this many areas on, sums are made in single precision, eight permutations abreast. */
export const SINGLES_FROM = 4096;

/** Rows of pairs that are summed in single precision before they are added up in double precision. */
export const ROWS_PER_BLOCK = 32;

/** Puts together the job for some definitions with the given sums of weights. */
export function shuffleJob(
  { z, seed, permutations, definitions, totals }: {
    z: Float64Array;
    seed: Seed;
    permutations: number;
    definitions: readonly PairLinks[];
    totals: readonly number[];
  },
): ShuffleJob {
  return {
    kind: "shuffle",
    seed,
    permutations,
    z,
    definitions,
    observed: Float64Array.from(definitions, (pairs) => quadraticForm(pairs, z)),
    doubt: Float64Array.from(definitions, (pairs, d) => singleError(pairs) + TIE * totals[d]),
  };
}

/**
 * Bound on the error of the quadratic form of standard scores in single precision: each of its n/32 partial
 * sums and rows errs by at most a part in 2^24 of all it has added for each addition, and all terms together are
 * at most n/2 times the largest sum of weights at one area, as |z_i z_j| <= (z_i² + z_j²) / 2.
 */
function singleError({ offsets, indices, values }: PairLinks): number {
  const n = offsets.length - 1;
  const atArea = new Float64Array(n);
  let longest = 0;
  for (let i = 0; i < n; i++) {
    longest = Math.max(longest, offsets[i + 1] - offsets[i]);
    for (let e = offsets[i]; e < offsets[i + 1]; e++) {
      atArea[i] += Math.abs(values[e]);
      atArea[indices[e]] += Math.abs(values[e]);
    }
  }
  let heaviest = 0;
  for (let i = 0; i < n; i++) heaviest = Math.max(heaviest, atArea[i]);
  return (ROWS_PER_BLOCK + longest + 8) * 2 ** -24 * heaviest * n / 2;
}

/** See {@link Workload}; the rates were measured on one core of 2026. */
export function shuffleWorkload({ permutations, z, definitions }: ShuffleJob): Workload {
  const pairs = definitions.reduce((sum, { indices }) => sum + indices.length, 0);
  return {
    units: Math.ceil(permutations / SHUFFLES_PER_UNIT),
    milliseconds: permutations * (z.length * 2e-6 + pairs * 3e-7),
  };
}

/** First and one past the last permutation of a unit. */
export function shufflesOf(job: ShuffleJob, unit: number): [from: number, to: number] {
  const from = unit * SHUFFLES_PER_UNIT;
  return [from, Math.min(job.permutations, from + SHUFFLES_PER_UNIT)];
}

/** Counts a {@link ShuffleJob} in plain TypeScript with 64-bit numbers, for maps below {@link SINGLES_FROM}. */
export function openShuffleCounter(job: ShuffleJob): Counter<ShufflePart> {
  const shuffled = new Float64Array(job.z.length);
  const part: ShufflePart[number][] = [];
  return {
    *run(unit) {
      const [from, to] = shufflesOf(job, unit);
      const sums = job.definitions.map(() => new Float64Array(to - from));
      for (let p = from; p < to; p++) {
        shuffleInto(shuffled, job.z, openStream(job.seed, "permutation", p));
        job.definitions.forEach((pairs, d) => sums[d][p - from] = quadraticForm(pairs, shuffled));
        yield;
      }
      part.push({ unit, sums });
    },
    finish: () => part,
  };
}

/**
 * The sums of a unit with those in doubt, made in single precision too close to the observed ones, computed
 * again in double precision; so counts are exact whatever the precision was.
 */
export function* settleDoubts(
  job: ShuffleJob,
  unit: number,
  sums: readonly Float64Array[],
): Generator<void, readonly Float64Array[]> {
  const [from, to] = shufflesOf(job, unit);
  const settled = sums.map((each) => each.slice());
  const shuffled = new Float64Array(job.z.length);
  for (let p = from; p < to; p++) {
    const inDoubt = [...job.definitions.keys()].filter(
      (d) => Math.abs(sums[d][p - from] - job.observed[d]) <= job.doubt[d],
    );
    if (inDoubt.length === 0) continue;
    shuffleInto(shuffled, job.z, openStream(job.seed, "permutation", p));
    for (const d of inDoubt) settled[d][p - from] = quadraticForm(job.definitions[d], shuffled);
    yield;
  }
  return settled;
}
