/**
 * What a sweep found, as plain data without NaN: the `sweep` part of `results.json`.
 *
 * @module
 */
import type { Family } from "../neighbors/rule.ts";
import type { Direction } from "./joint.ts";

/** One definition of neighbor and what the global and local tests say under it. Null is "undefined". */
export interface DefinitionResult {
  readonly rule: string;
  readonly weights: string;
  readonly family: Family;
  readonly main: boolean;
  /** Definitions that gave the same weights and were merged into this one. */
  readonly sameAs: string[];
  readonly pairs: number;
  readonly islands: number;
  readonly components: number;
  readonly meanNeighbors: number | null;
  /** Moran's I. */
  readonly value: number | null;
  /** (I - mean) / sd over all shared permutations, the observed map included. */
  readonly z: number | null;
  /** Two-sided rank of z among the shared permutations. */
  readonly p: number | null;
  /** Step-down max |z| (Westfall & Young 1993). */
  readonly pAdjusted: number | null;
  readonly significantAreas: number;
  /** Jaccard overlap of its significant areas with the main definition's, 0 to 1. */
  readonly overlap: number | null;
}

/** All definitions together. */
export interface SweepResults {
  readonly permutations: number;
  readonly localPermutations: number;
  /** The main definition first, then in the order of the plan; merged ones once. */
  readonly definitions: DefinitionResult[];
  readonly joint: {
    readonly median: number | null;
    readonly p: number | null;
    readonly share: number | null;
    readonly shareP: number | null;
    readonly direction: Direction;
    /** Smallest and largest Moran's I over the definitions. */
    readonly smallest: number | null;
    readonly largest: number | null;
  };
  readonly stability: {
    readonly steady: number;
    readonly mostly: number;
    readonly fragile: number;
    readonly quiet: number;
    /** Areas flagged by the main definition that are steady. */
    readonly flaggedSteady: number;
    /** Rows significant in some definition but not in the main one. */
    readonly onlyElsewhere: number[];
    /** Rows whose surroundings are high in one definition and low in another. */
    readonly flips: number[];
  };
}

/** What the definitions of one family say, each counted as often as it stands for others. */
export interface FamilyFinding {
  readonly family: Family;
  readonly definitions: number;
  /** Definitions with p at most the level and I above its mean: neighbors more alike than by chance. */
  readonly positive: number;
  /** Definitions with p at most the level and I below its mean. */
  readonly negative: number;
}
