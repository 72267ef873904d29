import assert from "node:assert/strict";
import { boundsOf } from "../../lib/layer/geometry.ts";
import { eastOf, unwrapLongitudes, wrapLongitude } from "../../lib/project/antimeridian.ts";
import { flatFromGeometries, type Position } from "../support/flat_from_geojson.ts";

const box = (west: number, east: number): Position[] => [
  [west, -10],
  [east, -10],
  [east, 0],
  [west, 0],
  [west, -10],
];
const areas = (...areas: [west: number, east: number][][]) =>
  flatFromGeometries(areas.map((parts) => ({
    type: "MultiPolygon",
    coordinates: parts.map(([west, east]) => [box(west, east)]),
  })));

Deno.test("unwrapLongitudes() puts both sides of the 180th meridian next to each other", () => {
  const fiji = areas([[177, 180], [-180, -178]]);
  assert.deepEqual(boundsOf(unwrapLongitudes(fiji)), [177, -10, 182, 0]);
  assert.deepEqual(boundsOf(fiji), [-180, -10, 180, 0], "the input stays as it is");
});

Deno.test("unwrapLongitudes() joins at Greenwich what is written from 0 to 360", () => {
  assert.deepEqual(boundsOf(unwrapLongitudes(areas([[0, 5], [355, 360]]))), [-5, -10, 5, 0]);
});

Deno.test("unwrapLongitudes() leaves alone what is whole, wide or goes all round", () => {
  for (
    const whole of [
      areas([[177, 180]], [[-180, -178]]), // two areas, each on its own side
      areas([[-61, -60], [55, 56]]), // far apart, but less than half a turn
      areas([[-180, -90], [-90, 0], [0, 90], [90, 180]]), // Antarctica
      areas([[-179, -90], [-90, -1], [1, 90], [90, 180]]), // the same with a gap on either side
      areas([[170, 190]]), // made whole already
    ]
  ) assert.equal(unwrapLongitudes(whole), whole);
});

Deno.test("wrapLongitude() and eastOf() are the same meridian in their own range", () => {
  const written = [-540, -360, -181, -180, 0, 179.5, 180, 181, 359, 360, 725];
  assert.deepEqual(written.map(wrapLongitude), [-180, 0, 179, -180, 0, 179.5, 180, -179, -1, 0, 5]);
  assert.deepEqual(
    written.map(eastOf),
    [180, 0, 179, 180, 0, 179.5, 180, 181, 359, 0, 5],
  );
});
