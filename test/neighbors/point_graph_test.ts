import assert from "node:assert/strict";
import { pointGraphFinder } from "../../lib/neighbors/point_graph.ts";
import { roundPoints } from "../../lib/neighbors/rounded_points.ts";
import type { Topology } from "../../lib/neighbors/topology.ts";
import { referenceCase } from "../support/reference.ts";
import {
  assertSound,
  namedPairs,
  numberNames,
  pairNames,
  randomPoints,
  rowsOf,
  topologyWhere,
} from "../support/links.ts";

const RULES = ["triangulated", "gabriel", "relative", "sphere"] as const;
type GraphRule = typeof RULES[number];

const graph = (points: Float64Array, rule: GraphRule): Topology =>
  pointGraphFinder(roundPoints(points))(rule);

/** All rules by their definitions, every third point asked; points at one place are linked and share links. */
function slowGraph(points: Float64Array, rule: GraphRule): Topology {
  const n = points.length / 2;
  const { xy, perUnit } = roundPoints(points);
  const grains = (i: number, j: number) =>
    Math.round(Math.hypot(xy[2 * i] - xy[2 * j], xy[2 * i + 1] - xy[2 * j + 1]) * perUnit);
  const others = (i: number, j: number) =>
    Array.from({ length: n }, (_, c) => c).filter((c) => grains(c, i) > 0 && grains(c, j) > 0);
  const dot = (i: number, j: number, c: number) =>
    (xy[2 * i] - xy[2 * c]) * (xy[2 * j] - xy[2 * c]) +
    (xy[2 * i + 1] - xy[2 * c + 1]) * (xy[2 * j + 1] - xy[2 * c + 1]);
  const radius = (i: number) =>
    Math.min(...Array.from({ length: n }, (_, c) => grains(i, c)).filter((d) => d > 0));
  return topologyWhere(n, (i, j) => {
    const length = grains(i, j);
    if (length === 0) return true;
    if (rule === "gabriel") {
      return others(i, j).every((c) => dot(i, j, c) > 2 * length / perUnit / perUnit);
    }
    if (rule === "relative") {
      return others(i, j).every((c) => Math.max(grains(i, c), grains(j, c)) >= length);
    }
    return length < radius(i) + radius(j);
  });
}

Deno.test("pointGraphFinder() agrees with the definitions on any points", () => {
  const maps = {
    even: randomPoints(60, "graph"),
    lattice: randomPoints(60, "graph lattice", { side: 9, whole: true }),
    clustered: randomPoints(60, "graph clusters").map((u) => (u / 1000) ** 5 * 1e5),
    two: randomPoints(2, "two"),
    line: Float64Array.from([5, 1, 1, 1, 3, 1, 2, 1, 9, 1]),
  };
  for (const [name, points] of Object.entries(maps)) {
    for (const rule of ["gabriel", "relative", "sphere"] as const) {
      const links = graph(points, rule);
      assertSound(links);
      assert.deepEqual(rowsOf(links), rowsOf(slowGraph(points, rule)), `${rule} of ${name}`);
    }
  }
});

Deno.test("pointGraphFinder() nests relative in gabriel in triangulated", () => {
  for (
    const points of [
      randomPoints(300, "nest"),
      randomPoints(300, "nest 2", { side: 15, whole: true }),
    ]
  ) {
    const names = numberNames(300);
    const [delaunay, gabriel, relative] = (["triangulated", "gabriel", "relative"] as const)
      .map((rule) => new Set(pairNames(graph(points, rule), names)));
    assert.ok([...relative].every((pair) => gabriel.has(pair)));
    assert.ok([...gabriel].every((pair) => delaunay.has(pair)));
  }
});

Deno.test("pointGraphFinder() links points on a line along it", () => {
  const points = Float64Array.from([5, 2, 1, 2, 3, 2, 4, 2]);
  for (const rule of ["triangulated", "gabriel", "relative"] as const) {
    assert.deepEqual(rowsOf(graph(points, rule)), [[3], [2], [1, 3], [0, 2]]);
  }
});

Deno.test("pointGraphFinder() gives points at one place the same neighbors and links them", () => {
  // A unit triangle with two points in its first corner, and one point without a place.
  const points = Float64Array.from([0, 0, 1, 0, 0, 1, 0, 0, NaN, NaN]);
  assert.deepEqual(rowsOf(graph(points, "triangulated")), [
    [1, 2, 3],
    [0, 2, 3],
    [0, 1, 3],
    [0, 1, 2],
    [],
  ]);
});

Deno.test("pointGraphFinder() links nobody when there is nobody, or one", () => {
  for (const rule of RULES) {
    assert.deepEqual(rowsOf(graph(new Float64Array(0), rule)), []);
    assert.deepEqual(rowsOf(graph(Float64Array.from([1, 1]), rule)), [[]]);
    assert.deepEqual(rowsOf(graph(Float64Array.from([1, 1, 1, 1]), rule)), [[1], [0]]);
  }
});

// Cases graph-nc-centroids and graph-random40: scipy.spatial.Delaunay, brute-force Gabriel and relative graphs.
for (const id of ["graph-nc-centroids", "graph-random40"]) {
  Deno.test(`pointGraphFinder() finds the published graphs of ${id}`, () => {
    const { inputs, expected } = referenceCase(id);
    const points = Float64Array.from(inputs.points.flat());
    const names = numberNames(points.length / 2);
    const rules = [
      ["triangulated", expected.delaunay],
      ["gabriel", expected.gabriel],
      ["relative", expected.relative_neighbour],
    ] as const;
    for (const [rule, pairs] of rules) {
      assert.deepEqual(pairNames(graph(points, rule), names), namedPairs(pairs));
    }
  });
}

// Case graph-lattice-degenerate: with a closed disc (a point on the circle blocks) only the sides stay.
Deno.test("pointGraphFinder() keeps the sides of a lattice under the Gabriel rule, turned or not", () => {
  const { inputs, expected } = referenceCase("graph-lattice-degenerate");
  for (const angle of [0, 0.3, 1.1, 2.7]) {
    const points = Float64Array.from(inputs.points.flatMap(([x, y]: [number, number]) => [
      5e5 + 1000 * (x * Math.cos(angle) - y * Math.sin(angle)),
      5e6 + 1000 * (x * Math.sin(angle) + y * Math.cos(angle)),
    ]));
    assert.equal(graph(points, "triangulated").indices.length / 2, expected.delaunay_edges);
    assert.equal(graph(points, "gabriel").indices.length / 2, expected.lattice_edges);
    assert.equal(graph(points, "relative").indices.length / 2, expected.lattice_edges);
    // Circles of radius 1: sides at distance 1 and diagonals at 1.41 overlap, points 2 apart only touch.
    assert.equal(graph(points, "sphere").indices.length / 2, expected.open_rule_pairs);
  }
});
