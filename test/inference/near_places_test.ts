import assert from "node:assert/strict";
import { nearPlaces, putInPlace } from "../../lib/inference/near_places.ts";
import { pairLinks, quadraticForm } from "../../lib/inference/pair_links.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { assertClose } from "../support/close.ts";
import { gridWeights, normalNumbers, randomNumbers, unequalWeights } from "../support/maps.ts";
import { weightsOfMatrix } from "../support/reference.ts";

/** The same map with its areas numbered at random. */
function scattered(weights: Weights): Weights {
  const n = weights.offsets.length - 1, draws = randomNumbers(n, "scattered");
  const order = Uint32Array.from(draws.keys()).sort((a, b) => draws[a] - draws[b]);
  const number = new Uint32Array(n);
  order.forEach((area, i) => number[area] = i);
  const rows = Array.from(order, (area) => {
    const links = Array.from(
      { length: weights.offsets[area + 1] - weights.offsets[area] },
      (_, m) => weights.offsets[area] + m,
    );
    return links.map((e) => [number[weights.indices[e]], weights.values[e]])
      .sort(([a], [b]) => a - b);
  });
  const offsets = new Uint32Array(n + 1);
  rows.forEach((row, i) => offsets[i + 1] = offsets[i] + row.length);
  return {
    offsets,
    indices: Uint32Array.from(rows.flat(), ([other]) => other),
    values: Float64Array.from(rows.flat(), ([, weight]) => weight),
    equalInRows: weights.equalInRows,
  };
}

Deno.test("nearPlaces() brings the neighbors of a map numbered at random together and leaves others alone", () => {
  const grid = gridWeights(200, 200);
  assert.equal(nearPlaces(grid), null);
  const map = scattered(grid), places = nearPlaces(map)!;
  assert.deepEqual([...places].sort((a, b) => a - b), [...Array(40_000).keys()]);
  const { offsets, indices } = pairLinks(map, places);
  let reach = 0;
  for (let i = 0; i < 40_000; i++) {
    for (let e = offsets[i]; e < offsets[i + 1]; e++) reach += indices[e] - i;
  }
  // A walk comes to the cells along diagonals, which are 200 long; at random cells lie 13,333 apart.
  assert.ok(reach / indices.length < 400, `${reach / indices.length}`);
});

Deno.test("nearPlaces() has a place for every area when links go one way and parts are apart", () => {
  const matrix = [[0, 0, 0, 0, 1], [0, 0, 0, 0, 0], [1, 0, 0, 0, 0], [0, 0, 0, 0, 0], [
    0,
    0,
    0,
    1,
    0,
  ]];
  // From 0 to 4 and on to 3; then 1, and 2, to which no link leads.
  assert.deepEqual([...nearPlaces(weightsOfMatrix(matrix), 0)!], [0, 3, 4, 2, 1]);
});

Deno.test("pairLinks() keeps the quadratic form when areas lie in other places", () => {
  const map = unequalWeights(scattered(gridWeights(12, 12, { corners: true })), "moved");
  const z = normalNumbers(144, "moved"), places = nearPlaces(map, 0)!;
  const moved = pairLinks(map, places);
  assertClose(quadraticForm(moved, z), quadraticForm(pairLinks(map), z), 1e-12);
  for (let i = 0; i < 144; i++) {
    const row = moved.indices.subarray(moved.offsets[i], moved.offsets[i + 1]);
    row.forEach((j, m) => assert.ok(j > (m === 0 ? i : row[m - 1])));
  }
  assert.equal(putInPlace(z, places)[places[17]], z[17]);
  assert.equal(putInPlace(z, null), z);
});
