import assert from "node:assert/strict";
import {
  connectingDistances,
  kNearestDistances,
  linkDistances,
} from "../../lib/neighbors/distances.ts";
import { planeSpace } from "../../lib/neighbors/plane_space.ts";
import { numberColumn, referenceCase } from "../support/reference.ts";
import { randomPoints, topologyOfRows } from "../support/links.ts";

Deno.test("linkDistances() measures every link and leaves NaN where an end has no place", () => {
  const topology = topologyOfRows([[1, 2], [0], []]);
  const lengths = linkDistances(
    topology,
    planeSpace(Float64Array.from([0, 0, 3, 4, NaN, NaN])).distance,
  );
  assert.deepEqual(lengths, Float64Array.from([5, NaN, 5]));
});

Deno.test("kNearestDistances() agrees with sorting all distances", () => {
  const points = randomPoints(80, "k-th");
  for (const k of [1, 4, 79]) {
    const distances = kNearestDistances(points, k);
    for (let i = 0; i < 80; i++) {
      const sorted = Array.from(
        { length: 80 },
        (_, j) => Math.hypot(points[2 * i] - points[2 * j], points[2 * i + 1] - points[2 * j + 1]),
      )
        .sort((a, b) => a - b);
      assert.ok(Math.abs(distances[i] - sorted[k]) < 2e-6);
    }
  }
  assert.ok(kNearestDistances(points, 80).every(Number.isNaN));
});

/** Prim's minimum spanning tree over all pairs: the longest edge taken. */
function slowOneComponent(points: Float64Array): number {
  const n = points.length / 2;
  const reach = new Array<number>(n).fill(Infinity);
  const inside = new Array<boolean>(n).fill(false);
  reach[0] = 0;
  let longest = 0;
  for (let step = 0; step < n; step++) {
    let next = -1;
    for (let i = 0; i < n; i++) if (!inside[i] && (next < 0 || reach[i] < reach[next])) next = i;
    inside[next] = true;
    longest = Math.max(longest, reach[next]);
    for (let i = 0; i < n; i++) {
      const distance = Math.hypot(
        points[2 * i] - points[2 * next],
        points[2 * i + 1] - points[2 * next + 1],
      );
      reach[i] = Math.min(reach[i], distance);
    }
  }
  return longest;
}

Deno.test("connectingDistances() agrees with growing a tree over all pairs", () => {
  const maps = [
    randomPoints(150, "connect"),
    randomPoints(150, "connect lattice", { side: 30, whole: true }),
    randomPoints(150, "connect clusters").map((u) => (u / 1000) ** 5 * 1e5),
    Float64Array.from([0, 0, 0, 0, 5, 0, 12, 0]),
  ];
  for (const points of maps) {
    const { noneAlone, oneComponent } = connectingDistances(points);
    const nearest = kNearestDistances(points, 1);
    assert.equal(noneAlone, Math.max(...nearest));
    assert.ok(Math.abs(oneComponent - slowOneComponent(points)) < 2e-6);
  }
});

Deno.test("connectingDistances() ignores areas without a place, and is NaN below two", () => {
  assert.deepEqual(connectingDistances(Float64Array.from([0, 0, NaN, NaN, 3, 4])), {
    noneAlone: 5,
    oneComponent: 5,
  });
  assert.deepEqual(connectingDistances(Float64Array.from([0, 0, NaN, NaN])), {
    noneAlone: NaN,
    oneComponent: NaN,
  });
  assert.deepEqual(connectingDistances(Float64Array.from([7, 7, 7, 7])), {
    noneAlone: 0,
    oneComponent: 0,
  });
});

// Case bands-nc-seats-open: Dare is farthest from its nearest county seat.
Deno.test("connectingDistances() finds the smallest band that gives every county a neighbor", () => {
  const x = numberColumn("nc_points.csv", "seat_east_miles");
  const y = numberColumn("nc_points.csv", "seat_north_miles");
  const points = Float64Array.from([...x].flatMap((east, i) => [east, y[i]]));
  const { min_band_all_connected } = referenceCase("bands-nc-seats-open").expected;
  assert.ok(Math.abs(connectingDistances(points).noneAlone - min_band_all_connected) < 1e-9);
});

// Cases graph-*: total length of the minimum spanning tree is of scipy; its longest edge follows from the list.
for (const id of ["graph-nc-centroids", "graph-random40"]) {
  Deno.test(`connectingDistances() is the longest edge of the minimum spanning tree of ${id}`, () => {
    const { inputs, expected } = referenceCase(id);
    const lengths = expected.mst.map(([i, j]: [number, number]) =>
      Math.hypot(
        inputs.points[i][0] - inputs.points[j][0],
        inputs.points[i][1] - inputs.points[j][1],
      )
    );
    const { oneComponent } = connectingDistances(Float64Array.from(inputs.points.flat()));
    assert.ok(Math.abs(oneComponent - Math.max(...lengths)) < 1e-9);
  });
}
