/**
 * Which areas count, and why not.
 *
 * @module
 */
import { GEOMETRY_KINDS } from "../layer/geometry.ts";

/** Options of {@link usableAreas}; a filter that is left out selects everything. */
export interface UsableOptions {
  /** Number of areas. */
  readonly count: number;
  /** Kind of each area's geometry (see `FlatGeometry`). @default every area has one */
  readonly kinds?: Uint8Array;
  /** Why an area has no value, or null where it has one, as from `numbersOf`. @default every area has one */
  readonly reasons?: readonly (string | null)[];
  /** Areas to keep at all (`--where`). */
  readonly where?: (row: number) => boolean;
  /** Areas to test (`--value-where`); the others with a value still count as neighbors. */
  readonly valueWhere?: (row: number) => boolean;
}

/** The areas of a layer sorted into those that stay, those that are tested, and the reasons of the rest. */
export interface UsableAreas {
  /** Rows selected by `--where`, ascending: the areas on which topology is built. */
  readonly kept: Uint32Array;
  /** Parallel to `kept`: 1 where the area has geometry and a value, so that it may be linked. */
  readonly usable: Uint8Array;
  /** Parallel to `kept`: 1 where the area is usable and selected by `--value-where`, so that it is tested itself. */
  readonly tested: Uint8Array;
  /** One per row of the layer: null for a tested area, else why it is left out or not tested. */
  readonly leftOut: readonly (string | null)[];
  /** How many areas have each reason: filter, geometry, missing values by kind, value filter. */
  readonly counts: readonly { readonly reason: string; readonly count: number }[];
}

const NOT_SELECTED = "not selected by --where";
const NO_GEOMETRY = "no geometry";
const NOT_TESTED = "not selected by --value-where";
const NONE = GEOMETRY_KINDS.indexOf("none");

/**
 * Decides for every row whether it is kept, usable and tested, and if not, why. An area with several reasons gets
 * the first of: not selected by `--where`, no geometry, value missing, not selected by `--value-where`.
 */
export function usableAreas(options: UsableOptions): UsableAreas {
  const { count, kinds, reasons, where = () => true, valueWhere = () => true } = options;
  const leftOut = Array.from({ length: count }, (_, row): string | null => {
    if (!where(row)) return NOT_SELECTED;
    if (kinds?.[row] === NONE) return NO_GEOMETRY;
    return reasons?.[row] ?? (valueWhere(row) ? null : NOT_TESTED);
  });
  const rows = Uint32Array.from(leftOut.keys());
  const kept = rows.filter((row) => leftOut[row] !== NOT_SELECTED);
  const tested = Uint8Array.from(kept, (row) => leftOut[row] === null ? 1 : 0);
  const usable = tested.map((one, at) => one || leftOut[kept[at]] === NOT_TESTED ? 1 : 0);
  return { kept, usable, tested, leftOut, counts: countReasons(leftOut) };
}

function countReasons(leftOut: readonly (string | null)[]): UsableAreas["counts"] {
  const counts = new Map<string, number>();
  for (const reason of leftOut) {
    if (reason !== null) counts.set(reason, (counts.get(reason) ?? 0) + 1);
  }
  const missing = [...counts.keys()]
    .filter((reason) => ![NOT_SELECTED, NO_GEOMETRY, NOT_TESTED].includes(reason))
    .sort();
  return [NOT_SELECTED, NO_GEOMETRY, ...missing, NOT_TESTED].flatMap((reason) => {
    const count = counts.get(reason);
    return count === undefined ? [] : [{ reason, count }];
  });
}
