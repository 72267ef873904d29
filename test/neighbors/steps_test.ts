import assert from "node:assert/strict";
import { stepsApart } from "../../lib/neighbors/steps.ts";
import { referenceCase } from "../support/reference.ts";
import {
  assertSound,
  numberNames,
  pairNames,
  randomTopology,
  rowsOf,
  topologyOfRows,
  topologyWhere,
} from "../support/links.ts";

Deno.test("stepsApart() finds exactly two steps and up to two steps on a chain", () => {
  // 0 - 1 - 2 - 3: two steps lie between 0 and 2, and 1 and 3.
  const chain = topologyOfRows([[1], [0, 2], [1, 3], [2]]);
  assert.deepEqual(rowsOf(stepsApart(chain, 2, 2)), [[2], [3], [0], [1]]);
  assert.deepEqual(rowsOf(stepsApart(chain, 1, 2)), [[1, 2], [0, 2, 3], [0, 1, 3], [1, 2]]);
  assert.deepEqual(rowsOf(stepsApart(chain, 9, 9)), [[], [], [], []]);
});

Deno.test("stepsApart() follows the direction of the links", () => {
  const oneWay = topologyOfRows([[1], [2], []]);
  assert.deepEqual(rowsOf(stepsApart(oneWay, 2, 2)), [[2], [], []]);
});

Deno.test("stepsApart() agrees with shortest ways from a matrix", () => {
  const n = 30;
  const topology = randomTopology(n, 0.07, "steps");
  const rows = rowsOf(topology);
  // Floyd & Warshall, all pairs.
  const ways = Array.from(
    { length: n },
    (_, i) => Array.from({ length: n }, (_, j) => i === j ? 0 : rows[i].includes(j) ? 1 : Infinity),
  );
  for (let k = 0; k < n; k++) {
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) ways[i][j] = Math.min(ways[i][j], ways[i][k] + ways[k][j]);
    }
  }
  for (const [fewest, most] of [[1, 1], [2, 2], [1, 3], [3, 4]]) {
    const links = stepsApart(topology, fewest, most);
    assertSound(links);
    assert.deepEqual(links, topologyWhere(n, (i, j) => ways[i][j] >= fewest && ways[i][j] <= most));
  }
});

// Case us49-graph-distance: orders on the shared-edge graph of 48 states and DC (scipy.sparse.csgraph).
Deno.test("stepsApart() counts the pairs at each order between the contiguous United States", () => {
  const edges: [string, string][] = referenceCase("us49-rook-graph").expected.edges;
  const order = [...new Set(edges.flat())];
  const linked = new Set(edges.flatMap(([a, b]) => [`${a}-${b}`, `${b}-${a}`]));
  const graph = topologyWhere(order.length, (i, j) => linked.has(`${order[i]}-${order[j]}`));
  const { pairs_by_order, farthest } = referenceCase("us49-graph-distance").expected;
  for (const [steps, pairs] of Object.entries(pairs_by_order)) {
    const at = stepsApart(graph, Number(steps), Number(steps));
    assert.equal(at.indices.length / 2, pairs);
  }
  assert.deepEqual(
    pairNames(stepsApart(graph, 11, 11), order),
    farthest.map((pair: string[]) => pair.toSorted().join("-")).sort(),
  );
  assert.equal(pairNames(stepsApart(graph, 12, 12), numberNames(49)).length, 0);
});
