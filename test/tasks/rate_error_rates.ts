/**
 * How often a permutation test finds a pattern where there is none: raw rates against standardized ones.
 *
 * On every map all persons run the same risk, so that a test at level 0.05 should reject on 5 % of them. Prints the table
 * of the README; takes about a minute.
 *
 * @module
 */
import { constantRiskMaps } from "../../lib/inference/constant_risk_maps.ts";
import { twoSidedP } from "../../lib/inference/p_value.ts";
import { permuteMoran } from "../../lib/inference/permute_global.ts";
import { seedFromText } from "../../lib/inference/seed.ts";
import { shuffleInto } from "../../lib/inference/shuffle.ts";
import { openStream } from "../../lib/inference/stream.ts";
import { rawRates } from "../../lib/prepare/rate_moments.ts";
import { standardizedRates } from "../../lib/prepare/standardized_rates.ts";
import { gridWeights } from "../support/maps.ts";

const SIDE = 20, MAPS = 2000, PERMUTATIONS = 199, LEVEL = 0.05, RISK = 0.01;
const seed = seedFromText("rate error rates");
const weights = gridWeights(SIDE, SIDE);

/** Populations from 50 to `largest`, equal steps of their logarithm, the largest first. */
function sizes(largest: number): Float64Array {
  const n = SIDE * SIDE;
  return Float64Array.from(
    { length: n },
    (_, rank) => Math.round(50 * (largest / 50) ** (1 - rank / (n - 1))),
  );
}

/** Populations that fall from the middle of the map to its rim, as around a town. */
function aroundTown(sorted: Float64Array): Float64Array {
  const middle = (SIDE - 1) / 2;
  const distance = (area: number) =>
    Math.hypot(area % SIDE - middle, Math.floor(area / SIDE) - middle);
  const placed = new Float64Array(sorted.length);
  [...sorted.keys()].sort((a, b) => distance(a) - distance(b)).forEach((area, rank) =>
    placed[area] = sorted[rank]
  );
  return placed;
}

function anywhere(sorted: Float64Array): Float64Array {
  const placed = sorted.slice();
  shuffleInto(placed, sorted, openStream(seed, "permutation", 0));
  return placed;
}

/** Shares of maps on which each kind of rate is called patterned. */
async function rejections(population: Float64Array): Promise<{ raw: number; standard: number }> {
  const total = Math.round(RISK * population.reduce((sum, size) => sum + size, 0));
  const cases = new Float64Array(population.length);
  cases[0] = total;
  const streams = Array.from({ length: MAPS }, (_, m) => openStream(seed, "simulatedMap", m));
  let raw = 0, standard = 0;
  for (const map of constantRiskMaps({ cases, population }, streams)) {
    const counts = { cases: map, population };
    if (await isRejected(rawRates(counts))) raw++;
    if (await isRejected(standardizedRates(counts))) standard++;
  }
  return { raw: raw / MAPS, standard: standard / MAPS };
}

async function isRejected(values: Float64Array): Promise<boolean> {
  const options = { permutations: PERMUTATIONS, workers: 1 };
  const [reference] = await permuteMoran(values, [weights], options);
  return twoSidedP(reference) <= LEVEL;
}

const PLACED = [["anywhere", anywhere], ["falling around a town", aroundTown]] as const;
const percent = (share: number) => `${(100 * share).toFixed(1)} %`;

console.log("| populations | placed | raw rates | standardized rates |\n| --- | --- | --- | --- |");
await printRow("all 50 |", sizes(50));
for (const largest of [500, 5000, 50_000]) {
  for (const [how, place] of PLACED) {
    await printRow(`50 to ${largest.toLocaleString("en-US")} | ${how}`, place(sizes(largest)));
  }
}

async function printRow(title: string, population: Float64Array): Promise<void> {
  const { raw, standard } = await rejections(population);
  console.log(`| ${title} | ${percent(raw)} | ${percent(standard)} |`);
}
