import assert from "node:assert/strict";
import { pointInArea } from "../../lib/project/point_in_area.ts";
import {
  flatFromGeoJson,
  flatFromGeometries,
  type Position,
} from "../support/flat_from_geojson.ts";
import { randomNumbers } from "../support/maps.ts";
import { referenceCase } from "../support/reference.ts";

const box = (x: number, y: number, size: number): Position[] => [
  [x, y],
  [x + size, y],
  [x + size, y + size],
  [x, y + size],
  [x, y],
];

Deno.test("pointInArea() knows holes and enclaves", () => {
  // poly-hole-enclave.json (CC0): B fills a hole of A, D stands in another.
  const geometry = flatFromGeoJson(referenceCase("poly-hole-enclave").inputs.geojson);
  const holders = (x: number, y: number) =>
    [0, 1, 2, 3].filter((row) => pointInArea(geometry, row, [x, y]));
  assert.deepEqual(holders(1, 1), [0]);
  assert.deepEqual(holders(3, 3), [1]);
  assert.deepEqual(holders(6.5, 6.5), []);
  assert.deepEqual(holders(7.5, 7.5), [3]);
  assert.deepEqual(holders(12, 5), [2]);
});

Deno.test("pointInArea() counts a point that several parts cover as inside", () => {
  const overlapping = flatFromGeometries([
    { type: "MultiPolygon", coordinates: [[box(0, 0, 2)], [box(1, 0, 2)]] },
  ]);
  for (const x of [0.5, 1.5, 2.5]) assert.equal(pointInArea(overlapping, 0, [x, 1]), true);
  assert.equal(pointInArea(overlapping, 0, [3.5, 1]), false);
});

Deno.test("pointInArea() gives every point of a tiling to exactly one area, corners included", () => {
  const cells = Array.from({ length: 9 }, (_, at) => box(at % 3, Math.floor(at / 3), 1));
  const tiling = flatFromGeometries(
    cells.map((ring) => ({ type: "Polygon" as const, coordinates: [ring] })),
  );
  const draws = randomNumbers(200, "points in a tiling");
  const points = [
    [1, 1],
    [1, 2],
    [1.5, 1],
    [2, 0.5],
    ...draws.map((u) => 3 * u).reduce(
      (pairs, u, at) => at % 2 ? (pairs.at(-1)!.push(u), pairs) : [...pairs, [u]],
      [] as number[][],
    ),
  ];
  for (const [x, y] of points) {
    const holders = cells.filter((_, row) => pointInArea(tiling, row, [x, y]));
    assert.equal(holders.length, 1, `${x}, ${y}`);
  }
});

Deno.test("pointInArea() holds nothing in an area without parts", () => {
  assert.equal(pointInArea(flatFromGeometries([null]), 0, [0, 0]), false);
});
