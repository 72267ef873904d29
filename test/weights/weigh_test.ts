import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import type { Topology } from "../../lib/neighbors/topology.ts";
import { weigh } from "../../lib/weights/weigh.ts";
import { parseWeightRule } from "../../lib/weights/weight_rule.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { fault } from "../support/fault.ts";
import { rowsOf } from "../support/links.ts";

/**
 * Areas on a line at 0, 1, 3 and 7 m; 0 and 1, 1 and 2, 2 and 3 are neighbors, and 3 counts 0 one
 * way.
 */
const topology: Topology = {
  offsets: Uint32Array.of(0, 1, 3, 5, 7),
  indices: Uint32Array.of(1, 0, 2, 1, 3, 0, 2),
};
const points = Float64Array.of(0, 0, 1, 0, 3, 0, 7, 0);

/** Neighbors and weights of each row. */
const weighed = (weights: Weights) =>
  rowsOf(weights).map((row, i) => [
    row,
    [...weights.values.subarray(weights.offsets[i], weights.offsets[i + 1])],
  ]);

Deno.test("weigh() is equal and row-standardized when nothing is asked", () => {
  const weights = weigh(topology);
  assert.deepEqual([...weights.values], [1, 0.5, 0.5, 0.5, 0.5, 0.5, 0.5]);
  assert.equal(weights.equalInRows, true);
  assert.equal(weights.indices, topology.indices);
});

Deno.test("weigh() falls with distance by inverse powers", () => {
  // Distances of the links: 1 | 1 2 | 2 4 | 7 4.
  const weights = weigh(topology, {
    weights: parseWeightRule("inverse:2"),
    standardize: "none",
    points,
  });
  assert.deepEqual([...weights.values], [1, 1, 1 / 4, 1 / 4, 1 / 16, 1 / 49, 1 / 16]);
  assert.equal(weights.equalInRows, false);
});

Deno.test("weigh() drops links whose weight comes out 0 and rebuilds the rows", () => {
  const weights = weigh(topology, {
    weights: parseWeightRule("triangular:4m"),
    standardize: "none",
    points,
  });
  assert.deepEqual(weighed(weights), [
    [[1], [0.75]],
    [[0, 2], [0.75, 0.5]],
    [[1], [0.5]], // the link to 3 is as long as the bandwidth
    [[], []],
  ]);
});

Deno.test("weigh() drops links whose weight is too small for a number", () => {
  const weights = weigh(topology, { weights: parseWeightRule("gaussian:0.1m"), points });
  // exp(-(7/0.1)²/2) = exp(-2450) and exp(-(4/0.1)²/2) = exp(-800) are 0; exp(-(2/0.1)²/2) is not.
  assert.deepEqual(rowsOf(weights), [[1], [0, 2], [1], []]);
});

Deno.test("weigh() reaches to each area's own bandwidth when it is adaptive", () => {
  // Distance to the 2nd nearest: 3, 2, 3, 6.
  const bandwidths = Float64Array.of(3, 2, 3, 6);
  const weights = weigh(topology, {
    weights: parseWeightRule("triangular:k2"),
    standardize: "none",
    points,
    bandwidths,
  });
  assert.deepEqual(weighed(weights), [
    [[1], [1 - 1 / 3]],
    [[0], [0.5]], // area 2 is the second nearest and sets the bandwidth
    [[1], [1 - 2 / 3]],
    [[2], [1 - 4 / 6]],
  ]);
});

Deno.test("weigh() measures with the distance it is given", () => {
  const weights = weigh(topology, {
    weights: parseWeightRule("inverse:1"),
    standardize: "none",
    distance: (i, j) => 10 * (i + j),
  });
  assert.deepEqual([...weights.values], [10, 10, 30, 30, 50, 30, 50].map((d) => 1 / d));
});

Deno.test("weigh() takes shared boundaries and leaves out pairs that only touch", () => {
  const weights = weigh(topology, {
    weights: parseWeightRule("boundary"),
    boundaryLength: Float64Array.of(4, 4, 0, 0, 6, 2, 6),
  });
  assert.deepEqual(weighed(weights), [[[1], [1]], [[0], [1]], [[3], [1]], [[0, 2], [0.25, 0.75]]]);
});

Deno.test("weigh() gives given weights back bit for bit when nothing is scaled", () => {
  const given = Float64Array.of(0.1, 1 / 3, 5e-324, 1e300, 0.7, 0.2, Math.PI);
  const weights = weigh({ ...topology, given }, {
    weights: parseWeightRule("given"),
    standardize: "none",
  });
  assert.deepEqual(weights.values, given);
});

