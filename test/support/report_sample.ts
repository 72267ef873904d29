/**
 * What a run on an invented region might have found, for the report: real statistics on made-up values, with p
 * from the normal approximation instead of permutations, and a made-up sweep.
 *
 * @module
 */
import { bell, stream } from "../../lib/demo/chance.ts";
import { noiseField } from "../../lib/demo/noise_field.ts";
import { adjustP } from "../../lib/inference/adjust.ts";
import type { Topology } from "../../lib/neighbors/topology.ts";
import { representativePoints } from "../../lib/project/points.ts";
import { localMoran } from "../../lib/statistics/local_moran.ts";
import { moranI } from "../../lib/statistics/moran.ts";
import { CAUTIONS } from "../../lib/sweep/cautions.ts";
import { weightSums } from "../../lib/weights/sums.ts";
import { weigh } from "../../lib/weights/weigh.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import type { AreaClass, AreaResults, Results, Steadiness } from "../../lib/write/results.ts";
import type { ReportInput } from "../../lib/report/report_input.ts";
import { type HexOptions, hexRegion } from "./hex_region.ts";
import { sampleResults } from "./sample_results.ts";

/** A CRS for the sample; any projected one does. */
const UTM = {
  name: "ETRS89 / UTM zone 29N",
  code: "EPSG:25829",
  wkt: "+proj=utm +zone=29 +ellps=GRS80 +units=m +no_defs",
  geographic: false,
};

const CLASS_OF = {
  HH: "high among high",
  LL: "low among low",
  HL: "high among low",
  LH: "low among high",
} as const;

/** Shares of rows without a published value, and the reasons given. */
const HIDDEN = 0.03;
const LEVEL = 0.05;

/** A region with a coast and islands: about 400 areas. */
export const ISLANDS: HexOptions = { columns: 26, rows: 30, size: 2400, isLand: hasLand };

/** Report input of a region, a coast with islands by default. */
export function reportSample(options: HexOptions = ISLANDS): ReportInput {
  const { geometry, topology, places } = hexRegion(options);
  const random = stream("report sample");
  const hills = noiseField(random, 3, 3);
  const values = Float64Array.from(places, ([u, v]) => 62 + 45 * hills(u, v) + 7 * bell(random));
  plantOutliers(values, topology);
  const leftOut = places.map(() => random() < HIDDEN ? "no value (suppressed)" : null);
  const used = Uint32Array.from([...leftOut.keys()].filter((row) => leftOut[row] === null));
  const weights = restrict(weigh(topology), used);
  const areas = testedAreas(values, leftOut, { used, weights });
  const links = linksOf(weights).map(([from, to]) => [used[from], used[to]]);
  return {
    results: sampleResults(areas, {
      moran: moranI(Float64Array.from(used, (row) => values[row]), weights),
      weights,
    }),
    areas,
    geometry,
    crs: UTM,
    links: {
      from: Uint32Array.from(links, ([from]) => from),
      to: Uint32Array.from(links, ([, to]) => to),
      places: representativePoints(geometry),
    },
    s0: weightSums(weights).s0,
    labels: places.map((_, row) => `Area ${String(17 + 3 * row).padStart(4, "0")}`),
    cautions: CAUTIONS,
  };
}

/** Both ends of each link. */
function linksOf({ offsets, indices }: Weights): [number, number][] {
  const links: [number, number][] = [];
  for (let from = 0; from + 1 < offsets.length; from++) {
    for (let link = offsets[from]; link < offsets[from + 1]; link++) {
      links.push([from, indices[link]]);
    }
  }
  return links;
}

/** The same findings with other results. */
export function withResults(
  input: ReportInput,
  change: (results: Results) => Results,
): ReportInput {
  return { ...input, results: change(input.results) };
}

/** Turns the middle of the highest and of the lowest neighborhoods over. */
function plantOutliers(values: Float64Array, { offsets, indices }: Topology): void {
  const means = values.map((_, row) => {
    const own = indices.subarray(offsets[row], offsets[row + 1]);
    return own.length < 5 ? 62 : own.reduce((sum, other) => sum + values[other], 0) / own.length;
  });
  const order = [...means.keys()].sort((a, b) => means[a] - means[b]);
  for (const row of [order[0], order[7]]) values[row] = 98;
  for (const row of [order[order.length - 1], order[order.length - 8]]) values[row] = 22;
}

