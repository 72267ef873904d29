/**
 * The counts of every area, as they come in.
 *
 * @module
 */
import type { TailCounts } from "./p_value.ts";

/** Counts of each area, length n; `permutations` is 0 where the area is alone or was not asked for. */
export interface SumCounts {
  /** Permutations whose neighbors' sum is at least the observed one, ties included. */
  readonly atLeast: Uint32Array;
  /** Permutations whose neighbors' sum is at most the observed one, ties included. */
  readonly atMost: Uint32Array;
  /** Permutations drawn, or cases enumerated. */
  readonly permutations: Uint32Array;
  /** 1 where every case was counted. */
  readonly enumerated: Uint8Array;
  /** 1 where drawing stopped early, at the draw that gave the rarer tail enough. */
  readonly stopped: Uint8Array;
}

/** Counts of one area, as the functions of p take them. */
export function countsOf(counts: SumCounts, area: number): TailCounts {
  return {
    atLeast: counts.atLeast[area],
    atMost: counts.atMost[area],
    permutations: counts.permutations[area],
    enumerated: counts.enumerated[area] === 1,
    stopped: counts.stopped[area] === 1,
  };
}

/** Counts that are entered area by area; what is entered again replaces what was there. */
export interface Ledger {
  readonly counts: SumCounts;
  enter(area: number, counts: TailCounts): void;
}

/** A ledger of `n` areas without any counts. */
export function openLedger(n: number): Ledger {
  const counts: SumCounts = {
    atLeast: new Uint32Array(n),
    atMost: new Uint32Array(n),
    permutations: new Uint32Array(n),
    enumerated: new Uint8Array(n),
    stopped: new Uint8Array(n),
  };
  return {
    counts,
    enter(area, found) {
      counts.atLeast[area] = found.atLeast;
      counts.atMost[area] = found.atMost;
      counts.permutations[area] = found.permutations;
      counts.enumerated[area] = found.enumerated ? 1 : 0;
      counts.stopped[area] = found.stopped ? 1 : 0;
    },
  };
}
