import assert from "node:assert/strict";
import { extentOf } from "../../lib/project/extent.ts";
import { openProjection } from "../../lib/project/projection.ts";
import { flatFromGeometries } from "../support/flat_from_geojson.ts";

const degrees = openProjection("+proj=longlat +ellps=WGS84")!;
const pointsAt = (...coordinates: [number, number][]) =>
  flatFromGeometries(coordinates.map((position) => ({ type: "Point", coordinates: position })));

const corners = (grid: Float64Array) => [...grid.subarray(0, 2), ...grid.subarray(-2)];

Deno.test("extentOf() lays a grid over the box of the vertices, corners included", () => {
  const extent = extentOf(pointsAt([10, 40], [14, 42]), degrees)!;
  assert.deepEqual(extent.center, [12, 41]);
  assert.equal(extent.grid.length, 2 * 81);
  assert.deepEqual(corners(extent.grid), [10, 40, 14, 42]);
});

Deno.test("extentOf() cuts longitudes open where the widest empty stretch is", () => {
  const pacific = extentOf(pointsAt([178, -20], [-179, -10], [-170, -10], [175, -10]), degrees)!;
  assert.deepEqual(pacific.center, [-177.5, -15]);
  assert.deepEqual(corners(pacific.grid), [175, -20, 190, -10]);
  const written360 = extentOf(pointsAt([355, 0], [5, 10]), degrees)!;
  assert.deepEqual(written360.center, [0, 5]);
});

Deno.test("extentOf() goes all round when no stretch is empty", () => {
  const everywhere = Array.from(
    { length: 721 },
    (_, at): [number, number] => [at / 2 - 180, at % 80],
  );
  const extent = extentOf(pointsAt(...everywhere), degrees)!;
  assert.deepEqual(corners(extent.grid), [-180, 0, 180, 79]);
});

Deno.test("extentOf() turns projected coordinates into degrees and leaves out what is none", () => {
  const utm = openProjection("+proj=utm +zone=32 +ellps=WGS84")!;
  const extent = extentOf(pointsAt([400_000, 0], [600_000, 200_000]), utm)!;
  assert.ok(Math.abs(extent.center[0] - 9) < 1e-9);
  const ball = openProjection("+proj=laea +lat_0=0 +lon_0=0 +R=1")!;
  const beyond = extentOf(pointsAt([-2, -2], [2, 2]), ball)!; // the map is a disk of radius 2
  assert.ok(beyond.grid.length < 2 * 81 && beyond.grid.every((angle) => !Number.isNaN(angle)));
  assert.equal(extentOf(pointsAt([50, 50]), ball), null);
});

Deno.test("extentOf() is null when there are no vertices", () => {
  assert.equal(extentOf(flatFromGeometries([null]), degrees), null);
});
