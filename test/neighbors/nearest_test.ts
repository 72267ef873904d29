import assert from "node:assert/strict";
import { nearestFinder } from "../../lib/neighbors/nearest.ts";
import { nearestTable } from "../../lib/neighbors/nearest_table.ts";
import { indexPoints } from "../../lib/neighbors/point_index.ts";
import { roundPoints } from "../../lib/neighbors/rounded_points.ts";
import { numberColumn, referenceCase, textColumn } from "../support/reference.ts";
import { assertSound, randomPoints, rowsOf } from "../support/links.ts";

const indexOf = (points: Float64Array) => indexPoints(roundPoints(points));

/** Everybody else by distance, then by position, the obvious way. */
function slowNearest(points: Float64Array, i: number): { j: number; grains: number }[] {
  const located = (j: number) => !Number.isNaN(points[2 * j] + points[2 * j + 1]);
  const { xy, perUnit } = roundPoints(points);
  return Array.from({ length: points.length / 2 }, (_, j) => j)
    .filter((j) => j !== i && located(j) && located(i))
    .map((j) => {
      const [dx, dy] = [xy[2 * j] - xy[2 * i], xy[2 * j + 1] - xy[2 * i + 1]];
      return { j, grains: Math.round(Math.sqrt(dx * dx + dy * dy) * perUnit) };
    })
    .sort((a, b) => a.grains - b.grains || a.j - b.j);
}

Deno.test("nearestFinder() takes the K nearest, ties to the smaller position, and counts the ties", () => {
  // On a line at 0, 1, 2, 4: both 0 and 2 are nearest to 1, and position 0 wins.
  const find = nearestFinder(indexOf(Float64Array.from([0, 0, 1, 0, 2, 0, 4, 0])), 4);
  assert.deepEqual(rowsOf(find(1).topology), [[1], [0], [1], [2]]);
  assert.equal(find(1).tied, 1);
  // With two: 2 has 1 at distance 1, then 0 and 3 both at 2.
  assert.deepEqual(rowsOf(find(2).topology), [[1, 2], [0, 2], [0, 1], [1, 2]]);
  assert.equal(find(2).tied, 1);
});

Deno.test("nearestFinder() agrees with sorting all others, in any order of asking", () => {
  const maps = {
    even: randomPoints(200, "even"),
    tied: randomPoints(200, "tied", { side: 12, whole: true }),
    clustered: randomPoints(200, "clustered").map((u) => (u / 1000) ** 6 * 1e6),
    tiny: randomPoints(200, "tiny", { side: 1e-3 }),
    crowded: randomPoints(200, "crowded", { side: 2, whole: true }),
    "one crowd": randomPoints(200, "one crowd").map((u, at) => at % 3 === 0 || at < 130 ? 7 : u),
    "all at one place": new Float64Array(400).fill(3),
    line: randomPoints(200, "line").map((u, at) => at % 2 === 0 ? u : 5),
  };
  for (const [name, points] of Object.entries(maps)) {
    const find = nearestFinder(indexOf(points), 200);
    const sorted = Array.from({ length: 200 }, (_, i) => slowNearest(points, i));
    for (const k of [3, 1, 8, 5, 40]) {
      const { topology, tied } = find(k);
      assertSound(topology);
      const rows = sorted.map((row) => row.slice(0, k).map(({ j }) => j).sort((a, b) => a - b));
      assert.deepEqual(rowsOf(topology), rows, `${name}, ${k} nearest`);
      assert.equal(tied, sorted.filter((row) => row[k - 1].grains === row[k].grains).length);
    }
  }
});

Deno.test("nearestFinder() links the same areas when they come in another order", () => {
  const points = randomPoints(200, "order");
  const order = Array.from({ length: 200 }, (_, i) => (i * 77) % 200);
  const shuffled = Float64Array.from(order.flatMap((i) => [points[2 * i], points[2 * i + 1]]));
  const rows = rowsOf(nearestFinder(indexOf(points), 200)(5).topology);
  const moved = rowsOf(nearestFinder(indexOf(shuffled), 200)(5).topology);
  moved.forEach((row, at) => {
    assert.deepEqual(row.map((j) => order[j]).sort((a, b) => a - b), rows[order[at]]);
  });
});

Deno.test("nearestFinder() never uses points without a place, and keeps their rows empty", () => {
  const points = Float64Array.from([0, 0, NaN, NaN, 1, 0, 5, NaN, 3, 0]);
  const { topology } = nearestFinder(indexOf(points), 5)(1);
  assert.deepEqual(rowsOf(topology), [[2], [], [0], [], [2]]);
});

Deno.test("nearestFinder() links areas at the same place first", () => {
  const points = Float64Array.from([1, 1, 1, 1, 1, 1, 2, 1]);
  const find = nearestFinder(indexOf(points), 4);
  assert.deepEqual(rowsOf(find(2).topology), [[1, 2], [0, 2], [0, 1], [0, 1]]);
});

Deno.test("nearestFinder() refuses as many neighbors as there are areas", () => {
  const find = nearestFinder(indexOf(randomPoints(8, "eight")), 8);
  assert.equal(find(7).topology.indices.length, 56);
  assert.throws(() => find(9), {
    name: "UnfitDataError",
    message: "Cannot link 9 nearest neighbors as the layer has only 8 usable areas",
  });
  assert.throws(() => find(8), { name: "UnfitDataError" });
});

// Case knn-nc-centroids-open: scipy's k-d tree on planar centroids of the counties of North Carolina.
Deno.test("nearestTable() orders the nearest counties of North Carolina by distance", () => {
  const names = textColumn("nc_points.csv", "NAME");
  const index = indexOf(pointsOf("centroid_lon", "centroid_lat"));
  for (const [k, expected] of Object.entries(referenceCase("knn-nc-centroids-open").expected)) {
    const { near, width } = nearestTable(index, Number(k));
    const found: string[][] = [];
    for (let at = 0; at < index.count; at++) {
      found[index.ids[at]] = [...near.subarray(at * width, (at + 1) * width)]
        .map((other) => names[index.ids[other]]);
    }
    assert.deepEqual(found, expected);
  }
});

// Case knn-ties-open: seats in whole miles; two counties whose 4th and 5th nearest are equally far.
Deno.test("nearestFinder() counts the ties between county seats in whole miles", () => {
  const { inputs, expected } = referenceCase("knn-ties-open");
  const index = indexOf(pointsOf(inputs.x, inputs.y));
  assert.equal(nearestFinder(index, 100)(inputs.k).tied, expected.tied.length);
});

function pointsOf(x: string, y: string): Float64Array {
  const xs = numberColumn("nc_points.csv", x), ys = numberColumn("nc_points.csv", y);
  return Float64Array.from([...xs].flatMap((value, i) => [value, ys[i]]));
}
