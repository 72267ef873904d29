/**
 * Made-up results around real statistics, for the report.
 *
 * @module
 */
import type { MoranI } from "../../lib/statistics/moran.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import type { AreaResults, DefinitionResult, Results } from "../../lib/write/results.ts";
import { countClasses } from "../../lib/report/class_words.ts";

/** Results of a run that found these areas. */
export function sampleResults(
  areas: AreaResults,
  { moran, weights }: { readonly moran: MoranI; readonly weights: Weights },
): Results {
  const hidden = areas.leftOut.filter((reason) => reason !== null).length;
  const features = areas.class.length;
  const counts = countClasses(areas);
  const significant = areas.sig.filter((flag) => flag).length;
  return {
    tool: { name: "nearkin", version: "0.1.0" },
    layer: {
      source: "wards & districts.gpkg",
      name: "wards",
      features,
      used: features - hidden,
      leftOut: [{ reason: "no value (suppressed)", count: hidden }],
      shape: "polygon",
      crs: "ETRS89 / UTM zone 29N · EPSG:25829",
      metricCrs: {
        name: "ETRS89 / UTM zone 29N",
        definition: "EPSG:25829",
        worstDistortion: 0.0004,
        unit: "m",
      },
    },
    join: {
      table: "damp <2024>.csv",
      layerKey: "code",
      tableKey: "area_code",
      matched: features - 2,
      layerOnly: ["0020", "0143"],
      layerOnlyCount: 2,
      tableOnly: ["9999", "total"],
      tableOnlyCount: 2,
      hint: 'One more key would match without spaces around it: " 0143"',
    },
    missingValues: [{ kind: "* (declared missing)", count: hidden - 2 }, {
      kind: "empty",
      count: 2,
    }],
    runs: [runOf(areas, { moran, weights, counts, significant })],
    sweep: sweepOf(areas, moran, significant),
    verdict: {
      headline:
        'Values of "damp_rate" are moderately clustered (joint p < 0.001 over 18 definitions ' +
        "of neighbor)",
      sentences: [
        "Neighboring areas are more alike than chance would make them: Moran's I is " +
        `${
          moran.value.toFixed(2)
        } with the main definition of neighbor (touching), where -0.003 is ` +
        "expected if location plays no part.",
        "Over the 18 definitions tried, I runs from 0.28 to 0.47; taken together they give p < 0.001 (joint " +
        "test), within the level of 0.05.",
        `${significant} areas stand out (level 0.05, adjusted for testing ${
          features - hidden
        } areas): ` +
        `${counts["high among high"]} high among high and ${
          counts["low among low"]
        } low among low.`,
        "Most of these areas are steady (the same class under at least 80 % of the definitions).",
        "The data cannot say what lies behind this, nor anything about single persons, and other boundaries " +
        "or larger areas could give another answer.",
      ],
      clustered: "clustered",
    },
    seed: "nearkin",
    warnings: [
      `2 areas have no row in damp <2024>.csv (0020, 0143)`,
      `${counts.alone} areas have no neighbor under touching: they count in the mean but cannot be tested`,
    ],
  };
}

interface Parts {
  readonly moran: MoranI;
  readonly weights: Weights;
  readonly counts: Record<string, number>;
  readonly significant: number;
}

function runOf(areas: AreaResults, { moran, weights, counts, significant }: Parts) {
  const tested = areas.sig.filter((flag) => flag !== null).length;
  const values = areas.value.filter((value) => !Number.isNaN(value));
  const sd = Math.sqrt(moran.varianceRandomization);
  return {
    indicator: "damp_rate",
    neighbors: neighborsOf(weights),
    diagnostics: {
      sharingPlaces: 0,
      noneAlone: 4212.6,
      oneComponent: 9120.4,
      boundaries: {
        nearVertexPairs: 0,
        junctionPairs: 3,
        overlapPairs: 0,
        snappedPairs: 0,
        nearMisses: 2,
        widestGap: 1.25,
      },
      selfCrossing: 0,
    },
    weights: "equal",
    standardize: "row" as const,
    values: {
      mean: values.reduce((sum, value) => sum + value, 0) / values.length,
      sd: 18.4,
      min: Math.min(...values),
      max: Math.max(...values),
    },
    transform: "none" as const,
    global: {
      moranI: {
        value: moran.value,
        expected: moran.expected,
        varianceNormality: moran.varianceNormality,
        varianceRandomization: moran.varianceRandomization,
        z: moran.zRandomization,
        permutations: 999,
        atLeast: 0,
        atMost: 999,
        enumerated: false,
        p: 0.002,
        pInterval: [0, 0.0106] as [number, number],
        alternative: "two-sided" as const,
      },
      ebIndex: null,
    },
    reference: {
      mean: moran.expected,
      sd,
      quantiles: [
        { at: 0.025, value: moran.expected - 1.96 * sd },
        { at: 0.5, value: moran.expected },
        { at: 0.975, value: moran.expected + 1.96 * sd },
      ],
      bins: {
        start: moran.expected - 3.2 * sd,
        width: 0.16 * sd,
        counts: Array.from(
          { length: 40 },
          (_, bin) => Math.round((64 + bin * 7 % 9) * Math.exp(-(((bin - 19.5) * 0.16) ** 2) / 2)),
        ),
      },
    },
    local: {
      permutations: 999_999,
      redrawn: 12,
      floor: 2e-6,
      floorDecides: false,
      level: 0.05,
      adjust: "bh" as const,
      tested,
      significant,
      counts,
    },
    rate: null,
  };
}

