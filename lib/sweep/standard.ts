/**
 * The definitions that are tried when nobody says which: a spread of what analysts use.
 *
 * @module
 */
import { distance } from "../neighbors/gabriel.ts";
import { nearestTable } from "../neighbors/nearest_table.ts";
import { indexPoints } from "../neighbors/point_index.ts";
import { roundPoints } from "../neighbors/rounded_points.ts";
import { parseRule, type Rule } from "../neighbors/rule.ts";
import { parseLength } from "../project/length.ts";

/** One way to say who is a neighbor and how much each counts. */
export interface Definition {
  readonly rule: Rule;
  /** How much each neighbor counts, as text: `equal`, `inverse:1`, … */
  readonly weights: string;
}

/** What the standard sweep depends on. */
export interface StandardOptions {
  readonly shape: "polygon" | "point";
  /**
   * Representative points of the usable areas, x0, y0, x1, y1, … in meters, NaN for an area without a
   * place; null where distance cannot be measured.
   */
  readonly points: Float64Array | null;
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
export function standardDefinitions({ shape, points, count }: StandardOptions): StandardSweep {
  const contiguities = shape === "polygon" ? CONTIGUITIES.map(equal) : [];
  if (points === null) {
    return {
      definitions: contiguities,
      notes: ["Without a CRS or a planar metric no definition by distance could be tried"],
    };
  }
  const spacing = spacingOf(points);
  const { lengths, located } = spacing;
  const graphs = shape === "polygon" ? GRAPHS : POINT_GRAPHS;
  return {
    definitions: [
      ...contiguities,
      ...NEAREST.filter((k) => k < located).map((k) => equal(`nearest:${k}`)),
      ...BANDS.filter((k) => lengths.has(k)).map((k) => equal(`within:${lengths.get(k)}`)),
      ...(located < FEWEST_IN_GRAPH ? [] : graphs.map(equal)),
      ...weightedDefinitions(spacing),
    ],
    notes: notesOf(spacing, count),
  };
}

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

function spacingOf(points: Float64Array): Spacing {
  const index = indexPoints(roundPoints(points));
  const located = index.count;
  const width = Math.max(0, Math.min(Math.max(...BANDS), located - 1));
  const { near } = nearestTable(index, width);
  const toNearest = (k: number) =>
    Float64Array.from(
      { length: located },
      (_, at) => distance(index.xy, at, near[at * width + k - 1]),
    );
  const lengths = new Map<number, string>();
  for (const k of BANDS.filter((k) => k <= width)) {
    const length = median(toNearest(k));
    if (length > 0) lengths.set(k, lengthText(length));
  }
  return { located, lengths, coincident: width > 0 && toNearest(1).includes(0) };
}

function median(values: Float64Array): number {
  const sorted = values.toSorted();
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}

/**
 * A length in at most six significant digits, rounded up so that the pair it was measured on stays
 * within it. What the report prints is what was computed, and a rerun reads it back.
 */
function lengthText(meters: number): string {
  const inKilometers = meters >= 1000;
  const amount = inKilometers ? meters / 1000 : meters;
  const step = 10 ** (Math.floor(Math.log10(amount)) - 5);
  const rounded = Number(amount.toPrecision(6));
  const textOf = (value: number) => `${Number(value.toPrecision(6))}${inKilometers ? "km" : "m"}`;
  const text = textOf(rounded);
  return parseLength(text).meters < meters ? textOf(rounded + step) : text;
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
