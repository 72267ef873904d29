import assert from "node:assert/strict";
import {
  difference,
  either,
  intersection,
  mutual,
  reverse,
  union,
} from "../../lib/neighbors/combine.ts";
import { isLinked, type Topology } from "../../lib/neighbors/topology.ts";
import {
  assertSound,
  numberNames,
  pairNames,
  randomTopology,
  rowsOf,
  topologyOfRows,
  topologyWhere,
} from "../support/links.ts";

Deno.test("union(), intersection() and difference() agree with sets of links", () => {
  for (const seed of ["a", "b", "c"]) {
    const left = randomTopology(40, 0.1, `left ${seed}`),
      right = randomTopology(40, 0.2, `right ${seed}`);
    const slow = (keeps: (inLeft: boolean, inRight: boolean) => boolean) =>
      topologyWhere(40, (i, j) => keeps(isLinked(left, i, j), isLinked(right, i, j)));
    assert.deepEqual(union(left, right), slow((a, b) => a || b));
    assert.deepEqual(intersection(left, right), slow((a, b) => a && b));
    assert.deepEqual(difference(left, right), slow((a, b) => a && !b));
  }
});

Deno.test("mutual() and either() agree with asking both ways", () => {
  const topology = randomTopology(50, 0.08, "one-way");
  const back = (i: number, j: number) => isLinked(topology, j, i);
  assert.deepEqual(
    mutual(topology),
    topologyWhere(50, (i, j) => isLinked(topology, i, j) && back(i, j)),
  );
  assert.deepEqual(
    either(topology),
    topologyWhere(50, (i, j) => isLinked(topology, i, j) || back(i, j)),
  );
  assert.deepEqual(reverse(topology), topologyWhere(50, back));
  assertSound(either(topology));
});

// 0 -> 1 (7), 1 -> 0 (8), 1 -> 2 (9)
const weighted: Topology = {
  ...topologyOfRows([[1], [0, 2], []]),
  given: Float64Array.from([7, 8, 9]),
};

Deno.test("intersection(), difference() and mutual() keep the weights of the left side", () => {
  const plain = topologyOfRows([[1], [2], []]);
  assert.deepEqual(intersection(weighted, plain).given, Float64Array.from([7, 9]));
  assert.deepEqual(difference(weighted, plain).given, Float64Array.from([8]));
  assert.deepEqual(mutual(weighted).given, Float64Array.from([7, 8]));
  assert.equal(intersection(plain, weighted).given, undefined);
});

Deno.test("either() gives an added link the weight of its reverse", () => {
  const both = either(weighted);
  assert.deepEqual(rowsOf(both), [[1], [0, 2], [1]]);
  assert.deepEqual(both.given, Float64Array.from([7, 8, 9, 9]));
});

Deno.test("union() drops weights, since one side may have none", () => {
  assert.equal(union(weighted, weighted).given, undefined);
});

Deno.test("union() of empty topologies is empty", () => {
  const none = topologyOfRows([[], []]);
  assert.deepEqual(union(none, none), none);
  assert.deepEqual(pairNames(none, numberNames(2)), []);
});
