/**
 * The number to test: which areas have it, which are tested, and why the others are not.
 *
 * @module
 */
import { readColumn, readColumns } from "../layer/column.ts";
import { UnfitDataError } from "../layer/errors.ts";
import type { Layer } from "../layer/layer.ts";
import { compileFilter } from "../prepare/filter.ts";
import { filterFields } from "../prepare/filter_syntax.ts";
import { type MissingCount, numbersOf } from "../prepare/numbers.ts";
import { type UsableAreas, usableAreas } from "../prepare/usable.ts";
import type { JoinReport } from "../read/join.ts";
import type { AssessPlan } from "./plan.ts";

/** Fewest areas with a value that can be tested at all. */
const FEWEST_AREAS = 3;

/** An indicator ready to be tested. */
export interface Indicator extends UsableAreas {
  readonly name: string;
  /** Value of every row of the layer, NaN where missing. */
  readonly all: Float64Array;
  /** Rows that have a value and may be linked, ascending. */
  readonly used: Uint32Array;
  /** Values of the used rows. */
  readonly values: Float64Array;
  /** Mask over the used rows: 1 where the area is tested itself. */
  readonly usedTested: Uint8Array;
  readonly missing: readonly MissingCount[];
  readonly notes: readonly string[];
}

/**
 * Reads the value field of a plan and sorts the areas.
 *
 * @throws {UnfitDataError} when fewer than 3 areas have a value, or all values are equal.
 */
export function prepareIndicator(
  layer: Layer,
  plan: AssessPlan,
  join: JoinReport | null,
): Indicator {
  const column = readColumn(layer, plan.value);
  const where = filterOf(plan.where, layer);
  const numbers = numbersOf(column, {
    missing: plan.missingValues,
    decimal: plan.decimal ?? "auto",
    thousands: plan.thousands ?? "auto",
    source: join?.table ?? layer.source,
    nullKind: layer.added.includes(column) && join ? `no row in ${join.table}` : undefined,
    where,
  });
  const areas = usableAreas({
    count: layer.count,
    kinds: layer.geometry.kinds,
    reasons: numbers.reasons,
    where,
    valueWhere: filterOf(plan.valueWhere, layer),
  });
  const used = areas.kept.filter((_, at) => areas.usable[at] === 1);
  const values = Float64Array.from(used, (row) => numbers.values[row]);
  checkValues(values, layer, plan);
  return {
    ...areas,
    name: plan.value,
    all: numbers.values,
    used,
    values,
    usedTested: areas.tested.filter((_, at) => areas.usable[at] === 1),
    missing: numbers.missing,
    notes: numbers.notes,
  };
}

function filterOf(text: string | null, layer: Layer): ((row: number) => boolean) | undefined {
  if (text === null) return undefined;
  const known = new Set([...layer.columns, ...layer.added].map(({ name }) => name));
  const fields = filterFields(text).filter((name) => known.has(name));
  return compileFilter(text, readColumns(layer, fields));
}

function checkValues(values: Float64Array, layer: Layer, { value }: AssessPlan): void {
  const subject = `Cannot test field ${value} of ${layer.source}`;
  if (values.length < FEWEST_AREAS) {
    throw new UnfitDataError(
      `${subject} as ${values.length} of its ${layer.count} areas can be used and at least ${FEWEST_AREAS} are needed; ` +
        "check the filters and the missing values",
    );
  }
  if (values.every((other) => other === values[0])) {
    throw new UnfitDataError(
      `${subject} as all ${values.length} values are equal (${
        values[0]
      }), so that nothing can be clustered`,
    );
  }
}
