/**
 * The values of the invented indicator, with findings planted where a good tool must see them.
 *
 * @module
 */
import { bell, growth, pick, type Random } from "./chance.ts";

/** What an office knows of one area. */
export interface AreaFigures {
  /** Dwellings in the area: 60 … 60,000, half of the areas between 700 and 6,000. */
  readonly dwellings: number;
  /** Damp dwellings among them; null where not published. */
  readonly damp: number | null;
  /** What the table shows instead: `*` for counts of 1 to 9, `..` where nobody counted. */
  readonly mark: "*" | ".." | null;
}

/** Areas, by number, in which something was planted. */
export interface PlantedAreas {
  /** High areas whose neighbors are high as well, but for the outlier among them. */
  readonly high: readonly number[];
  /** Low areas whose neighbors are low as well, but for the outlier among them. */
  readonly low: readonly number[];
  /** The one high area amid the low ones. */
  readonly highAmongLow: number;
  /** The one low area amid the high ones. */
  readonly lowAmongHigh: number;
}

/** Damp dwellings per 1,000: everywhere, in the two clusters, and at their fading rims. */
const RATES = { usual: 80, high: 170, highRim: 125, low: 28, lowRim: 52 } as const;
/** Steps from its middle to the rim of a cluster. */
const RIM = 3;
/** Areas in which nobody counted. */
const NOT_COUNTED = 9;
/** Areas with a planted value have at least this many dwellings, so that chance cannot hide it. */
const PLANTED_DWELLINGS = 2000;

/** Figures of each area and where the findings are, given the neighbors and the middles of both clusters. */
export function plantFigures(
  neighbors: readonly (readonly number[])[],
  middles: { readonly high: number; readonly low: number },
  random: Random,
): { figures: AreaFigures[]; planted: PlantedAreas } {
  const toHigh = stepsTo(neighbors, middles.high);
  const toLow = stepsTo(neighbors, middles.low);
  const figures = neighbors.map((_, area) => {
    const planted = Math.min(toHigh[area], toLow[area]) <= RIM;
    const dwellings = drawDwellings(planted ? PLANTED_DWELLINGS : 60, random);
    const usual = RATES.usual * (1 + 0.12 * bell(random));
    const rate = plantedRate(toHigh[area], toLow[area]) ?? usual;
    return publish(dwellings, countDamp(dwellings, rate, random));
  });
  const outside = neighbors.keys().filter((a) => Math.min(toHigh[a], toLow[a]) > RIM).toArray();
  for (let left = NOT_COUNTED; left > 0; left--) {
    const [area] = outside.splice(pick(random, outside.length), 1);
    figures[area] = { dwellings: figures[area].dwellings, damp: null, mark: ".." };
  }
  const core = (steps: readonly number[]) =>
    neighbors.keys().filter((a) => steps[a] > 0 && steps[a] < RIM).toArray();
  return {
    figures,
    planted: {
      high: core(toHigh),
      low: core(toLow),
      highAmongLow: middles.low,
      lowAmongHigh: middles.high,
    },
  };
}

/** Rate of an area of a cluster, the outliers in the middles included; null elsewhere. */
function plantedRate(toHigh: number, toLow: number): number | null {
  if (toHigh === 0) return RATES.low;
  if (toLow === 0) return RATES.high;
  if (toHigh <= RIM) return toHigh < RIM ? RATES.high : RATES.highRim;
  if (toLow <= RIM) return toLow < RIM ? RATES.low : RATES.lowRim;
  return null;
}

/** A log-normal number of dwellings with median 2,000 between `least` and 60,000. */
function drawDwellings(least: number, random: Random): number {
  for (;;) {
    const dwellings = Math.round(2000 * growth(1.5 * bell(random)));
    if (dwellings >= least && dwellings <= 60_000) return dwellings;
  }
}

/** A count with the mean and about the spread of a Poisson draw, never more than there are dwellings. */
function countDamp(dwellings: number, rate: number, random: Random): number {
  const mean = dwellings * rate / 1000;
  const count = Math.round(mean + Math.sqrt(mean) * bell(random));
  return Math.min(Math.max(count, 0), dwellings);
}

/** Hides counts of 1 to 9, as offices do to protect the households behind them. */
function publish(dwellings: number, damp: number): AreaFigures {
  const hidden = damp >= 1 && damp <= 9;
  return { dwellings, damp: hidden ? null : damp, mark: hidden ? "*" : null };
}

/** Fewest steps from each area to one area; Infinity where there is no way. */
function stepsTo(neighbors: readonly (readonly number[])[], area: number): number[] {
  const steps = new Array<number>(neighbors.length).fill(Infinity);
  steps[area] = 0;
  const queue = [area];
  for (const at of queue) {
    for (const next of neighbors[at]) {
      if (steps[next] === Infinity) steps[next] = steps[at] + 1, queue.push(next);
    }
  }
  return steps;
}
