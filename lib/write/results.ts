/**
 * The shape of `results.json`: every number of a run, for machines and for the report.
 *
 * The schema below is the single source: the TypeScript type is inferred from it and
 * `results.schema.json` is generated from it (a test compares). NaN in code is null here.
 *
 * @module
 */
import * as z from "zod";
import type { Family } from "../neighbors/rule.ts";
import { TESTED_CLASSES } from "../sweep/area_classes.ts";
import { TRANSFORMS } from "../prepare/transform.ts";
import type { Steadiness } from "../sweep/stability.ts";
import { type AreaRates, rateSchema } from "./rate_results.ts";

const count = z.number().int().min(0);
/** A number, or null where the statistic is undefined. */
const figure = z.number().nullable();

/** One class of an area, in plain words; `no value` is an area that was left out or not tested. */
export const AREA_CLASSES = [...TESTED_CLASSES, "no value"] as const;
/** See {@link AREA_CLASSES}. */
export type AreaClass = typeof AREA_CLASSES[number];

export type { Family, Steadiness };

const FAMILIES = [
  "contiguity",
  "nearest",
  "band",
  "graph",
  "weighted",
  "links",
] as const satisfies readonly Family[];

const neighbors = z.object({
  rule: z.string().describe("The neighbor rule in nearkin's grammar"),
  pairs: count.describe("Unordered pairs of linked areas"),
  links: count.describe("Directed links"),
  islands: count.describe("Areas without a neighbor"),
  components: count.describe("Connected pieces, islands included"),
  meanNeighbors: figure,
  minNeighbors: count,
  maxNeighbors: count,
  oneWayLinks: count.describe("Links whose reverse is missing"),
  longestLink: figure.describe(
    "In meters (or map units with a planar metric); null without distances",
  ),
  density: figure.describe("Directed links as a share of all there could be"),
  neighborCounts: z.array(z.object({ neighbors: count, areas: count })),
});
export type NeighborSummary = z.infer<typeof neighbors>;

const diagnostics = z.object({
  sharingPlaces: count.nullable()
    .describe("Areas whose point is that of another one too; null without distances"),
  noneAlone: figure.describe("Shortest distance at which no area is alone"),
  oneComponent: figure.describe("Shortest distance at which all areas hang together"),
  boundaries: z.object({
    nearVertexPairs: count.describe("Pairs that share a vertex only within the tolerance"),
    junctionPairs: count.describe("Pairs where only a vertex lies on a segment of the other"),
    overlapPairs: count,
    snappedPairs: count.describe("Pairs that touch only because snap closed a gap"),
    nearMisses: count.describe("Pairs within a small gap of each other that do not touch"),
    widestGap: figure.describe("The snap that would join all of these, in meters"),
  }).nullable().describe("How boundaries fit together, in unordered pairs; null without polygons"),
  selfCrossing: count.describe("Polygons whose boundary crosses itself"),
}).describe("Facts about the map that hold under every neighbor rule");
export type MapDiagnostics = z.infer<typeof diagnostics>;

const globalMoran = z.object({
  value: figure,
  expected: figure,
  varianceNormality: figure,
  varianceRandomization: figure,
  z: figure.describe("(value - expected) / sqrt(varianceRandomization)"),
  permutations: count,
  atLeast: count,
  atMost: count,
  enumerated: z.boolean().describe("True where every order was counted instead of sampled"),
  p: figure,
  pInterval: z.tuple([z.number(), z.number()]).nullable()
    .describe("99 % Clopper-Pearson interval of a sampled p"),
  alternative: z.enum(["two-sided", "greater", "less"]),
});
export type GlobalMoranResult = z.infer<typeof globalMoran>;

const reference = z.object({
  mean: figure,
  sd: figure,
  quantiles: z.array(z.object({ at: z.number(), value: z.number() })),
  bins: z.object({ start: z.number(), width: z.number(), counts: z.array(count) }).nullable(),
}).describe("Distribution of the statistic over the permutations");
export type ReferenceDistribution = z.infer<typeof reference>;

const local = z.object({
  permutations: count.describe("Draws asked for each area"),
  redrawn: count.describe("Areas drawn again with more permutations because the floor decided"),
  floor: figure.describe("Smallest p these draws can give"),
  floorDecides: z.boolean().describe(
    "True where even the re-draw left areas at a floor that decides",
  ),
  level: z.number(),
  adjust: z.enum(["none", "bonferroni", "holm", "bh", "by"]),
  tested: count.describe("Areas that have a p"),
  significant: count,
  counts: z.record(z.string(), count).describe("Areas in each class"),
});
export type LocalSummary = z.infer<typeof local>;

const TESTED_TRANSFORMS = [...TRANSFORMS, "freeman-tukey", "standardized"] as const;

const run = z.object({
  indicator: z.string(),
  neighbors,
  diagnostics,
  weights: z.string(),
  standardize: z.enum(["row", "none", "total", "variance"]),
  values: z.object({
    mean: figure.describe("Of the tested values, as the three below"),
    sd: figure.describe("Population standard deviation (divisor n)"),
    min: figure,
    max: figure,
  }),
  transform: z.enum(TESTED_TRANSFORMS)
    .describe("How the tested values were made from what was read; of a rate, see `rate.tested`"),
  global: z.object({
    moranI: globalMoran,
    ebIndex: z.object({ value: figure, asPublished: figure }).nullable()
      .describe(
        "Empirical-Bayes index of a rate (Assunção & Reis 1999), with z centered and as published",
      ),
  }),
  reference,
  local,
  rate: rateSchema.nullable().describe("Null where the indicator is no rate"),
});
export type Run = z.infer<typeof run>;

