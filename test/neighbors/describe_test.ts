import assert from "node:assert/strict";
import { findComponents } from "../../lib/neighbors/components.ts";
import { planeSpace } from "../../lib/neighbors/plane_space.ts";
import { describeTopology } from "../../lib/neighbors/describe.ts";
import { randomTopology, rowsOf, topologyOfRows } from "../support/links.ts";

Deno.test("describeTopology() counts pairs, one-way links, islands, components and neighbors", () => {
  // 0 <-> 1 -> 2, 3 alone: two pairs, three links, one of them one-way; pieces {0, 1, 2} and {3}.
  const topology = topologyOfRows([[1], [0, 2], [], []]);
  assert.deepEqual(describeTopology(topology, { rule: "links:f.csv" }), {
    rule: "links:f.csv",
    pairs: 2,
    links: 3,
    islands: 2,
    components: 2,
    meanNeighbors: 0.75,
    minNeighbors: 0,
    maxNeighbors: 2,
    oneWayLinks: 1,
    longestLink: null,
    // 3 of the 4 x 3 links there could be.
    density: 0.25,
    neighborCounts: [
      { neighbors: 0, areas: 2 },
      { neighbors: 1, areas: 1 },
      { neighbors: 2, areas: 1 },
    ],
  });
});

Deno.test("describeTopology() measures the longest link, and ignores links without a distance", () => {
  const { distance } = planeSpace(Float64Array.from([0, 0, 3, 4, 3, 0, NaN, NaN]));
  const links = topologyOfRows([[1], [0, 2], [1, 3], []]);
  assert.equal(describeTopology(links, { distance }).longestLink, 5);
  assert.equal(describeTopology(topologyOfRows([[], []]), { distance }).longestLink, null);
});

Deno.test("describeTopology() of no areas is all zeros", () => {
  const summary = describeTopology(topologyOfRows([]));
  assert.deepEqual([summary.islands, summary.components, summary.links], [0, 0, 0]);
  assert.equal(summary.meanNeighbors, null);
});

Deno.test("findComponents() agrees with walking from area to area", () => {
  const topology = randomTopology(80, 0.012, "pieces");
  const rows = rowsOf(topology);
  const piece = new Array<number>(80).fill(-1);
  let count = 0;
  for (let start = 0; start < 80; start++) {
    if (piece[start] >= 0) continue;
    const open = [start];
    piece[start] = count;
    while (open.length > 0) {
      const i = open.pop()!;
      for (let j = 0; j < 80; j++) {
        if (piece[j] >= 0 || !(rows[i].includes(j) || rows[j].includes(i))) continue;
        piece[j] = count;
        open.push(j);
      }
    }
    count++;
  }
  assert.deepEqual(findComponents(topology), { count, of: Uint32Array.from(piece) });
});
