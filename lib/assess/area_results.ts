/**
 * Findings of the tested areas, spread over all rows of the layer.
 *
 * @module
 */
import type { LocalMoran } from "../statistics/local_moran.ts";
import type { Quadrant } from "../statistics/quadrant.ts";
import type { AreaRates } from "../write/rate_results.ts";
import type { AreaClass, AreaResults, Steadiness } from "../write/results.ts";
import { spread, spreadNumbers } from "./spread.ts";

/** What was found for the used areas; arrays are parallel to `used`. */
export interface LocalFindings {
  readonly local: LocalMoran;
  /** NaN where the area is alone or not tested. */
  readonly p: Float64Array;
  readonly q: Float64Array;
  readonly sig: Uint8Array;
  readonly agree: Float64Array | null;
  readonly steady: readonly (Steadiness | null)[] | null;
}

/** Which rows were used, and what every row holds. */
export interface AreaRows {
  readonly prefix: string;
  /** Rows that were used, ascending. */
  readonly used: Uint32Array;
  /** Value of every row as it is shown, NaN where missing. */
  readonly values: Float64Array;
  /** Reason of every row that was left out or not tested, else null. */
  readonly leftOut: readonly (string | null)[];
  /** Null where the indicator is no rate. */
  readonly rates: AreaRates | null;
}

const CLASS_OF: Readonly<Record<Quadrant, AreaClass>> = {
  HH: "high among high",
  LL: "low among low",
  HL: "high among low",
  LH: "low among high",
};

/** Per-area results of all rows; what does not apply is NaN or null. */
export function areaResults(rows: AreaRows, found: LocalFindings): AreaResults {
  const { used, leftOut } = rows;
  const { local } = found;
  const places = { used, count: leftOut.length };
  const numbers = (values: Float64Array) => spreadNumbers(values, places);
  const texts = <T>(values: ArrayLike<T>, fill: T) => spread(values, { ...places, fill });
  const tested = (at: number) => !Number.isNaN(found.p[at]);
  const alone = (at: number) => Number.isNaN(local.i[at]);
  const classes = Array.from(used, (row, at): AreaClass => {
    if (leftOut[row] !== null) return "no value";
    if (alone(at)) return "alone";
    const quad = local.quad[at];
    return found.sig[at] && quad ? CLASS_OF[quad] : "no evidence";
  });
  return {
    prefix: rows.prefix,
    leftOut,
    value: rows.values,
    z: numbers(local.z),
    lag: numbers(local.lag),
    i: numbers(local.i),
    p: numbers(found.p),
    q: numbers(found.q),
    quad: texts(local.quad, null),
    class: texts<AreaClass>(classes, "no value"),
    sig: texts(Array.from(used, (_, at) => tested(at) ? found.sig[at] === 1 : null), null),
    agree: found.agree && numbers(found.agree),
    steady: found.steady && texts<Steadiness | null>(found.steady, null),
    rates: rows.rates,
  };
}

/** Areas in each class, classes without areas left out. */
export function classCounts(classes: readonly AreaClass[]): Record<string, number> {
  const counts: Record<string, number> = {};
  for (const name of classes) counts[name] = (counts[name] ?? 0) + 1;
  return counts;
}
