/**
 * nearkin: is a map of small areas clustered, where, and would that still stand under another
 * reasonable definition of neighbor?
 *
 * The main job in two calls:
 *
 * ```ts ignore
 * import { assess, writeAssessment } from "@nearkin/nearkin";
 * const assessment = await assess("areas.gpkg", { value: "rate" });
 * await writeAssessment(assessment, "outcome");
 * ```
 *
 * Below it, the same path step by step: layers, neighbors, weights, statistics, inference, sweep.
 *
 * @module
 */
export { assess, type Assessment } from "./lib/assess/assess.ts";
export type { AssessOptions } from "./lib/assess/options.ts";
export { type AssessPlan, planAssessment } from "./lib/assess/plan.ts";
export { writeAssessment, type WriteOptions } from "./lib/assess/write_assessment.ts";
export { inspect, type Inspection } from "./lib/assess/inspect.ts";
export { buildLinks, type BuiltLinks } from "./lib/assess/build_links.ts";

export type { Column, ColumnValues, Crs, Layer, Table } from "./lib/layer/layer.ts";
export type { FlatGeometry } from "./lib/layer/geometry.ts";
export { readColumn } from "./lib/layer/column.ts";
export {
  UnfitDataError,
  UnreadableError,
  UnwritableError,
  UsageError,
} from "./lib/layer/errors.ts";

export { listLayers, readLayer } from "./lib/read/vector.ts";
export { readTable } from "./lib/read/table.ts";
export { joinTable } from "./lib/read/join.ts";
export { listFormats } from "./lib/read/formats.ts";

export { numbersOf } from "./lib/prepare/numbers.ts";
export { usableAreas } from "./lib/prepare/usable.ts";
export { compileFilter } from "./lib/prepare/filter.ts";

export { representativePoints } from "./lib/project/points.ts";
export { chooseMetric, type Metric } from "./lib/project/metric.ts";

export { type Ground, neighborBuilder } from "./lib/neighbors/build.ts";
export { describeTopology, type NeighborSummary } from "./lib/neighbors/describe.ts";
export { parseRule, type Rule, ruleText } from "./lib/neighbors/rule.ts";
export type { Topology } from "./lib/neighbors/topology.ts";

export { weigh, type WeighOptions } from "./lib/weights/weigh.ts";
export { weightSums } from "./lib/weights/sums.ts";
export { spatialLag } from "./lib/weights/lag.ts";
export type { Weights } from "./lib/weights/weights.ts";

export { moranI } from "./lib/statistics/moran.ts";
export { localMoran } from "./lib/statistics/local_moran.ts";

export { permuteMoran } from "./lib/inference/permute_global.ts";
export { permuteLocalMoran } from "./lib/inference/permute_local.ts";
export { testLocalMoran } from "./lib/inference/test_local.ts";
export { clopperPearson, twoSidedP } from "./lib/inference/p_value.ts";
export { adjustP } from "./lib/inference/adjust.ts";

export { runSweep } from "./lib/sweep/run.ts";
export { verdictOf } from "./lib/sweep/verdict.ts";

export { type AreaResults, type Results, resultsSchema } from "./lib/write/results.ts";
