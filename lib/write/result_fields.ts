/**
 * The fields a run adds to the layer: their names, kinds and order.
 *
 * @module
 */
import type { ColumnKind, ColumnValues } from "../layer/layer.ts";
import type { AreaResults } from "./results.ts";

/** Result columns, and the names that had to give way because the layer already used them. */
export interface ResultFields {
  readonly columns: readonly ColumnValues[];
  readonly renamed: readonly { readonly from: string; readonly to: string }[];
}

/**
 * Columns for `areas.fgb` and `areas.csv`: `_row` and `_left_out`, then one field per finding with the
 * indicator's name in front. A name that the layer already has gets `_2` (or the next free number)
 * behind it, so that no original field is ever replaced.
 *
 * @param areas Per-area results, each array of length `layer.count`.
 * @param taken Names of the fields already there.
 */
export function resultFields(areas: AreaResults, taken: readonly string[]): ResultFields {
  const used = new Set(taken.map((name) => name.toLowerCase()));
  const renamed: { from: string; to: string }[] = [];
  const columns = plainFields(areas).map((column) => {
    const name = freeName(column.name, used);
    used.add(name.toLowerCase());
    if (name !== column.name) renamed.push({ from: column.name, to: name });
    return { ...column, name };
  });
  return { columns, renamed };
}

function plainFields(areas: AreaResults): ColumnValues[] {
  const own = (suffix: string) => `${areas.prefix}_${suffix}`;
  const rows = Float64Array.from(areas.leftOut, (_, row) => row);
  const fields = [
    field("_row", "integer", rows),
    field("_left_out", "text", areas.leftOut),
    field(own("z"), "number", areas.z),
    field(own("lag"), "number", areas.lag),
    field(own("i"), "number", areas.i),
    field(own("p"), "number", areas.p),
    field(own("q"), "number", areas.q),
    field(own("quad"), "text", areas.quad),
    field(own("class"), "text", areas.class),
    field(own("sig"), "boolean", Float64Array.from(areas.sig, flagNumber)),
  ];
  if (areas.agree) fields.push(field(own("agree"), "number", areas.agree));
  if (areas.steady) fields.push(field(own("steady"), "text", areas.steady));
  if (areas.rates) {
    fields.push(
      field(own("rate"), "number", areas.rates.rate),
      field(own("shrunk"), "number", areas.rates.shrunk),
      field(own("shrunk_local"), "number", areas.rates.shrunkLocal),
      field(own("funnel"), "text", areas.rates.funnel),
    );
  }
  return fields;
}

function field(name: string, kind: ColumnKind, values: ColumnValues["values"]): ColumnValues {
  return { name, kind, storedAs: kind, values };
}

function flagNumber(flag: boolean | null): number {
  return flag === null ? NaN : Number(flag);
}

function freeName(name: string, used: ReadonlySet<string>): string {
  let candidate = name;
  for (let next = 2; used.has(candidate.toLowerCase()); next++) candidate = `${name}_${next}`;
  return candidate;
}
