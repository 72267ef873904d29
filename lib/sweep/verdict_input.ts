/**
 * What a verdict is made from.
 *
 * @module
 */
import type { Steadiness } from "./stability.ts";
import type { FamilyFinding, SweepResults } from "./sweep_results.ts";

/** The numbers a verdict is made from; a run and a sweep of `results.json` fit as they are. */
export interface VerdictInput {
  /** The main definition's findings. */
  readonly run: {
    readonly indicator: string;
    readonly neighbors: { readonly rule: string; readonly islands: number };
    readonly weights: string;
    readonly global: {
      readonly moranI: {
        readonly value: number | null;
        readonly expected: number | null;
        readonly p: number | null;
        readonly permutations: number;
        readonly enumerated: boolean;
      };
    };
    readonly local: {
      readonly level: number;
      readonly adjust: string;
      readonly tested: number;
      readonly significant: number;
      /** Areas in each class, by the class's words. */
      readonly counts: Readonly<Record<string, number>>;
    };
    /** The checks of a rate against one risk for all. @default the indicator is no rate */
    readonly rate?: {
      readonly overdispersion: { readonly p: number | null };
      readonly constantRisk: { readonly p: number | null };
    } | null;
  };
  /** Null where no other definition was tried. */
  readonly sweep: SweepResults | null;
  /** What each family of definitions says, from the sweep. @default none is mentioned */
  readonly families?: readonly FamilyFinding[];
  /** Flagged areas by name, the most striking first. @default counted, not named */
  readonly flagged?: readonly FlaggedArea[];
}

/** An area that the main definition finds significant. */
export interface FlaggedArea {
  readonly name: string;
  /** Its class in words, such as `high among high`. */
  readonly class: string;
  readonly steady: Steadiness | null;
}

/** Whether the map is clustered, as far as the bounding test shows. */
export type Finding = "clustered" | "dispersed" | "not shown";

/** Definitions of a sweep, merged ones counted. */
export function definitionsTried({ definitions }: SweepResults): number {
  return definitions.reduce((count, { sameAs }) => count + 1 + sameAs.length, 0);
}
