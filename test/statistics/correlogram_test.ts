import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { stepsApart } from "../../lib/neighbors/steps.ts";
import type { Topology } from "../../lib/neighbors/topology.ts";
import { correlogram } from "../../lib/statistics/correlogram.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { assertClose } from "../support/close.ts";
import { chainWeights } from "../support/maps.ts";
import { ncVariables } from "../support/nc_variables.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { referenceCase, weightsOfMatrix } from "../support/reference.ts";

/** Weights of 1 between areas exactly `order` steps apart. */
function orderOf(links: Topology, order: number): Weights {
  const { offsets, indices } = stepsApart(links, order, order);
  return { offsets, indices, values: new Float64Array(indices.length).fill(1), equalInRows: true };
}

Deno.test("correlogram() has the values worked by hand when four areas stand in a row", () => {
  // Values 1 2 4 5, deviations -2 -1 1 2, Σ = 10; I of each order is the mean product of its pairs over 2.5.
  const chain = chainWeights(4);
  const steps = correlogram(
    Float64Array.of(1, 2, 4, 5),
    [1, 2, 3, 4].map((order) => orderOf(chain, order)),
  );
  assert.deepEqual(steps.map(({ pairs }) => pairs), [3, 2, 1, 0]);
  assertClose(steps[0].moranI!.value, (2 - 1 + 2) / 3 / 2.5, 1e-14);
  assertClose(steps[1].moranI!.value, (-2 - 2) / 2 / 2.5, 1e-14);
  assertClose(steps[2].moranI!.value, -4 / 2.5, 1e-14);
  assert.equal(steps[3].moranI, null); // nobody is four steps apart
});

// Source: correlogram-nc.json, computed with numpy and scipy: non-white share by order of contiguity.
Deno.test("correlogram() has the values of dense matrices when orders of contiguity rise", () => {
  const queen = ncWeights("queen_unscaled");
  const { expected } = referenceCase("correlogram-nc");
  const bands = expected.map(({ order }: { order: number }) => orderOf(queen, order));
  correlogram(ncVariables("74").nw74, bands).forEach(({ pairs, moranI }, at) => {
    assert.equal(pairs, expected[at].pairs);
    assertClose(moranI!.value, expected[at].I, 1e-9);
    assertClose(moranI!.zRandomization, expected[at].z, 1e-9);
  });
});

Deno.test("correlogram() counts a pair once whether it is linked one way or both ways", () => {
  const oneWay = weightsOfMatrix([[0, 1, 0], [0, 0, 1], [0, 1, 0]]);
  assert.equal(correlogram(Float64Array.of(1, 2, 4), [oneWay])[0].pairs, 2);
});

Deno.test("correlogram() refuses constant values even without a band, and bands of other areas", () => {
  assert.throws(() => correlogram(Float64Array.of(1, 1, 1), []), UnfitDataError);
  assert.throws(() => correlogram(Float64Array.of(1, 2, 4), [chainWeights(4)]), RangeError);
});
