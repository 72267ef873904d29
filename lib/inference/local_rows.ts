/**
 * How each area's neighbors' sum will be judged, before anything is drawn.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { arrangementsOf } from "./arrangement_counts.ts";
import { type PairTerm, pairTerm } from "./pair_term.ts";
import { subsetsOf } from "./subset_counts.ts";

/** Areas by the way they are counted, each list ascending. Areas that are alone are in none. */
export interface LocalRows {
  /** Scores under equal weights and few enough subsets: all are counted. */
  readonly subsets: Uint32Array;
  /** All others with few enough arrangements: all are counted. */
  readonly arrangements: Uint32Array;
  /** Scores under equal weights: sampled and ranked. */
  readonly ranked: Uint32Array;
  /** The rest: sampled and weighed. */
  readonly weighed: Uint32Array;
}

/** Arrangements up to which an area of unequal weights is enumerated. */
const MOST_ARRANGEMENTS = 20_000;

/**
 * Sorts the given areas (all by default) by the way they are counted: exactly where that takes fewer cases
 * than `permutations`, else by sampling. Cost: one pass over the links.
 */
export function sortRows(
  weights: Weights,
  { permutations, areas, term = "score" }: {
    readonly permutations: number;
    readonly areas?: Uint32Array;
    readonly term?: PairTerm;
  },
): LocalRows {
  const others = weights.offsets.length - 2;
  const asked = areas ?? Uint32Array.from({ length: others + 1 }, (_, i) => i);
  const fewSubsets = remember((k) => subsetsOf(others, k) < permutations);
  const fewArrangements = remember((k) =>
    arrangementsOf(others, k) <= Math.min(permutations - 1, MOST_ARRANGEMENTS)
  );
  const ways = new Uint8Array(asked.length);
  for (let a = 0; a < asked.length; a++) {
    const neighbors = weights.offsets[asked[a] + 1] - weights.offsets[asked[a]];
    if (hasNoWeight(weights, asked[a])) ways[a] = ALONE;
    else if (term === "score" && isEqualRow(weights, asked[a])) {
      ways[a] = fewSubsets(neighbors) ? SUBSETS : RANKED;
    } else ways[a] = fewArrangements(neighbors) ? ARRANGEMENTS : WEIGHED;
  }
  const withWay = (way: number) => asked.filter((_, a) => ways[a] === way);
  return {
    subsets: withWay(SUBSETS),
    arrangements: withWay(ARRANGEMENTS),
    ranked: withWay(RANKED),
    weighed: withWay(WEIGHED),
  };
}

const ALONE = 0, SUBSETS = 1, ARRANGEMENTS = 2, RANKED = 3, WEIGHED = 4;

/** A question about a number of neighbors that is worked out once for each. */
function remember(ask: (k: number) => boolean): (k: number) => boolean {
  const answers = new Map<number, boolean>();
  return (k) => {
    const known = answers.get(k) ?? ask(k);
    answers.set(k, known);
    return known;
  };
}

/** True also where there are neighbors, but all with a weight of 0. */
function hasNoWeight({ offsets, values }: Weights, area: number): boolean {
  for (let e = offsets[area]; e < offsets[area + 1]; e++) if (values[e] !== 0) return false;
  return true;
}

function isEqualRow({ offsets, values }: Weights, area: number): boolean {
  const first = values[offsets[area]];
  if (!(first > 0)) return false;
  for (let e = offsets[area] + 1; e < offsets[area + 1]; e++) if (values[e] !== first) return false;
  return true;
}

/**
 * Makes sure that every row can be drawn: finite weights, and no more neighbors than there are other areas.
 *
 * @throws RangeError otherwise; this is a fault of the caller, not of the data.
 */
export function checkRows({ offsets, values }: Weights): void {
  const others = offsets.length - 2;
  for (let area = 0; area <= others; area++) {
    const neighbors = offsets[area + 1] - offsets[area];
    if (neighbors > others) {
      throw new RangeError(
        `Cannot draw ${neighbors} different neighbors for area ${area} as there are only ${others} other areas`,
      );
    }
  }
  const faulty = values.findIndex((weight) => !Number.isFinite(weight));
  if (faulty >= 0) {
    throw new RangeError(
      `Cannot draw neighbors as weight ${faulty} is ${values[faulty]}; weights are finite`,
    );
  }
}

/** Weights of some areas' rows, one after the other, each scaled so that its largest in size is 1. */
export interface ScaledRows {
  /** Where each row begins in `weights`; one more than rows. */
  readonly offsets: Uint32Array;
  readonly weights: Float64Array;
  /** Sum of the neighbors' terms under the scaled weights, for each row; on this scale ties are judged. */
  readonly observed: Float64Array;
}

/** Scales the rows of `areas`; `z` are the standard scores. Cost: two passes over their links. */
export function scaleRows(
  weights: Weights,
  areas: Uint32Array,
  { z, term = "score" }: { readonly z: Float64Array; readonly term?: PairTerm },
): ScaledRows {
  const offsets = new Uint32Array(areas.length + 1);
  for (let a = 0; a < areas.length; a++) {
    offsets[a + 1] = offsets[a] + weights.offsets[areas[a] + 1] - weights.offsets[areas[a]];
  }
  const scaled = new Float64Array(offsets[areas.length]), observed = new Float64Array(areas.length);
  for (let a = 0; a < areas.length; a++) {
    const first = weights.offsets[areas[a]], end = weights.offsets[areas[a] + 1];
    let largest = 0, sum = 0;
    for (let e = first; e < end; e++) largest = Math.max(largest, Math.abs(weights.values[e]));
    for (let e = first, at = offsets[a]; e < end; e++, at++) {
      scaled[at] = weights.values[e] / largest;
      sum += scaled[at] * pairTerm(term, z[areas[a]], z[weights.indices[e]]);
    }
    observed[a] = sum;
  }
  return { offsets, weights: scaled, observed };
}