const definition = z.object({
  rule: z.string(),
  weights: z.string(),
  family: z.enum(FAMILIES),
  main: z.boolean(),
  sameAs: z.array(z.string()).describe("Definitions that gave the same weights and were merged in"),
  pairs: count,
  islands: count,
  components: count,
  meanNeighbors: figure,
  value: figure.describe("Moran's I"),
  z: figure.describe("(I - mean) / sd over all shared permutations"),
  p: figure.describe("Two-sided rank of z among the shared permutations"),
  pAdjusted: figure.describe("Step-down max |z| (Westfall & Young 1993)"),
  significantAreas: count,
  overlap: figure.describe("Jaccard overlap of its significant areas with the main definition's"),
});
export type DefinitionResult = z.infer<typeof definition>;

const sweep = z.object({
  permutations: count,
  localPermutations: count,
  definitions: z.array(definition),
  joint: z.object({
    median: figure.describe("Family-weighted median of z over definitions"),
    p: figure.describe("Two-sided rank of the median among the shared permutations"),
    share: figure.describe("Share of definitions significant in the dominant direction"),
    shareP: figure,
    direction: z.enum(["positive", "negative"]),
    smallest: figure.describe("Smallest I over the definitions"),
    largest: figure,
  }),
  stability: z.object({
    steady: count,
    mostly: count,
    fragile: count,
    quiet: count,
    flaggedSteady: count.describe("Areas flagged by the main definition that are steady"),
    onlyElsewhere: z.array(count)
      .describe("Rows significant in some definition but not in the main one"),
    flips: z.array(count).describe("Rows that are high in one definition and low in another"),
  }),
});
export type SweepResults = z.infer<typeof sweep>;

/** Schema of `results.json`. */
export const resultsSchema = z.object({
  tool: z.object({ name: z.literal("nearkin"), version: z.string() }),
  layer: z.object({
    source: z.string(),
    name: z.string(),
    features: count,
    used: count,
    leftOut: z.array(z.object({ reason: z.string(), count })),
    shape: z.string(),
    crs: z.string().nullable(),
    metricCrs: z.object({
      name: z.string(),
      definition: z.string(),
      worstDistortion: figure.describe(
        "Largest relative error of distance over the extent; 0.01 = 1 %",
      ),
      unit: z.string(),
    }).nullable(),
  }),
  join: z.object({
    table: z.string(),
    layerKey: z.string(),
    tableKey: z.string(),
    matched: count,
    layerOnly: z.array(z.string()).describe("Keys of the layer that the table lacks (first 100)"),
    layerOnlyCount: count,
    tableOnly: z.array(z.string()).describe("Keys of the table that the layer lacks (first 100)"),
    tableOnlyCount: count,
    hint: z.string().nullable(),
  }).nullable(),
  missingValues: z.array(z.object({ kind: z.string(), count }))
    .describe("What stood in place of a number, each kind counted"),
  runs: z.array(run),
  sweep: sweep.nullable(),
  verdict: z.object({
    headline: z.string(),
    sentences: z.array(z.string()),
    clustered: z.enum(["clustered", "dispersed", "not shown"]),
  }),
  seed: z.string(),
  warnings: z.array(z.string()),
}).describe("Results of a nearkin run");
/** Everything a run found. */
export type Results = z.infer<typeof resultsSchema>;

/**
 * Per-area results, column by column, each of length `layer.count` in input order. NaN and null mean
 * "has none": an area left out, or alone.
 */
export interface AreaResults {
  /** Prefix of the result fields (the value field's or the rate's name). */
  readonly prefix: string;
  /** Reason why an area was left out, or null. */
  readonly leftOut: readonly (string | null)[];
  /** The value as read, or the raw rate (NaN where missing). */
  readonly value: Float64Array;
  readonly z: Float64Array;
  /** Spatial lag of z, raw (with the weights as standardized). */
  readonly lag: Float64Array;
  readonly i: Float64Array;
  readonly p: Float64Array;
  readonly q: Float64Array;
  readonly quad: readonly ("HH" | "LL" | "HL" | "LH" | null)[];
  readonly class: readonly AreaClass[];
  readonly sig: readonly (boolean | null)[];
  /** Null without a sweep. */
  readonly agree: Float64Array | null;
  readonly steady: readonly (Steadiness | null)[] | null;
  /** Null where the indicator is no rate. */
  readonly rates: AreaRates | null;
}

/** The links of the main definition, by layer row, each directed link once. */
export interface LinkTable {
  readonly from: Uint32Array;
  readonly to: Uint32Array;
  readonly weight: Float64Array;
  /** Meters (or map units with a planar metric); null when no distances were measured. */
  readonly distance: Float64Array | null;
}

/** JSON Schema (draft 2020-12) of `results.json`, as published in `results.schema.json`. */
export function resultsJsonSchema(): unknown {
  return z.toJSONSchema(resultsSchema);
}
