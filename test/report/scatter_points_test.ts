import assert from "node:assert/strict";
import { fitLine, scatterPoints, slopeOf } from "../../lib/report/scatter_points.ts";
import { localMoran } from "../../lib/statistics/local_moran.ts";
import { moranI } from "../../lib/statistics/moran.ts";
import { weightSums } from "../../lib/weights/sums.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { assertClose } from "../support/close.ts";
import { chainWeights, normalNumbers, unequalWeights } from "../support/maps.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { numberColumn, referenceCase, weightsOfMatrix } from "../support/reference.ts";

function pointsOf(values: Float64Array, weights: Weights) {
  return scatterPoints(localMoran(values, weights), weightSums(weights).s0);
}

function share(part: string, whole: string, per = 1): Float64Array {
  const births = numberColumn("nc.csv", whole);
  return numberColumn("nc.csv", part).map((count, i) => per * count / births[i]);
}

// Source: moran-scatter-slope.json (scipy.stats.linregress 1.17.1); I by Anselin's identity.
Deno.test("slopeOf() is Moran's I with row-standardized weights", () => {
  const { I, slope } = referenceCase("moran-scatter-slope").expected;
  const found = slopeOf(pointsOf(share("NWBIR74", "BIR74"), ncWeights("queen_row")));
  assertClose(found, I);
  assertClose(found, slope);
});

// Source: moran-scatter-slope-islands.json (scipy.stats.linregress 1.17.1): I = slope of the lag × 100/98.
Deno.test("slopeOf() is Moran's I where areas have no neighbor", () => {
  const { I, S0, n, slope_dev } = referenceCase("moran-scatter-slope-islands").expected;
  const weights = ncWeights("cressie_chan_row");
  const points = pointsOf(share("SID74", "BIR74", 1000), weights);
  assertClose(weightSums(weights).s0, S0);
  assert.equal(points.rows.length, n);
  assertClose(slopeOf(points), I);
  assertClose(slopeOf(points) * S0 / n, slope_dev);
});

Deno.test("slopeOf() is Moran's I with unscaled and unequal weights", () => {
  const values = normalNumbers(60, "scatter");
  for (const weights of [chainWeights(60), unequalWeights(chainWeights(60), "scatter")]) {
    assertClose(slopeOf(pointsOf(values, weights)), moranI(values, weights).value);
  }
});

// Values 1, 2, 3 and an island 6: mean 3, population variance (4 + 1 + 0 + 9)/4 = 3.5, sd s.
// z = (-2, -1, 0, 3)/s. Chain weights of 1: lags (-1, -2, -1, 0)/s, S0 = 4, n/S0 = 1.
// Slope = Σ z·lag / Σ z² = (2 + 2 + 0 + 0)/14 = 2/7.
Deno.test("scatterPoints() keeps an island at height 0", () => {
  const weights = weightsOfMatrix([[0, 1, 0, 0], [1, 0, 1, 0], [0, 1, 0, 0], [0, 0, 0, 0]]);
  const points = pointsOf(Float64Array.of(1, 2, 3, 6), weights);
  assert.equal(points.y[3], 0);
  assertClose(points.x[3], 3 / Math.sqrt(3.5));
  assertClose(slopeOf(points), 2 / 7);
});

Deno.test("scatterPoints() leaves out rows without a value", () => {
  const points = scatterPoints({
    z: Float64Array.of(1, NaN, -1),
    lag: Float64Array.of(0.5, NaN, NaN),
  }, 1);
  assert.deepEqual([...points.rows], [0, 2]);
  assert.deepEqual([...points.x], [1, -1]);
  assert.deepEqual([...points.y], [1, 0]); // n/S0 = 2
});

Deno.test("fitLine() finds the line through points on it, and none through equal ones", () => {
  const line = fitLine({ x: Float64Array.of(0, 1, 4), y: Float64Array.of(2, 1.5, 0) });
  assertClose(line.slope, -0.5);
  assertClose(line.intercept, 2);
  assert.ok(Number.isNaN(slopeOf({ x: Float64Array.of(1, 1), y: Float64Array.of(0, 1) })));
});
