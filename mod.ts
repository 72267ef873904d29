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
export type {
  AssessOptions,
  NeighborOptions,
  SourceOptions,
  WorkOptions,
} from "./lib/assess/options.ts";
export { type AssessPlan, type JoinPlan, planAssessment } from "./lib/assess/plan.ts";
export {
  type RenamedField,
  writeAssessment,
  type WriteOptions,
} from "./lib/assess/write_assessment.ts";
export { type FieldSummary, inspect, type Inspection } from "./lib/assess/inspect.ts";
export { buildLinks, type BuildLinksOptions, type BuiltLinks } from "./lib/assess/build_links.ts";

export type { Column, ColumnKind, ColumnValues, Crs, Layer, Table } from "./lib/layer/layer.ts";
export type { FlatGeometry } from "./lib/layer/geometry.ts";
export { readColumn } from "./lib/layer/column.ts";
export {
  UnfitDataError,
  UnreadableError,
  UnwritableError,
  UsageError,
} from "./lib/layer/errors.ts";

export { type LayerInfo, listLayers, readLayer, type ReadLayerOptions } from "./lib/read/vector.ts";
export { readTable, type TableOptions } from "./lib/read/table.ts";
export { type JoinOptions, type JoinReport, joinTable } from "./lib/read/join.ts";
export { type Format, listFormats } from "./lib/read/formats.ts";
export type { DecimalMark, ThousandsMark } from "./lib/read/number_format.ts";
export type { GeometryHealth } from "./lib/read/inspect_geometry.ts";
export type { RecordedInput } from "./lib/read/record_input.ts";

export {
  type ColumnNumbers,
  type MissingCount,
  type NumberOptions,
  numbersOf,
} from "./lib/prepare/numbers.ts";
export { type UsableAreas, usableAreas, type UsableOptions } from "./lib/prepare/usable.ts";
export { compileFilter } from "./lib/prepare/filter.ts";

export { type PointsOptions, representativePoints } from "./lib/project/points.ts";
export { chooseMetric, type Metric, type MetricOptions } from "./lib/project/metric.ts";
export type { MetricLayer } from "./lib/project/located_layer.ts";
export type { Ellipsoid } from "./lib/project/ellipsoid.ts";

export { type Ground, neighborBuilder } from "./lib/neighbors/build.ts";
export {
  type DescribeOptions,
  describeTopology,
  type NeighborSummary,
} from "./lib/neighbors/describe.ts";
export { type Family, parseRule, type Rule, ruleText } from "./lib/neighbors/rule.ts";
export type { Topology } from "./lib/neighbors/topology.ts";

export { weigh, type WeighOptions } from "./lib/weights/weigh.ts";
export type { Bandwidth, KernelName, WeightRule } from "./lib/weights/weight_rule.ts";
export type { Standardize } from "./lib/weights/standardize.ts";
export type { LinkFacts } from "./lib/weights/link_weights.ts";
export { type WeightSums, weightSums } from "./lib/weights/sums.ts";
export { spatialLag } from "./lib/weights/lag.ts";
export type { Weights } from "./lib/weights/weights.ts";

export { type MoranI, moranI } from "./lib/statistics/moran.ts";
export { type LocalMoran, localMoran } from "./lib/statistics/local_moran.ts";
export type { Quadrant } from "./lib/statistics/quadrant.ts";
export { type GearyC, gearyC } from "./lib/statistics/geary.ts";
export { type LocalGeary, localGeary } from "./lib/statistics/local_geary.ts";
export { type GetisOrdG, getisOrdG } from "./lib/statistics/getis_ord_g.ts";
export { gi, giStar, type GiStarOptions } from "./lib/statistics/gi.ts";
export { giCritical } from "./lib/statistics/gi_critical.ts";
export {
  type JoinCount,
  type JoinCountOptions,
  type JoinCounts,
  joinCounts,
} from "./lib/statistics/join_counts.ts";
export type { JoinMoments } from "./lib/statistics/join_moments.ts";
export { type LocalJoinCount, localJoinCount } from "./lib/statistics/local_join_count.ts";
export { type BivariateMoranI, bivariateMoranI } from "./lib/statistics/bivariate_moran.ts";
export {
  type LocalBivariateMoran,
  localBivariateMoran,
} from "./lib/statistics/local_bivariate_moran.ts";
export { type LeeL, leeL, type LeeOptions } from "./lib/statistics/lee.ts";
export {
  type Coefficient,
  type LeastSquares,
  leastSquares,
  type Predictor,
} from "./lib/statistics/least_squares.ts";
export { type ResidualMoranI, residualMoranI } from "./lib/statistics/residual_moran.ts";
export { correlogram, type CorrelogramStep } from "./lib/statistics/correlogram.ts";

export type { PermuteOptions } from "./lib/inference/options.ts";
export { type GlobalReference, permuteMoran } from "./lib/inference/permute_global.ts";
export {
  type LocalReference,
  permuteLocalMoran,
  type PermuteLocalOptions,
} from "./lib/inference/permute_local.ts";
export {
  type LocalTest,
  testLocalMoran,
  type TestLocalOptions,
} from "./lib/inference/test_local.ts";
export { clopperPearson, type TailCounts, twoSidedP } from "./lib/inference/p_value.ts";
export { type Adjustment, adjustP } from "./lib/inference/adjust.ts";

export type { SweepDefinition } from "./lib/sweep/merge.ts";
export { runSweep, type SweepOptions, type SweepOutcome } from "./lib/sweep/run.ts";
export type { FamilyFinding, SweepResults } from "./lib/sweep/sweep_results.ts";
export type { Steadiness } from "./lib/sweep/stability.ts";
export { type Verdict, verdictOf } from "./lib/sweep/verdict.ts";
export type { Finding, FlaggedArea, VerdictInput } from "./lib/sweep/verdict_input.ts";

export type { FolderOptions } from "./lib/write/outcome_folder.ts";
export {
  type AreaClass,
  type AreaResults,
  type LinkTable,
  type Results,
  resultsSchema,
} from "./lib/write/results.ts";
