/**
 * How each area's neighbors' sum will be judged, before anything is drawn.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";
import { arrangementsOf } from "./arrangement_counts.ts";
import { subsetsOf } from "./subset_counts.ts";

/** Areas by the way they are counted, each list ascending. Areas that are alone are in none. */
export interface LocalRows {
  /** Equal weights and few enough subsets: all are counted. */
  readonly subsets: Uint32Array;
  /** Unequal weights and few enough arrangements: all are counted. */
  readonly arrangements: Uint32Array;
  /** Equal weights: sampled and ranked. */
  readonly ranked: Uint32Array;
  /** Unequal weights: sampled and weighed. */
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
  { permutations, areas }: { permutations: number; areas?: Uint32Array },
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
    if (neighbors === 0) ways[a] = ALONE;
    else if (isEqualRow(weights, asked[a])) ways[a] = fewSubsets(neighbors) ? SUBSETS : RANKED;
    else ways[a] = fewArrangements(neighbors) ? ARRANGEMENTS : WEIGHED;
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

function isEqualRow({ offsets, values }: Weights, area: number): boolean {
  const first = values[offsets[area]];
  if (!(first > 0)) return false;
  for (let e = offsets[area] + 1; e < offsets[area + 1]; e++) if (values[e] !== first) return false;
  return true;
}

/** Weights of some areas' rows, one after the other, each scaled so that its largest in size is 1. */
export interface ScaledRows {
  /** Where each row begins in `weights`; one more than rows. */
  readonly offsets: Uint32Array;
  readonly weights: Float64Array;
  /** Sum of the neighbors' scores under the scaled weights, for each row; on this scale ties are judged. */
  readonly observed: Float64Array;
}

/** Scales the rows of `areas`; `z` are the standard scores. Cost: two passes over their links. */
export function scaleRows(weights: Weights, areas: Uint32Array, z: Float64Array): ScaledRows {
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
      sum += scaled[at] * z[weights.indices[e]];
    }
    observed[a] = sum;
  }
  return { offsets, weights: scaled, observed };
}