function neighborsOf({ offsets, indices }: Weights) {
  const degrees = Array.from({ length: offsets.length - 1 }, (_, i) => offsets[i + 1] - offsets[i]);
  const byDegree = new Map<number, number>();
  for (const degree of degrees) byDegree.set(degree, (byDegree.get(degree) ?? 0) + 1);
  const islands = byDegree.get(0) ?? 0;
  return {
    rule: "touching",
    pairs: indices.length / 2,
    links: indices.length,
    islands,
    components: islands + 2,
    meanNeighbors: indices.length / degrees.length,
    minNeighbors: Math.min(...byDegree.keys()),
    maxNeighbors: Math.max(...byDegree.keys()),
    oneWayLinks: 0,
    longestLink: 3148.2,
    density: indices.length / (degrees.length * (degrees.length - 1)),
    neighborCounts: [...byDegree].sort(([a], [b]) => a - b)
      .map(([neighbors, areas]) => ({ neighbors, areas })),
  };
}

/** Rule, weights, family, difference from the main I, p and adjusted p. */
const DEFINITIONS = [
  ["touching", "equal", "contiguity", 0, 0.002, 0.002],
  ["touching upto=2", "equal", "contiguity", -0.09, 0.002, 0.004],
  ["nearest:4", "equal", "nearest", 0.021, 0.002, 0.002],
  ["nearest:5", "equal", "nearest", 0.012, 0.002, 0.002],
  ["nearest:6", "equal", "nearest", -0.004, 0.002, 0.002],
  ["nearest:8", "equal", "nearest", -0.03, 0.002, 0.002],
  ["nearest:10", "equal", "nearest", -0.05, 0.002, 0.004],
  ["nearest:12", "equal", "nearest", -0.065, 0.002, 0.004],
  ["within:2.6km", "equal", "band", 0.03, 0.002, 0.002],
  ["within:3.1km", "equal", "band", -0.01, 0.002, 0.002],
  ["within:4.2km", "equal", "band", -0.07, 0.004, 0.008],
  ["within:5.5km", "equal", "band", -0.11, 0.012, 0.054],
  ["within:6.8km", "equal", "band", -0.14, 0.072, 0.131],
  ["triangulated", "equal", "graph", -0.008, 0.002, 0.002],
  ["gabriel", "equal", "graph", 0.035, 0.002, 0.002],
  ["(touching + nearest:3 either) - within:800m", "equal", "contiguity", 0.02, 0.002, 0.002],
  ["nearest:12", "inverse:1", "weighted", -0.02, 0.002, 0.002],
  ["within:5.5km", "gaussian:k6", "weighted", -0.06, 0.002, 0.004],
] as const;

function sweepOf(areas: AreaResults, moran: MoranI, significant: number): Results["sweep"] {
  const steady = (word: string) => areas.steady!.filter((found) => found === word).length;
  const definitions = DEFINITIONS.map(
    ([rule, weights, family, more, p, pAdjusted], at): DefinitionResult => ({
      rule,
      weights,
      family,
      main: at === 0,
      sameAs: at === 0 ? ["edge"] : [],
      pairs: 1100 + 90 * at,
      islands: family === "band" ? 4 : at === 0 ? 3 : 0,
      components: at === 0 ? 5 : 1,
      meanNeighbors: 5.4 + 0.3 * at,
      value: moran.value + more,
      z: 14 + 20 * more,
      p,
      pAdjusted,
      significantAreas: Math.round(significant * (1 + more)),
      overlap: at === 0 ? 1 : 0.9 - Math.abs(more),
    }),
  );
  const onlyElsewhere = [...areas.class.keys()].filter((row) =>
    areas.class[row] === "no evidence" && areas.steady![row] !== "quiet"
  );
  return {
    permutations: 999,
    localPermutations: 99_999,
    definitions,
    joint: {
      median: 13.2,
      p: 0.002,
      share: 0.94,
      shareP: 0.002,
      direction: "positive",
      smallest: moran.value - 0.14,
      largest: moran.value + 0.035,
    },
    stability: {
      steady: steady("steady"),
      mostly: steady("mostly"),
      fragile: steady("fragile"),
      quiet: steady("quiet"),
      flaggedSteady:
        areas.class.filter((name, row) =>
          name.includes(" among ") && areas.steady![row] === "steady"
        ).length,
      onlyElsewhere,
      flips: [],
    },
  };
}
