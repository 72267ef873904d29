/**
 * What the figures and the page are made from.
 *
 * @module
 */
import type { FlatGeometry } from "../layer/geometry.ts";
import type { Crs } from "../layer/layer.ts";
import type { Caution } from "../sweep/cautions.ts";
import type { AreaResults, Results } from "../write/results.ts";

/** Links of the main definition, for their map. */
export interface DrawnLinks {
  /** Rows of the layer, parallel; each directed link once. */
  readonly from: Uint32Array;
  readonly to: Uint32Array;
  /** Point of each area in the layer's own coordinates, length 2n; NaN where it has none. */
  readonly places: Float64Array;
}

/** Everything a report shows. It holds no clock, so that the same findings give the same page. */
export interface ReportInput {
  readonly results: Results;
  /** Per-area results; arrays of length n, in input order. */
  readonly areas: AreaResults;
  /** Shapes of all n areas in the layer's own coordinates. */
  readonly geometry: FlatGeometry;
  /** What those coordinates mean; null where the file does not say. */
  readonly crs: Crs | null;
  /** Null to draw no links. */
  readonly links: DrawnLinks | null;
  /** Sum of all weights of the main definition, S0. */
  readonly s0: number;
  /** Names of the areas, length n; null to call them by their row number. */
  readonly labels: readonly string[] | null;
  readonly cautions: readonly Caution[];
}

/** What an area is called: its label, or its 0-based row number as in `_row`. */
export function areaName({ labels }: ReportInput, row: number): string {
  return labels?.[row] || `row ${row}`;
}
