/**
 * The table of the invented office: semicolons, decimal commas, and marks where a number is not shown.
 *
 * @module
 */
import type { AreaFigures } from "./plant.ts";

/** One area with what is known of it: one row of the table. */
export interface RegionArea extends AreaFigures {
  /** Four digits with leading zeros, unique. */
  readonly code: string;
  /** Unique; some have letters beyond ASCII. */
  readonly name: string;
}

/** CSV text with a header row and one row an area; lines end in CR LF as a spreadsheet writes them. */
export function indicatorTable(areas: readonly RegionArea[]): string {
  const rows = areas.map(({ code, name, dwellings, damp, mark }) =>
    [code, name, dwellings, damp ?? mark, rateText(damp, dwellings) ?? mark].join(";")
  );
  return ["code;name;dwellings;damp;damp_rate", ...rows, ""].join("\r\n");
}

/** Damp dwellings per 1,000 with one decimal; null where the count is not shown. */
function rateText(damp: number | null, dwellings: number): string | null {
  if (damp === null) return null;
  const tenths = Math.round(10_000 * damp / dwellings);
  return `${Math.floor(tenths / 10)},${tenths % 10}`;
}
