/**
 * The number to test: which areas have it, which are tested, and why the others are not.
 *
 * @module
 */
import { readColumns } from "../layer/column.ts";
import { UnfitDataError } from "../layer/errors.ts";
import type { Layer } from "../layer/layer.ts";
import { compileFilter } from "../prepare/filter.ts";
import { filterFields } from "../prepare/filter_syntax.ts";
import type { MissingCount } from "../prepare/numbers.ts";
import type { RateCounts } from "../prepare/rate_moments.ts";
import { type UsableAreas, usableAreas } from "../prepare/usable.ts";
import type { JoinReport } from "../read/join.ts";
import type { AssessPlan } from "./plan.ts";
import { readIndicator } from "./read_indicator.ts";
import { testedValues } from "./tested_values.ts";

/** Fewest areas with a value that can be tested at all. */
const FEWEST_AREAS = 3;

/** An indicator ready to be tested. */
export interface Indicator extends UsableAreas {
  readonly name: string;
  /** Value of every row of the layer as read, or its raw rate; NaN where missing. */
  readonly all: Float64Array;
  /** Rows that have a value and may be linked, ascending. */
  readonly used: Uint32Array;
  /** Tested values of the used rows. */
  readonly values: Float64Array;
  /** Cases and population of the used rows; null where the indicator is no rate. */
  readonly rateCounts: RateCounts | null;
  /** Mask over the used rows: 1 where the area is tested itself. */
  readonly usedTested: Uint8Array;
  readonly missing: readonly MissingCount[];
  readonly notes: readonly string[];
}

/**
 * Reads the indicator of a plan and sorts the areas.
 *
 * @throws {UnfitDataError} when fewer than 3 areas have a value, all values are equal, `--value-where` selects
 * none, or the numbers cannot be used for what was asked.
 */
export function prepareIndicator(
  layer: Layer,
  plan: AssessPlan,
  join: JoinReport | null,
): Indicator {
  const where = filterOf(plan.where, layer);
  const read = readIndicator(layer, { plan, join, where });
  const areas = usableAreas({
    count: layer.count,
    kinds: layer.geometry.kinds,
    reasons: read.reasons,
    where,
    valueWhere: filterOf(plan.valueWhere, layer),
  });
  const used = areas.kept.filter((_, at) => areas.usable[at] === 1);
  checkAreas(used.length, areas, { layer, plan });
  const { values, rateCounts } = testedValues(read, used, plan.indicator);
  checkValues(values, layer, plan);
  const usedTested = areas.tested.filter((_, at) => areas.usable[at] === 1);
  checkTested(usedTested, layer, plan);
  return {
    ...areas,
    name: plan.indicator.name,
    all: read.shown,
    used,
    values,
    rateCounts,
    usedTested,
    missing: read.missing,
    notes: read.notes,
  };
}

function filterOf(text: string | null, layer: Layer): ((row: number) => boolean) | undefined {
  if (text === null) return undefined;
  const known = new Set([...layer.columns, ...layer.added].map(({ name }) => name));
  const fields = filterFields(text).filter((name) => known.has(name));
  return compileFilter(text, readColumns(layer, fields));
}

function checkAreas(
  usable: number,
  { counts }: UsableAreas,
  { layer, plan }: { readonly layer: Layer; readonly plan: AssessPlan },
): void {
  if (usable >= FEWEST_AREAS) return;
  const leftOut = counts.map(({ reason, count }) => `${count} ${reason}`).join(", ");
  const why = leftOut === "" ? "" : ` (left out: ${leftOut})`;
  throw new UnfitDataError(
    `${subject(layer, plan)} as ${usable} of its ${layer.count} areas can be used${why} ` +
      `and at least ${FEWEST_AREAS} are needed; check the filters and the missing values`,
  );
}

function checkValues(values: Float64Array, layer: Layer, plan: AssessPlan): void {
  if (values.some((other) => other !== values[0])) return;
  throw new UnfitDataError(
    `${subject(layer, plan)} as all ${values.length} values are equal (${
      values[0]
    }), so that nothing can be clustered`,
  );
}

function checkTested(tested: Uint8Array, layer: Layer, plan: AssessPlan): void {
  if (tested.includes(1)) return;
  throw new UnfitDataError(
    `${subject(layer, plan)} as --value-where "${plan.valueWhere}" selects none of the ` +
      `${tested.length} areas that can be used; choose a wider filter`,
  );
}

function subject(layer: Layer, { indicator }: AssessPlan): string {
  return indicator.kind === "rate"
    ? `Cannot test the rate ${indicator.cases}/${indicator.population} of ${layer.source}`
    : `Cannot test field ${indicator.field} of ${layer.source}`;
}
