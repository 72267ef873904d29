import assert from "node:assert/strict";
import { restrict } from "../../lib/neighbors/restrict.ts";
import { isLinked } from "../../lib/neighbors/topology.ts";
import { randomNumbers } from "../support/maps.ts";
import {
  everyone,
  randomTopology,
  rowsOf,
  topologyOfRows,
  topologyWhere,
} from "../support/links.ts";

Deno.test("restrict() takes areas and their links out and numbers the others anew", () => {
  // A chain 0 - 1 - 2 - 3 without area 1: 0 is alone, 2 and 3 become 1 and 2.
  const chain = topologyOfRows([[1], [0, 2], [1, 3], [2]]);
  assert.deepEqual(rowsOf(restrict(chain, Uint8Array.from([1, 0, 1, 1]))), [[], [2], [1]]);
});

Deno.test("restrict() gives the same record back when everybody is usable", () => {
  const topology = randomTopology(10, 0.3, "all");
  assert.equal(restrict(topology, everyone(10)), topology);
});

Deno.test("restrict() agrees with asking for each usable pair", () => {
  const topology = randomTopology(60, 0.1, "some");
  const usable = Uint8Array.from(randomNumbers(60, "mask"), (u) => u < 0.6 ? 1 : 0);
  const places = [...usable.keys()].filter((i) => usable[i] === 1);
  assert.deepEqual(
    restrict(topology, usable),
    topologyWhere(places.length, (i, j) => isLinked(topology, places[i], places[j])),
  );
});

Deno.test("restrict() keeps the weights of the links that stay", () => {
  const given = Float64Array.from([1, 2, 3, 4]);
  const topology = { ...topologyOfRows([[1, 2], [2], [0]]), given };
  assert.deepEqual(restrict(topology, Uint8Array.from([1, 0, 1])).given, Float64Array.from([2, 4]));
});