/** A mainland with a ragged coast and a few islands off it. */
function hasLand(u: number, v: number): boolean {
  const coast = 0.05 * Math.sin(23 * u + 9 * v) + 0.04 * Math.sin(31 * v - 7 * u);
  const mainland = ((u - 0.52) / 0.4) ** 2 + ((v - 0.55) / 0.42) ** 2 < 1 + 4 * coast;
  const islands = [[0.06, 0.12, 0.035], [0.1, 0.21, 0.02], [0.93, 0.1, 0.06], [0.06, 0.88, 0.025]];
  return mainland || islands.some(([x, y, r]) => (u - x) ** 2 + (v - y) ** 2 < r * r);
}

/** Rows of a topology that are used, row-standardized. */
function restrict({ offsets, indices }: Weights, used: Uint32Array): Weights {
  const position = new Map([...used].map((row, at) => [row, at]));
  const lists = [...used].map((row) =>
    [...indices.subarray(offsets[row], offsets[row + 1])]
      .map((other) => position.get(other)).filter((at) => at !== undefined)
  );
  const starts = [0];
  for (const list of lists) starts.push(starts[starts.length - 1] + list.length);
  return {
    offsets: Uint32Array.from(starts),
    indices: Uint32Array.from(lists.flat()),
    values: Float64Array.from(lists.flatMap((list) => list.map(() => 1 / list.length))),
    equalInRows: true,
  };
}

function testedAreas(
  values: Float64Array,
  leftOut: readonly (string | null)[],
  { used, weights }: { readonly used: Uint32Array; readonly weights: Weights },
): AreaResults {
  const local = localMoran(Float64Array.from(used, (row) => values[row]), weights);
  const p = local.i.map((value, at) =>
    twoSided((value - local.expected[at]) / Math.sqrt(local.variance[at]))
  );
  const q = adjustP(p, "bh");
  const sig = q.map((value) => value <= LEVEL ? 1 : 0);
  const agree = q.map((value, at) => agreement(value, at));
  const spread = (found: Float64Array) => {
    const all = new Float64Array(values.length).fill(NaN);
    used.forEach((row, at) => all[row] = found[at]);
    return all;
  };
  const spreadTexts = <T>(found: (at: number) => T, fill: T) => {
    const all = new Array<T>(values.length).fill(fill);
    used.forEach((row, at) => all[row] = found(at));
    return all;
  };
  return {
    prefix: "damp_rate",
    leftOut,
    value: values.map((value, row) => leftOut[row] === null ? value : NaN),
    z: spread(local.z),
    lag: spread(local.lag),
    i: spread(local.i),
    p: spread(p),
    q: spread(q),
    quad: spreadTexts((at) => local.quad[at], null),
    class: spreadTexts<AreaClass>((at) => {
      if (Number.isNaN(p[at])) return "alone";
      const quad = local.quad[at];
      return sig[at] && quad ? CLASS_OF[quad] : "no evidence";
    }, "no value"),
    sig: spreadTexts<boolean | null>((at) => Number.isNaN(p[at]) ? null : sig[at] === 1, null),
    agree: spread(agree),
    steady: spreadTexts<Steadiness | null>((at) => {
      if (Number.isNaN(p[at])) return null;
      if (q[at] > 0.15) return "quiet";
      return agree[at] >= 0.8 ? "steady" : agree[at] >= 0.5 ? "mostly" : "fragile";
    }, null),
    rates: null,
  };
}

/** Made up: areas far from the level agree, those near it do not. */
function agreement(q: number, at: number): number {
  const distance = Math.abs(Math.log10(Math.max(q, 1e-5) / LEVEL));
  const share = Math.min(1, 0.35 + 0.5 * distance + 0.03 * (at % 7));
  return Math.round(18 * share) / 18;
}

/** Two-sided p of a standard score as 999,999 permutations would give it, by an approximation of the normal tail. */
function twoSided(score: number): number {
  const x = Math.abs(score) / Math.SQRT2;
  const t = 1 / (1 + 0.3275911 * x);
  const tail = t * Math.exp(-x * x) *
    (0.254829592 + t * (-0.284496736 + t * (1.421413741 + t * (-1.453152027 + t * 1.061405429))));
  return Number.isNaN(score) ? NaN : Math.max(2, Math.round(tail * 1e6)) / 1e6;
}
