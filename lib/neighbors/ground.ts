/**
 * What neighbors are looked for on.
 *
 * @module
 */
import type { FlatGeometry } from "../layer/geometry.ts";
import type { Ellipsoid } from "../project/ellipsoid.ts";
import type { ContiguityFinder } from "./contiguity.ts";
import type { LinkTriples } from "./links.ts";
import type { PointSpace } from "./point_space.ts";

/** The kept areas of a layer (those that passed `--where`), and which of them are usable. */
export interface Ground {
  /** Boundaries in the layer's own coordinates; null where no rule needs them. */
  readonly geometry: FlatGeometry | null;
  /** x and y of each area in a metric, NaN where it has no place; null where distance cannot be measured. */
  readonly points: Float64Array | null;
  /** What distance is measured on where `points` are longitude and latitude. @default null, for the plane */
  readonly ellipsoid?: Ellipsoid | null;
  /** Distance between the usable areas, where it was opened before. @default made from `points` */
  readonly space?: PointSpace | null;
  /** Number of kept areas. */
  readonly count: number;
  /** Mask over the kept areas: 1 where an area has a usable value. */
  readonly usable: Uint8Array;
  /** Whether the geometry is longitude and latitude in degrees. @default false */
  readonly geographic?: boolean;
  /** Meters in a unit of the geometry where it is projected; for `snap`. @default 1 */
  readonly metersPerUnit?: number;
  /** Links of a file, over kept areas; for `links:FILE`. */
  readonly readLinks?: (file: string) => LinkTriples;
  /** Values of a field over kept areas, null where missing; for `same:FIELD`. */
  readonly fieldKeys?: (field: string) => readonly (string | null)[];
  /**
   * Contiguity found before, to share it between grounds of the same geometry (several indicators with
   * different missing areas). @default found anew, and remembered by the builder
   */
  readonly contiguity?: ContiguityFinder;
}