Deno.test("weigh() knows given weights that are equal in every row", () => {
  const given = Float64Array.of(2, 3, 3, 0.5, 0.5, 1, 1);
  const options = { weights: parseWeightRule("given") };
  assert.equal(weigh({ ...topology, given }, options).equalInRows, true);
  given[2] = 3.5;
  assert.equal(weigh({ ...topology, given }, options).equalInRows, false);
});

Deno.test("weigh() writes into nothing it was given", () => {
  const given = Float64Array.of(2, 0, 3, 0.5, 0.5, 1, 1);
  const copies = [topology.offsets.slice(), topology.indices.slice(), given.slice()];
  weigh({ ...topology, given }, { weights: parseWeightRule("given") });
  assert.deepEqual([topology.offsets, topology.indices, given], copies);
});

Deno.test("weigh() leaves areas without neighbors empty", () => {
  const alone = { offsets: Uint32Array.of(0, 0, 0), indices: new Uint32Array(0) };
  const weights = weigh(alone, { standardize: "variance" });
  assert.deepEqual(weighed(weights), [[[], []], [[], []]]);
  assert.equal(weights.equalInRows, true);
});

function assertUnfit(action: () => void, message: RegExp): void {
  assert.throws(action, fault(UnfitDataError, message));
}

Deno.test("weigh() names the pair when inverse distance meets two areas at one place", () => {
  const together = Float64Array.of(0, 0, 1, 0, 3, 0, 3, 0);
  const options = { weights: parseWeightRule("inverse:1"), points: together };
  assertUnfit(() => weigh(topology, options), /areas 2 and 3 by inverse:1 as they lie at the same/);
  const names = ["Ashe", "Bertie", "Cabarrus", "Dare"];
  assertUnfit(
    () => weigh(topology, { ...options, idOf: (i) => names[i] }),
    /areas Cabarrus and Dare/,
  );
  assertUnfit(
    () =>
      weigh(topology, {
        weights: parseWeightRule("inverse:400"),
        points: points.map((x) => x / 100),
      }),
    /areas 0 and 1 by inverse:400 as 0.01 is too short a distance/,
  );
});

Deno.test("weigh() refuses negative, missing and absent given weights", () => {
  const options = { weights: parseWeightRule("given") };
  for (const bad of [-1, NaN, Infinity]) {
    const given = Float64Array.of(1, 1, 1, 1, bad, 1, 1);
    assertUnfit(
      () => weigh({ ...topology, given }, options),
      new RegExp(`the weight ${bad} given for areas 2 and 3`),
    );
  }
  assertUnfit(() => weigh(topology, options), /came without any/);
});

Deno.test("weigh() names the area when its adaptive bandwidth is 0 or missing", () => {
  const weights = parseWeightRule("gaussian:k1");
  const withReach = (reach: number) =>
    weigh(topology, { weights, points, bandwidths: Float64Array.of(1, 1, reach, 4) });
  assertUnfit(() => withReach(0), /area 2 by gaussian:k1 as its 1 nearest lie at the same/);
  assertUnfit(() => withReach(NaN), /area 2 by gaussian:k1 as it has no 1 others/);
});

Deno.test("weigh() names the pair when one of them has no place", () => {
  const placeless = Float64Array.of(0, 0, 1, 0, NaN, NaN, 7, 0);
  for (const rule of ["gaussian:5m", "inverse:1"]) {
    assertUnfit(
      () => weigh(topology, { weights: parseWeightRule(rule), points: placeless }),
      /areas 1 and 2 by distance as one of them has no place/,
    );
  }
});

Deno.test("weigh() refuses arrays of the wrong length", () => {
  const inverse = parseWeightRule("inverse:1");
  assert.throws(() => weigh(topology, { weights: inverse }), /with no coordinates instead of 8/);
  assert.throws(
    () => weigh(topology, { weights: inverse, points: points.slice(2) }),
    /with 6 coordinates instead of 8/,
  );
  assert.throws(
    () => weigh(topology, { weights: parseWeightRule("boundary") }),
    /with no shared boundary lengths instead of 7/,
  );
  assert.throws(
    () => weigh(topology, { weights: parseWeightRule("gaussian:k2"), points }),
    /with no adaptive bandwidths instead of 4/,
  );
});
