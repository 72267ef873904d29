/** Data without an answer: every statistic refuses them, and none gives a plausible number. */
import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { bivariateMoranI } from "../../lib/statistics/bivariate_moran.ts";
import { correlogram } from "../../lib/statistics/correlogram.ts";
import { gearyC } from "../../lib/statistics/geary.ts";
import { getisOrdG } from "../../lib/statistics/getis_ord_g.ts";
import { gi, giStar } from "../../lib/statistics/gi.ts";
import { leastSquares } from "../../lib/statistics/least_squares.ts";
import { leeL } from "../../lib/statistics/lee.ts";
import { localBivariateMoran } from "../../lib/statistics/local_bivariate_moran.ts";
import { localGeary } from "../../lib/statistics/local_geary.ts";
import { localMoran } from "../../lib/statistics/local_moran.ts";
import { moranI } from "../../lib/statistics/moran.ts";
import { residualMoranI } from "../../lib/statistics/residual_moran.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { referenceCase, weightsOfMatrix } from "../support/reference.ts";

type Statistic = (values: Float64Array, weights: Weights) => unknown;

const GLOBAL: Record<string, Statistic> = {
  moranI,
  gearyC,
  getisOrdG,
  bivariateMoranI: (values, weights) => bivariateMoranI(values, values, weights),
  leeL: (values, weights) => leeL(values, values, weights),
  residualMoranI: (values, weights) => residualMoranI(leastSquares(values, []), weights),
};

const LOCAL: Record<string, Statistic> = {
  localMoran,
  localGeary,
  gi,
  giStar,
  localBivariateMoran: (values, weights) => localBivariateMoran(values, values, weights),
  correlogram: (values, weights) => correlogram(values, [weights]),
};

// Source: degenerate-open.json, common practice for refusals.
const CASES = new Map<string, { x: (number | null)[]; edges: [number, number][] }>(
  referenceCase("degenerate-open").inputs.cases.map((each: { id: string }) => [each.id, each]),
);

function apply(statistic: Statistic, id: string): unknown {
  const { x, edges } = CASES.get(id)!;
  const matrix = x.map(() => new Array<number>(x.length).fill(0));
  for (const [i, j] of edges) matrix[i][j] = matrix[j][i] = 1;
  return statistic(Float64Array.from(x, (value) => value ?? NaN), weightsOfMatrix(matrix));
}

for (const [name, statistic] of Object.entries({ ...GLOBAL, ...LOCAL })) {
  Deno.test(`${name}() refuses values that are constant, missing or a single one`, () => {
    for (const id of ["constant", "nan", "n1"]) {
      assert.throws(() => apply(statistic, id), UnfitDataError, id);
    }
  });
}

for (const [name, statistic] of Object.entries(GLOBAL)) {
  Deno.test(`${name}() refuses a map without links`, () => {
    assert.throws(() => apply(statistic, "no_links"), UnfitDataError);
  });
}

Deno.test("local statistics have no value anywhere when a map has no links", () => {
  assert.deepEqual(apply(gi, "no_links"), new Float64Array(4).fill(NaN));
  assert.deepEqual(apply(giStar, "no_links"), new Float64Array(4).fill(NaN));
  const { c, expected, variance } = apply(localGeary, "no_links") as ReturnType<typeof localGeary>;
  for (const column of [c, expected, variance]) assert.ok(column.every(Number.isNaN));
  assert.deepEqual(apply((values, weights) => correlogram(values, [weights]), "no_links"), [
    { pairs: 0, moranI: null },
  ]);
});
