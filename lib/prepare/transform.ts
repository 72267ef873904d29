/**
 * Transforms of single values before they are tested.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { normalScores } from "./normal_scores.ts";
import { ranks } from "./ranks.ts";
import { roundDigits } from "./round_digits.ts";

/** Transforms of a value field. */
export const TRANSFORMS = ["none", "log", "log1p", "sqrt", "rank", "normal-scores"] as const;
/** See {@link TRANSFORMS}. */
export type Transform = typeof TRANSFORMS[number];

/** What {@link transformValues} needs besides. */
export interface TransformOptions {
  /** What to call the value at a position in a message. */
  readonly nameOf: (at: number) => string;
}

/** Functions of one value, with the values they are defined for. */
const SINGLE = {
  log: { of: Math.log, defined: (x: number) => x > 0, takes: "only values above 0" },
  log1p: { of: Math.log1p, defined: (x: number) => x > -1, takes: "only values above -1" },
  sqrt: { of: Math.sqrt, defined: (x: number) => x >= 0, takes: "no values below 0" },
} as const;

/**
 * Values on another scale: natural logarithm (`log`), log(1 + x) (`log1p`), square root, rank (see
 * {@link ranks}) or normal scores (see {@link normalScores}). All but ranks are rounded to 13 significant digits, so
 * that every engine tests the same numbers.
 *
 * @param values Finite values of the areas that are used.
 * @throws {UnfitDataError} where a value has no logarithm or root.
 */
export function transformValues(
  values: Float64Array,
  transform: Transform,
  { nameOf }: TransformOptions,
): Float64Array {
  if (transform === "none") return values;
  if (transform === "rank") return ranks(values);
  if (transform === "normal-scores") return roundDigits(normalScores(values));
  const { of, defined, takes } = SINGLE[transform];
  const bad = values.findIndex((value) => !defined(value));
  if (bad >= 0) {
    throw new UnfitDataError(
      `Cannot use --transform ${transform}, which takes ${takes}, as ${nameOf(bad)} holds ${
        values[bad]
      }; choose another transform or leave such areas out with --where`,
    );
  }
  return roundDigits(values.map(of));
}
