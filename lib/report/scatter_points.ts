/**
 * The points of a Moran scatterplot.
 *
 * @module
 */

/** Points of `m` areas with a value. */
export interface ScatterPoints {
  /** Row of each point, ascending. */
  readonly rows: Uint32Array;
  /** Standard score of the area. */
  readonly x: Float64Array;
  /** n/S0 times the spatial lag of the scores, in the same unit. */
  readonly y: Float64Array;
}

/**
 * Points whose least-squares slope is Moran's I with any weights: x is the standard score z, y is n/S0 times its
 * spatial lag, as I = n/S0 · Σ z_i lag_i / Σ z_i². With row-standardized weights and no islands n/S0 is 1 and y the mean
 * of the neighbors (Anselin 1996). Areas without a neighbor have lag 0 and stay in, as they do in I.
 *
 * @param areas z and lag of all rows: z NaN where an area has no value, lag NaN where it has no neighbor.
 * @param s0 Sum of all weights; above 0.
 */
export function scatterPoints(
  areas: { readonly z: Float64Array; readonly lag: Float64Array },
  s0: number,
): ScatterPoints {
  const rows = Uint32Array.from(areas.z.keys().filter((row) => !Number.isNaN(areas.z[row])));
  const scale = rows.length / s0;
  return {
    rows,
    x: Float64Array.from(rows, (row) => areas.z[row]),
    y: Float64Array.from(rows, (row) => Number.isNaN(areas.lag[row]) ? 0 : scale * areas.lag[row]),
  };
}

/** The line fitted to points by least squares. */
export interface FittedLine {
  readonly slope: number;
  readonly intercept: number;
}

/** Fits y = intercept + slope · x by least squares. NaN where x does not vary. */
export function fitLine({ x, y }: Pick<ScatterPoints, "x" | "y">): FittedLine {
  const meanX = mean(x), meanY = mean(y);
  let products = 0, squares = 0;
  for (let i = 0; i < x.length; i++) {
    products += (x[i] - meanX) * (y[i] - meanY);
    squares += (x[i] - meanX) ** 2;
  }
  const slope = squares > 0 ? products / squares : NaN;
  return { slope, intercept: meanY - slope * meanX };
}

/** Least-squares slope of the points: Moran's I. */
export function slopeOf(points: Pick<ScatterPoints, "x" | "y">): number {
  return fitLine(points).slope;
}

function mean(values: Float64Array): number {
  let sum = 0;
  for (const value of values) sum += value;
  return sum / values.length;
}
