import assert from "node:assert/strict";
import { centroidOf } from "../../lib/project/measure.ts";
import { pointInArea } from "../../lib/project/point_in_area.ts";
import { representativePoints } from "../../lib/project/points.ts";
import { assertClose } from "../support/close.ts";
import {
  flatFromGeoJson,
  flatFromGeometries,
  geoJsonFromTopology,
  type Position,
} from "../support/flat_from_geojson.ts";
import { referenceCase, referenceText } from "../support/reference.ts";

const box = (x: number, y: number, width: number): Position[] => [
  [x, y],
  [x + width, y],
  [x + width, y + 1],
  [x, y + 1],
  [x, y],
];

Deno.test("representativePoints() are centroids, but inside of the area", () => {
  // poly-multipart.json (CC0): the centroid of A, (5.5, 0.5), lies in the sea between its parts.
  const geometry = flatFromGeoJson(referenceCase("poly-multipart").inputs.geojson);
  assert.deepEqual(
    [...representativePoints(geometry)],
    [0.5, 0.5, 1.5, 0.5, 11.5, 0.5, 20.5, 20.5],
  );
});

Deno.test("representativePoints() lie in their counties", () => {
  const geometry = flatFromGeoJson(JSON.parse(referenceText("nc.geojson")));
  const points = representativePoints(geometry);
  for (let row = 0; row < geometry.kinds.length; row++) {
    assert.ok(pointInArea(geometry, row, [points[2 * row], points[2 * row + 1]]), `row ${row}`);
  }
});

Deno.test("representativePoints() of the world lie inside, across the 180th meridian too", () => {
  const world = JSON.parse(referenceText("world_countries_110m.topojson"));
  const geometry = flatFromGeoJson(geoJsonFromTopology(world, "countries"));
  const points = representativePoints(geometry, { geographic: true });
  const names: string[] = world.objects.countries.geometries.map(
    (country: { properties: { name: string } }) => country.properties.name,
  );
  // Counted from 0 to 360, Russia is in one piece.
  const eastward = geometry.xy.map((value, at) => at % 2 === 0 && value < 0 ? value + 360 : value);
  const russia = names.indexOf("Russia");
  const [x, y] = centroidOf({ ...geometry, xy: eastward }, russia);
  assertClose(points[2 * russia], x, 1e-12);
  assertClose(points[2 * russia + 1], y, 1e-12);
  for (let row = 0; row < names.length; row++) {
    const [x, y] = [points[2 * row], points[2 * row + 1]];
    assert.ok(pointInArea(geometry, row, [x, y]), `${names[row]} at ${x}, ${y}`);
  }
});

Deno.test("representativePoints() are made whole across the 180th meridian when asked", () => {
  const straddling = flatFromGeometries([
    { type: "MultiPolygon", coordinates: [[box(178, 0, 2)], [box(-180, 0, 4)]] },
  ]);
  // 178 … 184 in one piece: the middle is 181, which is written -179.
  assert.deepEqual([...representativePoints(straddling, { geographic: true })], [-179, 0.5]);
  // As plain coordinates the middle, -60, lies far outside, and the wider part is taken.
  assert.deepEqual([...representativePoints(straddling)], [-178, 0.5]);
});

Deno.test("representativePoints() are NaN where there is no geometry", () => {
  const mixed = flatFromGeometries([null, { type: "Point", coordinates: [3, 4] }, null]);
  assert.deepEqual([...representativePoints(mixed)], [NaN, NaN, 3, 4, NaN, NaN]);
  assert.equal(representativePoints(flatFromGeometries([])).length, 0);
});

Deno.test("representativePoints() of polygons without area are the means of their vertices", () => {
  const flat = flatFromGeometries([
    { type: "Polygon", coordinates: [[[0, 0], [3, 0], [6, 0], [0, 0]]] },
  ]);
  assert.deepEqual([...representativePoints(flat)], [3, 0]);
});
