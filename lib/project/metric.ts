/**
 * Choosing what distance means for a layer: which plane, or the ellipsoid, it is measured on.
 *
 * @module
 */
import type { Crs } from "../layer/layer.ts";
import { autoMetric } from "./auto_metric.ts";
import { geodesicMetric } from "./geodesic_metric.ts";
import { locate, type MetricLayer } from "./located_layer.ts";
import { parseMetricChoice } from "./metric_choice.ts";
import type { Metric } from "./metric_type.ts";
import { planarMetric } from "./planar_metric.ts";
import { projectedMetric } from "./projected_metric.ts";

export type { Metric };

/** Options of {@link chooseMetric}. */
export interface MetricOptions {
  /** Looks up a code such as `EPSG:32632`; needed only where one is chosen. */
  readonly resolveCrs?: (code: string) => Promise<Crs>;
}

/**
 * Chooses how distances are measured.
 *
 * `auto` takes the layer's own CRS if it is projected and true within 1 % over the extent, else the
 * UTM zone of its middle if that is, else Lambert azimuthal equal-area around its middle if that is
 * within 10 %. `planar` takes the coordinates as stored, in meters where the CRS tells their unit.
 * Codes and proj strings are taken however large their distortion, which is stated. No datum is
 * shifted.
 *
 * @param choice `auto`, `planar`, `geodesic`, a code such as `EPSG:32632` or a proj string.
 * @throws {UsageError} for an unknown choice, or a CRS that has no distances.
 * @throws {UnfitDataError} when the layer declares no CRS (but for `planar`), one that cannot be
 * read, or one that its coordinates do not fit; and when `auto` finds nothing within 10 %. Cost: a
 * pass or two over the vertices and a thousand geodesics.
 */
export async function chooseMetric(
  layer: MetricLayer,
  choice = "auto",
  { resolveCrs }: MetricOptions = {},
): Promise<Metric> {
  const parsed = parseMetricChoice(choice);
  switch (parsed.kind) {
    case "planar":
      return planarMetric(layer);
    case "geodesic":
      return geodesicMetric(locate(layer));
    case "auto":
      return autoMetric(locate(layer));
    case "proj": {
      const { definition } = parsed;
      return projectedMetric(locate(layer), { name: definition, definition, source: definition });
    }
    case "code": {
      if (!resolveCrs) throw new RangeError(`Cannot look up ${parsed.code} without resolveCrs`);
      const { name, wkt } = await resolveCrs(parsed.code);
      return projectedMetric(locate(layer), { name, definition: parsed.code, source: wkt });
    }
  }
}
