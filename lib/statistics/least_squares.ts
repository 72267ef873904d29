/**
 * Ordinary least squares: what other fields explain of a value, and what is left.
 *
 * @module
 */
import { Matrix, SingularValueDecomposition } from "ml-matrix";
import { UnfitDataError } from "../layer/errors.ts";
import { compensatedSum } from "../weights/compensated_sum.ts";
import { dot } from "./dot.ts";

/** A field that explains: one finite number for each area. */
export interface Predictor {
  /** What errors and the regression table call it. */
  readonly name: string;
  /** Length n, in any unit. */
  readonly values: Float64Array;
}

/** One line of the regression table. */
export interface Coefficient {
  /** Name of the field, or null for the constant. */
  readonly name: string | null;
  /** Change of the value for one more unit of the field, the others equal. */
  readonly value: number;
  /** Standard error. */
  readonly error: number;
}

/** A fitted regression. */
export interface LeastSquares {
  /** The constant first, then the predictors in their order. */
  readonly coefficients: readonly Coefficient[];
  /** Value minus what the fields explain, length n, sum 0. */
  readonly residuals: Float64Array;
  /** What the fields explain, length n. */
  readonly fitted: Float64Array;
  /** Σe² / (n - k), k coefficients. */
  readonly residualVariance: number;
  /** Share of the variance explained, 0 to 1. */
  readonly rSquared: number;
  /**
   * Columns of length n, at right angles and of length 1, that span the constant and the predictors: what
   * a refit of permuted residuals and the moments of their Moran's I need.
   */
  readonly basis: readonly Float64Array[];
}

/**
 * Fits value = b0 + Σ b_j x_j by ordinary least squares, through the singular value decomposition of the
 * centered and scaled predictors (package `ml-matrix`), which keeps its digits where normal equations lose
 * half of them. No predictors: the mean. Cost: n times the square of the number of predictors.
 *
 * @param values One finite number for each area.
 * @throws UnfitDataError naming the fields: for a predictor that is constant or not finite, for
 * predictors of which one follows from the others, for values all equal, and for too few areas (it takes 2
 * more than predictors).
 * @throws RangeError when lengths differ.
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const fit = leastSquares(Float64Array.of(1, 3, 2, 4), [
 *   { name: "age", values: Float64Array.of(0, 1, 2, 3) },
 * ]);
 * // Slope: Σ(x - 1.5)(y - 2.5) / Σ(x - 1.5)² = 4 / 5; the line meets the means at (1.5, 2.5).
 * assert.ok(Math.abs(fit.coefficients[1].value - 0.8) < 1e-14);
 * assert.ok(Math.abs(fit.coefficients[0].value - 1.3) < 1e-14);
 * assert.ok(Math.abs(fit.rSquared - 0.64) < 1e-14);
 * ```
 */
export function leastSquares(
  values: Float64Array,
  predictors: readonly Predictor[],
): LeastSquares {
  const n = values.length;
  checkSize(n, predictors);
  const y = centerAndScale(values, "the value");
  const columns = predictors.map(({ name, values }) => centerAndScale(values, `"${name}"`));
  const parts = decompose(columns, predictors);
  const scores = parts.directions.map((direction) => dot(direction, y.scaled));
  const residuals = residualsOf(y, parts.directions, scores);
  const residualVariance = dot(residuals, residuals) / (n - predictors.length - 1);
  const names = predictors.map(({ name }) => name);
  return {
    coefficients: coefficientsOf(names, columns, parts, { y, scores, residualVariance }),
    residuals,
    fitted: values.map((value, i) => value - residuals[i]),
    residualVariance,
    rSquared: sumOfSquares(scores) / n,
    basis: [new Float64Array(n).fill(1 / Math.sqrt(n)), ...parts.directions],
  };
}

function checkSize(n: number, predictors: readonly Predictor[]): void {
  const odd = predictors.find(({ values }) => values.length !== n);
  if (odd) {
    throw new RangeError(
      `Cannot explain ${n} values by ${odd.values.length} numbers of "${odd.name}"`,
    );
  }
  if (n >= predictors.length + 2) return;
  throw new UnfitDataError(
    `Cannot explain ${n} values by ${predictors.length} fields as it takes at least ` +
      `${predictors.length + 2} areas; leave out fields`,
  );
}

