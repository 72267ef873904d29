/**
 * Which number is tested: a field as it stands, or a rate made of two.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import { type Transform, TRANSFORMS } from "../prepare/transform.ts";
import { oneOf } from "./one_of.ts";
import type { IndicatorOptions } from "./options.ts";

/** A field of the layer or of the joined table. */
export interface ValuePlan {
  readonly kind: "value";
  /** Prefix of the result fields: the field's name. */
  readonly name: string;
  readonly field: string;
  readonly transform: Transform;
}

/** Cases divided by population. */
export interface RatePlan {
  readonly kind: "rate";
  /** Prefix of the result fields: the name given, or the cases field with `_rate` behind it. */
  readonly name: string;
  readonly cases: string;
  readonly population: string;
  /** Rates are shown per so many of the population. */
  readonly per: number;
  /** Whether nobody counts twice. */
  readonly share: boolean;
  /** What is tested: standardized rates, or Freeman-Tukey values. */
  readonly transform: "standardized" | "freeman-tukey";
}

/** See {@link ValuePlan} and {@link RatePlan}. */
export type IndicatorPlan = ValuePlan | RatePlan;

/**
 * Decides what is tested.
 *
 * @throws {UsageError} unless exactly one of value and rate is given, for options that only fit the other, and for a rate that
 * is not written as two fields.
 */
export function planIndicator(options: IndicatorOptions): IndicatorPlan {
  const { value, rate } = options;
  if (value !== undefined && rate !== undefined) {
    throw new UsageError(`Cannot test both --value ${value} and --rate ${rate}; give one of them`);
  }
  if (value !== undefined) return planValue(value, options);
  if (rate !== undefined) return planRate(rate, options);
  throw new UsageError(
    "Cannot tell what to test; give --value FIELD, or --rate CASES/POPULATION",
  );
}

function planValue(field: string, { per, share, name, transform }: IndicatorOptions): ValuePlan {
  if (per !== undefined || share) {
    const option = share ? "--share" : "--per";
    throw new UsageError(`Cannot use ${option} without --rate CASES/POPULATION`);
  }
  if (name !== undefined) {
    throw new UsageError(
      `Cannot use --name ${name} with --value ${field}, as the result fields carry the field's name`,
    );
  }
  if (transform === "freeman-tukey") {
    throw new UsageError(
      "Cannot use --transform freeman-tukey with --value; it takes counts and populations: --rate CASES/POPULATION",
    );
  }
  return {
    kind: "value",
    name: field,
    field,
    transform: oneOf("--transform", transform ?? "none", TRANSFORMS),
  };
}

function planRate(text: string, options: IndicatorOptions): RatePlan {
  const { per = 1000, share = false, name, transform } = options;
  const { cases, population } = parseRate(text);
  if (!(per > 0 && Number.isFinite(per))) {
    throw new UsageError(`Cannot use --per ${per}; give a number above 0, such as 1000`);
  }
  if (name?.trim() === "") throw new UsageError("Cannot use an empty --name; give a word or two");
  if (transform !== undefined && transform !== "freeman-tukey") {
    throw new UsageError(
      `Cannot use --transform ${transform} with --rate, which tests standardized rates; leave it out or choose freeman-tukey`,
    );
  }
  return {
    kind: "rate",
    name: name ?? `${cases}_rate`,
    cases,
    population,
    per,
    share,
    transform: transform ?? "standardized",
  };
}

/** Two field names with a slash between them; a name that holds a slash stands in double quotes. */
function parseRate(text: string): { cases: string; population: string } {
  const side = String.raw`\s*(?:"((?:[^"]|"")+)"|([^/"]*[^/"\s]))\s*`;
  const found = new RegExp(`^${side}/${side}$`).exec(text);
  if (found === null) {
    throw new UsageError(
      `Cannot read --rate ${text}; write CASES/POPULATION, with a field name that holds a slash in double quotes`,
    );
  }
  const [, quoted, plain, quotedBelow, plainBelow] = found;
  const unquoted = (name: string | undefined) => name?.replaceAll('""', '"');
  return {
    cases: unquoted(quoted) ?? plain,
    population: unquoted(quotedBelow) ?? plainBelow,
  };
}
