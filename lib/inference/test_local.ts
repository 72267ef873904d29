/**
 * From local counts to a decision for each area.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import type { Weights } from "../weights/weights.ts";
import { type Adjustment, adjustP } from "./adjust.ts";
import { MOST_PERMUTATIONS } from "./options.ts";
import { floorOfP, twoSidedP } from "./p_value.ts";
import { stageOf } from "./pace.ts";
import {
  DEFAULT_LOCAL_PERMUTATIONS,
  type LocalReference,
  permuteLocalMoran,
  type PermuteLocalOptions,
} from "./permute_local.ts";
import { countsOf } from "./sum_counts.ts";

/** Options of {@link testLocalMoran}. */
export interface TestLocalOptions extends Omit<PermuteLocalOptions, "areas"> {
  /**
   * An area is significant where its adjusted p is at most this.
   * @default 0.05
   */
  readonly level?: number;
  /**
   * How p is adjusted for the number of areas tested.
   * @default "bh"
   */
  readonly adjust?: Adjustment;
  /**
   * Draw areas at a floor that decides again, with 9,999,999 permutations.
   * @default true
   */
  readonly redraw?: boolean;
  /**
   * Areas to test (1), one flag for each area; the others count as neighbors only and get no p.
   * @default all
   */
  readonly tested?: Uint8Array;
}

/** A decision for each area, and how fine the p-values were. */
export interface LocalTest {
  /** Two-sided permutation p of each area; NaN where it is alone. */
  readonly p: Float64Array;
  /** p adjusted for the number of areas tested; NaN where the area is alone. */
  readonly q: Float64Array;
  /** 1 where q is at most the level. */
  readonly sig: Uint8Array;
  /** Permutations asked for. */
  readonly permutations: number;
  /** Areas drawn again because they sat at the floor and the floor decided. */
  readonly redrawn: number;
  /** Smallest p that the draws of the areas now at the floor can give; what was asked for if there are none. */
  readonly floor: number;
  /** True where areas at the floor would change the decisions if they could go lower still. */
  readonly floorDecides: boolean;
  /** Areas that have a p. */
  readonly tested: number;
  /** Counts behind p, the second draw in place of the first where there was one. */
  readonly reference: LocalReference;
}

/**
 * Tests every area's local Moran's I by conditional permutation and adjusts for the number of areas.
 *
 * A sampled p cannot go below 2 / (m + 1). Where areas sit at that floor and a lower p of theirs would change
 * what is significant, exactly those areas are drawn again with 9,999,999 permutations, and
 * `floorDecides` says whether the question is still open after that. Cost: that of `permuteLocalMoran`,
 * once or twice.
 *
 * @throws UsageError for a level outside (0, 1) and whatever `permuteLocalMoran` throws.
 */
export async function testLocalMoran(
  values: Float64Array,
  weights: Weights,
  options: TestLocalOptions = {},
): Promise<LocalTest> {
  const { level = 0.05, adjust = "bh", redraw = true, tested } = options;
  const permutations = options.permutations ?? DEFAULT_LOCAL_PERMUTATIONS;
  if (!(level > 0 && level < 1)) {
    throw new UsageError(`Cannot test at a level of ${level}; give a number between 0 and 1`);
  }
  const mayRedraw = redraw && permutations < MOST_PERMUTATIONS;
  let reference: LocalReference = await permuteLocalMoran(values, weights, {
    ...stageOf(options, 0, mayRedraw ? 0.5 : 1),
    permutations,
  });
  const rules = { level, adjust, tested };
  let decisions = decide(reference, rules);
  let redrawn = 0;
  if (mayRedraw && decisions.floorDecides) {
    const areas = decisions.atFloor;
    const again = await permuteLocalMoran(values, weights, {
      ...stageOf(options, 0.5, 1),
      permutations: MOST_PERMUTATIONS,
      areas,
    });
    redrawn = areas.length;
    reference = replaced(reference, again, areas);
    decisions = decide(reference, rules);
  }
  const { p, q, sig, atFloor, floorDecides } = decisions;
  const finest = atFloor.reduce((most, area) => Math.max(most, reference.permutations[area]), 0);
  return {
    p,
    q,
    sig,
    permutations,
    redrawn,
    floor: floorOfP(finest || permutations),
    floorDecides,
    tested: p.reduce((count, value) => count + (Number.isNaN(value) ? 0 : 1), 0),
    reference,
  };
}

interface Rules {
  readonly level: number;
  readonly adjust: Adjustment;
  readonly tested: Uint8Array | undefined;
}

function decide(reference: LocalReference, { level, adjust, tested }: Rules) {
  const p = Float64Array.from(
    reference.permutations,
    (_, i) => tested?.[i] === 0 ? NaN : twoSidedP(countsOf(reference, i)),
  );
  const q = adjustP(p, adjust);
  const sig = Uint8Array.from(q, (value) => value <= level ? 1 : 0);
  const atFloor = Uint32Array.from(p.keys())
    .filter((i) => !Number.isNaN(p[i]) && isAtFloor(reference, i));
  const lower = p.slice();
  for (const area of atFloor) lower[area] = 0;
  const wouldBe = adjustP(lower, adjust);
  const floorDecides = atFloor.length > 0 && sig.some((found, i) => !found && wouldBe[i] <= level);
  return { p, q, sig, atFloor, floorDecides };
}

function isAtFloor(
  { atLeast, atMost, permutations, enumerated }: LocalReference,
  i: number,
): boolean {
  return permutations[i] > 0 && !enumerated[i] && Math.min(atLeast[i], atMost[i]) === 0;
}

function replaced(
  first: LocalReference,
  again: LocalReference,
  areas: Uint32Array,
): LocalReference {
  const redo = <A extends Uint32Array | Uint8Array>(old: A, fresh: A): A => {
    const copy = old.slice() as A;
    for (const area of areas) copy[area] = fresh[area];
    return copy;
  };
  return {
    atLeast: redo(first.atLeast, again.atLeast),
    atMost: redo(first.atMost, again.atMost),
    permutations: redo(first.permutations, again.permutations),
    enumerated: redo(first.enumerated, again.enumerated),
    stopped: redo(first.stopped, again.stopped),
  };
}