/** A column around 0 with squares summing to n, and the units to go back. */
interface Scaled {
  readonly scaled: Float64Array;
  readonly mean: number;
  readonly sd: number;
}

function centerAndScale(values: Float64Array, what: string): Scaled {
  const at = values.findIndex((value) => !Number.isFinite(value));
  if (at >= 0) {
    throw new UnfitDataError(
      `Cannot fit a regression as ${what} is ${
        values[at]
      } in area ${at}; leave such areas out first`,
    );
  }
  const n = values.length;
  const mean = compensatedSum(values) / n;
  const centered = values.map((value) => value - mean);
  const sd = Math.sqrt(sumOfSquares(centered) / n);
  if (!(sd > 4 * Number.EPSILON * Math.abs(mean))) {
    throw new UnfitDataError(
      `Cannot fit a regression as ${what} is ${
        values[0]
      } in all ${n} areas; choose a field that varies`,
    );
  }
  return { scaled: centered.map((each) => each / sd), mean, sd };
}

interface Decomposition {
  /** Columns of length n at right angles, as many as predictors. */
  readonly directions: Float64Array[];
  /** Singular values. */
  readonly lengths: number[];
  /** turns[j][k]: share of predictor j in direction k. */
  readonly turns: number[][];
}

/** Predictors whose smallest singular value is below this share of the largest follow from one another. */
const RANK_TOLERANCE = 1e-9;

function decompose(columns: readonly Scaled[], predictors: readonly Predictor[]): Decomposition {
  if (columns.length === 0) return { directions: [], lengths: [], turns: [] };
  const transposed = new Matrix(columns.map(({ scaled }) => Array.from(scaled)));
  const parts = new SingularValueDecomposition(transposed.transpose());
  const lengths = parts.diagonal;
  const turns = parts.rightSingularVectors.to2DArray();
  const last = lengths.length - 1;
  if (lengths[last] <= RANK_TOLERANCE * lengths[0]) {
    const involved = predictors.filter((_, j) => Math.abs(turns[j][last]) > 1e-6);
    throw new UnfitDataError(
      `Cannot fit a regression as ${involved.map(({ name }) => `"${name}"`).join(", ")} ` +
        "follow exactly from one another; leave one of them out",
    );
  }
  const left = parts.leftSingularVectors;
  return {
    directions: lengths.map((_, k) => Float64Array.from(left.getColumn(k))),
    lengths,
    turns,
  };
}

/** What is left of the value when its share in every direction is taken away, in the value's own unit. */
function residualsOf(
  y: Scaled,
  directions: readonly Float64Array[],
  scores: readonly number[],
): Float64Array {
  return y.scaled.map((score, i) => {
    let left = score;
    for (let k = 0; k < directions.length; k++) left -= scores[k] * directions[k][i];
    return y.sd * left;
  });
}

/** The regression table in the units of the fields, from the fit in directions at right angles. */
function coefficientsOf(
  names: readonly string[],
  columns: readonly Scaled[],
  { lengths, turns }: Decomposition,
  fit: { y: Scaled; scores: readonly number[]; residualVariance: number },
): Coefficient[] {
  // loadings[j][k]: what a score of 1 in direction k adds to the slope of predictor j.
  const loadings = columns.map(({ sd }, j) =>
    lengths.map((length, k) => turns[j][k] / (length * sd))
  );
  const slopes = loadings.map((loading) =>
    fit.y.sd * compensatedSum(loading.map((each, k) => each * fit.scores[k]))
  );
  const atMeans = lengths.map((_, k) =>
    compensatedSum(columns.map(({ mean }, j) => mean * loadings[j][k]))
  );
  const errorOf = (variance: number) => Math.sqrt(fit.residualVariance * variance);
  const constant = {
    name: null,
    value: fit.y.mean - compensatedSum(slopes.map((slope, j) => slope * columns[j].mean)),
    error: errorOf(1 / fit.y.scaled.length + sumOfSquares(atMeans)),
  };
  return [
    constant,
    ...names.map((name, j) => ({
      name,
      value: slopes[j],
      error: errorOf(sumOfSquares(loadings[j])),
    })),
  ];
}

function sumOfSquares(values: ArrayLike<number>): number {
  return compensatedSum(Array.from(values, (value) => value * value));
}
