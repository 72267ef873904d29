/**
 * Join counts: how often two classes meet across a link, and how often they would by chance.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { isLinked, type Topology } from "../neighbors/topology.ts";
import {
  freeMoments,
  type JoinMoments,
  type JoinStructure,
  nonfreeMoments,
} from "./join_moments.ts";

/** Classes that a map may have; beyond this a map of classes says little and the pairs are too many. */
export const MOST_CLASSES = 50;

/** Options of {@link joinCounts}. */
export interface JoinCountOptions {
  /**
   * Probability of each class, by name, for free sampling; every class of the map needs one above 0,
   * and together they are at most 1. @default each class's share of the areas
   */
  readonly probabilities?: Readonly<Record<string, number>>;
}

/** Joins between two classes, or within one. */
export interface JoinCount {
  /** Names of the two classes, the same one twice for joins within a class. */
  readonly classes: readonly [string, string];
  /** Pairs of linked areas with these classes. */
  readonly joins: number;
  /** Moments when the classes found are dealt to the areas in any order. */
  readonly nonfree: JoinMoments;
  /** Moments when each area draws its class with its probability, independently. */
  readonly free: JoinMoments;
}

/** All joins of a map of classes. */
export interface JoinCounts {
  /** The classes, sorted by name, with the number of areas that have them. */
  readonly classes: readonly { readonly name: string; readonly areas: number }[];
  /** Pairs of linked areas, each counted once. */
  readonly joins: number;
  /** One entry for each pair of classes, a class with itself included, in the order of `classes`. */
  readonly pairs: readonly JoinCount[];
}

/**
 * Join counts for every pair of classes (Cliff & Ord 1981, Spatial Processes, pp. 19-20; for two
 * classes Moran 1948, Journal of the Royal Statistical Society B 10:243-251). More joins within a class
 * than expected: that class is clustered; more joins between two classes: they seek each other's
 * company.
 *
 * A pair of areas is joined when either is the other's neighbor, and counts once, without any weight.
 * `classes` holds one name for each area; areas without a class are left out before. Each z is
 * (joins - expected) / sd. A class with one member has no joins within itself, by necessity: its count,
 * expectation and variance are 0 and its z is NaN; its joins with other classes are judged as any.
 * Cost: one pass over the links (a binary search for each link of one-way rules) and the square of the
 * number of classes.
 *
 * @throws UnfitDataError for fewer than 2 or more than 50 classes, and when no areas are linked.
 * @throws RangeError when lengths differ, or for probabilities that are none.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const chain = { offsets: Uint32Array.of(0, 1, 3, 5, 6), indices: Uint32Array.of(1, 0, 2, 1, 3, 2) };
 * const { pairs } = joinCounts(["rural", "rural", "urban", "urban"], chain);
 * assert.deepEqual(pairs.map(({ classes, joins }) => [...classes, joins]), [
 *   ["rural", "rural", 1],
 *   ["rural", "urban", 1],
 *   ["urban", "urban", 1],
 * ]);
 * // Two areas of the same class are next to each other in 3 of the 6 ways to deal them.
 * assert.ok(Math.abs(pairs[0].nonfree.expected - 1 / 2) < 1e-15);
 * ```
 */
export function joinCounts(
  classes: readonly string[],
  topology: Topology,
  options: JoinCountOptions = {},
): JoinCounts {
  const n = topology.offsets.length - 1;
  if (classes.length !== n) {
    throw new RangeError(`Cannot match ${classes.length} classes to links of ${n} areas`);
  }
  const names = classNames(classes);
  const place = new Map(names.map((name, at) => [name, at]));
  const codes = Uint8Array.from(classes, (name) => place.get(name)!);
  const { structure, counts } = countJoins(codes, names.length, topology);
  const areas = new Array<number>(names.length).fill(0);
  for (const code of codes) areas[code]++;
  const chances = probabilitiesOf(names, areas, n, options.probabilities);
  const pairs: JoinCount[] = [];
  for (let a = 0; a < names.length; a++) {
    for (let b = a; b < names.length; b++) {
      const joins = counts[a * names.length + b];
      pairs.push({
        classes: [names[a], names[b]],
        joins,
        nonfree: nonfreeMoments(joins, structure, areas[a], a === b ? null : areas[b]),
        free: freeMoments(joins, structure, chances[a], a === b ? null : chances[b]),
      });
    }
  }
  const listed = names.map((name, at) => ({ name, areas: areas[at] }));
  return { classes: listed, joins: structure.joins, pairs };
}

function classNames(classes: readonly string[]): string[] {
  const names = [...new Set(classes)].sort();
  if (names.length >= 2 && names.length <= MOST_CLASSES) return names;
  throw new UnfitDataError(
    names.length > MOST_CLASSES
      ? `Cannot count joins of ${names.length} classes as at most ${MOST_CLASSES} are allowed; merge rare classes`
      : `Cannot count joins of ${names.length} class as it takes at least 2; choose a field that varies`,
  );
}

/** The joined pairs by class (smaller code first), and what their moments depend on. */
function countJoins(
  codes: Uint8Array,
  classCount: number,
  topology: Topology,
): { structure: JoinStructure; counts: Float64Array } {
  const { offsets, indices } = topology;
  const n = codes.length;
  const counts = new Float64Array(classCount * classCount);
  const degrees = new Float64Array(n);
  let joins = 0;
  for (let i = 0; i < n; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      const j = indices[link];
      if (j < i && isLinked(topology, j, i)) continue; // counted from j
      const low = Math.min(codes[i], codes[j]), high = Math.max(codes[i], codes[j]);
      counts[low * classCount + high]++;
      degrees[i]++;
      degrees[j]++;
      joins++;
    }
  }
  if (joins === 0) {
    throw new UnfitDataError(
      "Cannot count joins as no area has a neighbor; choose a rule that links areas",
    );
  }
  const meetings = degrees.reduce((sum, degree) => sum + degree * (degree - 1), 0);
  return { structure: { areas: n, joins, meetings }, counts };
}

function probabilitiesOf(
  names: readonly string[],
  areas: readonly number[],
  n: number,
  given: Readonly<Record<string, number>> | undefined,
): number[] {
  if (!given) return areas.map((count) => count / n);
  const chances = names.map((name) => given[name]);
  const sum = chances.reduce((total, chance) => total + chance, 0);
  if (!chances.every((chance) => chance > 0) || sum > 1 + 1e-9) {
    throw new RangeError(
      `Cannot deal classes with the probabilities ${
        names.map((name, at) => `${name} ${chances[at]}`).join(", ")
      }; each has to be above 0 and all together at most 1`,
    );
  }
  return chances;
}
