/**
 * The number of every row as it stands in the file, or the rate of two numbers.
 *
 * @module
 */
import { readColumn } from "../layer/column.ts";
import type { Layer } from "../layer/layer.ts";
import { type ColumnNumbers, type MissingCount, numbersOf } from "../prepare/numbers.ts";
import { checkCounts } from "../prepare/rate_counts.ts";
import { type RateCounts, rawRates } from "../prepare/rate_moments.ts";
import type { JoinReport } from "../read/join.ts";
import type { AssessPlan } from "./plan.ts";
import type { RatePlan } from "./plan_indicator.ts";

/** What was read for an indicator; arrays have one entry for each row of the layer. */
export interface ReadIndicator {
  /** The value as read, or the raw rate per `per`; NaN where there is none. */
  readonly shown: Float64Array;
  /** Cases and population of a rate; null for a value. */
  readonly rateCounts: RateCounts | null;
  /** Null where there is a value, else why not. */
  readonly reasons: readonly (string | null)[];
  readonly missing: readonly MissingCount[];
  readonly notes: readonly string[];
}

/** How a field is read. */
type FieldReader = (name: string) => ColumnNumbers;

/**
 * Reads the field or fields of an indicator.
 *
 * @param where Rows to look at. @default all
 * @throws {UsageError} for fields that do not exist, {UnfitDataError} for texts that are no numbers, and for counts and
 * populations that cannot be.
 */
export function readIndicator(
  layer: Layer,
  { plan, join, where }: {
    readonly plan: AssessPlan;
    readonly join: JoinReport | null;
    readonly where?: (row: number) => boolean;
  },
): ReadIndicator {
  const read: FieldReader = (name) => {
    const column = readColumn(layer, name);
    return numbersOf(column, {
      missing: plan.missingValues,
      decimal: plan.decimal ?? "auto",
      thousands: plan.thousands ?? "auto",
      source: join?.table ?? layer.source,
      nullKind: layer.added.includes(column) && join ? `no row in ${join.table}` : undefined,
      where,
    });
  };
  if (plan.indicator.kind === "rate") return readRate(plan.indicator, read);
  const { values, ...rest } = read(plan.indicator.field);
  return { shown: values, rateCounts: null, ...rest };
}

function readRate({ cases, population, per, share }: RatePlan, read: FieldReader): ReadIndicator {
  const above = { name: cases, numbers: read(cases) };
  const below = { name: population, numbers: read(population) };
  const { reasons, notes } = checkCounts(above, below, { share });
  const counts = { cases: above.numbers.values, population: below.numbers.values, share };
  const fields = [above, below];
  return {
    shown: rawRates(counts).map((rate, row) => reasons[row] === null ? per * rate : NaN),
    rateCounts: counts,
    reasons,
    missing: fields.flatMap(({ name, numbers }) =>
      numbers.missing.map(({ kind, count }) => ({ kind: `${name}: ${kind}`, count }))
    ),
    notes: [...fields.flatMap(({ numbers }) => numbers.notes), ...notes],
  };
}
