/**
 * The definitions that are tried when nobody says which: a spread of what analysts use.
 *
 * @module
 */
import type { PointSpace } from "../neighbors/point_space.ts";
import { parseRule, type Rule } from "../neighbors/rule.ts";
import { lengthAtLeast } from "../project/length.ts";

/** One way to say who is a neighbor and how much each counts. */
export interface Definition {
  readonly rule: Rule;
  /** How much each neighbor counts, as text: `equal`, `inverse:1`, … */
  readonly weights: string;
}

/** What the standard sweep depends on. */
export interface StandardOptions {
  readonly shape: "polygon" | "point";
  /** Distance between the usable areas; null where it cannot be measured. */
  readonly space: PointSpace | null;
  /** Usable areas. */
  readonly count: number;
}

/** The definitions, and why others of the standard are missing. */
export interface StandardSweep {
  readonly definitions: readonly Definition[];
  /** One sentence for each kind of definition that this layer does not allow. */
  readonly notes: readonly string[];
}

const CONTIGUITIES = ["touching", "edge", "touching upto=2"];
const NEAREST = [4, 5, 6, 8, 10, 12];
/** Bands reach as far as the median distance to these nearest areas. */
const BANDS = [4, 6, 8, 12, 16];
const GRAPHS = ["triangulated", "gabriel"];
/** Digits of their lengths: what the report prints is what was computed, and a rerun reads it back. */
const BAND_DIGITS = 6;
/** Graphs that stand in for the contiguities where areas are points. */
const POINT_GRAPHS = [...GRAPHS, "relative", "sphere"];
/** Fewer points than this make no graph worth the name. */
const FEWEST_IN_GRAPH = 3;
/** Weighted definitions look at this many nearest areas, and fall off over the distance to the other. */
const WEIGHTED = 12, FALLING_OVER = 6;

/**
 * The standard sweep: contiguities (polygons only), nearest areas, distance bands at the median distance to
 * the 4th, 6th, 8th, 12th and 16th nearest area, graphs on the points, and two that weigh by distance.
 * Definitions that cannot exist here (a 12th nearest of 9 areas, a band of length 0) are left out and named
 * in the notes. Cost: one search for the 16 nearest of each area.
 */
export function standardDefinitions({ shape, space, count }: StandardOptions): StandardSweep {
  const contiguities = shape === "polygon" ? CONTIGUITIES.map(equal) : [];
  if (space === null) {
    return {
      definitions: contiguities,
      notes: ["Without a CRS or a planar metric no definition by distance could be tried"],
    };
  }
  const spacing = spacingOf(space);
  const { lengths, located } = spacing;
  const graphs = shape === "polygon" ? GRAPHS : POINT_GRAPHS;
  return {
    definitions: [
      ...contiguities,
      ...NEAREST.filter((k) => k < located).map((k) => equal(`nearest:${k}`)),
      ...BANDS.filter((k) => lengths.has(k)).map((k) => equal(`within:${lengths.get(k)}`)),
      ...(located < FEWEST_IN_GRAPH || !space.planar ? [] : graphs.map(equal)),
      ...weightedDefinitions(spacing),
    ],
    notes: [...notesOf(spacing, count), ...(space.planar ? [] : [NO_GRAPHS])],
  };
}

const NO_GRAPHS =
  "Graphs on the points are defined in a plane, so none could be tried on the ellipsoid";

function equal(rule: string): Definition {
  return { rule: parseRule(rule), weights: "equal" };
}

/** What is known about distances between nearest areas. */
interface Spacing {
  /** Areas that have a point. */
  readonly located: number;
  /** Median distance to the k-th nearest as the text of a length; only those that exist and exceed 0. */
  readonly lengths: ReadonlyMap<number, string>;
  /** Whether two areas share one point. */
  readonly coincident: boolean;
}

function spacingOf({ located, toNearest }: PointSpace): Spacing {
  const distancesTo = (k: number) => toNearest(k).filter((distance) => !Number.isNaN(distance));
  const lengths = new Map<number, string>();
  // The farthest first: the search for it serves all others.
  for (const k of BANDS.filter((k) => k < located).reverse()) {
    const length = median(distancesTo(k));
    if (length > 0) lengths.set(k, lengthAtLeast(length, BAND_DIGITS));
  }
  return { located, lengths, coincident: located > 1 && distancesTo(1).includes(0) };
}

function median(values: Float64Array): number {
  const sorted = values.toSorted();
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}

function weightedDefinitions({ located, lengths, coincident }: Spacing): Definition[] {
  const definitions: Definition[] = [];
  if (located > WEIGHTED && !coincident) {
    definitions.push({ rule: parseRule(`nearest:${WEIGHTED}`), weights: "inverse:1" });
  }
  const reach = lengths.get(WEIGHTED), pace = lengths.get(FALLING_OVER);
  if (reach && pace) {
    definitions.push({ rule: parseRule(`within:${reach}`), weights: `gaussian:${pace}` });
  }
  return definitions;
}

function notesOf({ located, lengths, coincident }: Spacing, count: number): string[] {
  const notes: string[] = [];
  if (located < count) {
    notes.push(`${count - located} of ${count} areas have no place and no neighbor by distance`);
  }
  const tooFar = Math.min(...[...NEAREST, ...BANDS].filter((k) => k >= located));
  if (tooFar < Infinity) {
    notes.push(
      `With ${located} areas no definition by the ${tooFar}th nearest area or beyond could be tried`,
    );
  }
  const lengthless = Math.max(...BANDS.filter((k) => k < located && !lengths.has(k)));
  if (lengthless > 0) {
    const crowd = `Half of the areas have ${lengthless} or more others at the same point`;
    notes.push(`${crowd}, so no band of that median distance could be tried`);
  }
  if (coincident) {
    notes.push("Areas at the same point have no inverse distance, so inverse:1 could not be tried");
  }
  return notes;
}
