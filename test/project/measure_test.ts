import assert from "node:assert/strict";
import { readdirSync } from "node:fs";
import type { FlatGeometry } from "../../lib/layer/geometry.ts";
import { areaOf, centroidOf, perimeterOf } from "../../lib/project/measure.ts";
import { assertClose } from "../support/close.ts";
import {
  flatFromGeoJson,
  flatFromGeometries,
  type Position,
} from "../support/flat_from_geojson.ts";
import { referenceCase, referenceText } from "../support/reference.ts";

// poly-*.json: made for this set (CC0), computed with shapely 1.8.5 / GEOS 3.11.1.
const cases = readdirSync(new URL("../../testdata/cases/", import.meta.url))
  .filter((file) => file.startsWith("poly-")).map((file) => file.replace(".json", "")).sort();

for (const id of cases) {
  Deno.test(`areaOf() and centroidOf() measure the areas of ${id}`, () => {
    const { inputs: { geojson }, expected } = referenceCase(id);
    const geometry = flatFromGeoJson(geojson);
    geojson.features.forEach(({ properties }: { properties: { id: string } }, row: number) => {
      assertClose(areaOf(geometry, row), expected.area[properties.id], 1e-12, properties.id);
      const [x, y] = centroidOf(geometry, row);
      assertClose(x, expected.centroid[properties.id][0], 1e-12, `x of ${properties.id}`);
      assertClose(y, expected.centroid[properties.id][1], 1e-12, `y of ${properties.id}`);
    });
  });
}

Deno.test("measures are those of the 100 counties of North Carolina", () => {
  // nc-centroids-areas.json: shapely 1.8.5 / GEOS 3.11.1 on nc.geojson (r-cran-sf, MIT).
  const { expected } = referenceCase("nc-centroids-areas");
  const geometry = flatFromGeoJson(JSON.parse(referenceText("nc.geojson")));
  expected.ids.forEach((id: string, row: number) => {
    assertClose(areaOf(geometry, row), expected.area[row], 1e-9, `area of ${id}`);
    assertClose(perimeterOf(geometry, row), expected.perimeter[row], 1e-9, `perimeter of ${id}`);
    const [x, y] = centroidOf(geometry, row);
    assertClose(x, expected.centroid[row][0], 1e-12, `x of ${id}`);
    assertClose(y, expected.centroid[row][1], 1e-12, `y of ${id}`);
  });
});

const square: Position[] = [[0, 0], [2, 0], [2, 2], [0, 2], [0, 0]];
const polygon = (...rings: Position[][]) =>
  flatFromGeometries([{ type: "Polygon", coordinates: rings }]);
const multi = (...parts: Position[][][]) =>
  flatFromGeometries([{ type: "MultiPolygon", coordinates: parts }]);
const shifted = (ring: Position[], dx: number, dy: number) =>
  ring.map(([x, y]) => [x + dx, y + dy]);

Deno.test("measures do not depend on which way rings run", () => {
  const hole = shifted([[0, 0], [1, 0], [1, 1], [0, 1], [0, 0]], 0.5, 0.5);
  for (const outer of [square, square.toReversed()]) {
    for (const inner of [hole, hole.toReversed()]) {
      const geometry = polygon(outer, inner);
      assert.equal(areaOf(geometry, 0), 3); // 4 - 1
      assert.equal(perimeterOf(geometry, 0), 12); // 8 + 4
      assert.deepEqual(centroidOf(geometry, 0), [1, 1]);
    }
  }
});

Deno.test("centroidOf() weighs parts by area", () => {
  // A square of 4 around (1, 1) and one of 1 around (10.5, 0.5): x = (4·1 + 10.5)/5, y = (4 +
  // 0.5)/5.
  const small = shifted([[0, 0], [1, 0], [1, 1], [0, 1], [0, 0]], 10, 0);
  const [x, y] = centroidOf(multi([square], [small]), 0);
  assertClose(x, 2.9, 1e-15);
  assertClose(y, 0.9, 1e-15);
});

Deno.test("measures keep their digits far from the origin", () => {
  // A square of 1 mm at the corner of a UTM zone: 16 digits hold it to about 1e-9 m.
  const far = shifted(square.map(([x, y]) => [x / 2048, y / 2048]), 2 ** 19, 2 ** 22);
  const geometry = polygon(far);
  assert.equal(areaOf(geometry, 0), 2 ** -20);
  assert.deepEqual(centroidOf(geometry, 0), [2 ** 19 + 2 ** -11, 2 ** 22 + 2 ** -11]);
});

Deno.test("centroidOf() is the mean of the vertices when a polygon has no area", () => {
  const collinear: Position[] = [[0, 0], [1, 1], [5, 5], [0, 0]];
  assert.deepEqual(centroidOf(polygon(collinear), 0), [2, 2]);
  assert.equal(areaOf(polygon(collinear), 0), 0);
  const tenths: Position[] = [[0.1, 0.3], [0.2, 0.6], [0.3, 0.9], [0.1, 0.3]]; // collinear but for rounding
  const [x, y] = centroidOf(polygon(tenths), 0);
  assertClose(x, 0.2, 1e-15);
  assertClose(y, 0.6, 1e-15);
  assert.deepEqual(centroidOf(polygon([[7, 8], [7, 8], [7, 8]]), 0), [7, 8]);
  assert.deepEqual(centroidOf(polygon(square, square), 0), [1, 1]); // the hole takes all
});

Deno.test("centroidOf() is the length-weighted middle of a line", () => {
  // Segments of 3 around (1.5, 0) and 4 around (3, 2): (4.5 + 12)/7, 8/7.
  const line = flatFromGeometries([{ type: "LineString", coordinates: [[0, 0], [3, 0], [3, 4]] }]);
  const [x, y] = centroidOf(line, 0);
  assertClose(x, 16.5 / 7, 1e-15);
  assertClose(y, 8 / 7, 1e-15);
  assert.equal(perimeterOf(line, 0), 7);
  assert.equal(areaOf(line, 0), 0);
  const still = flatFromGeometries([{ type: "LineString", coordinates: [[3, 4], [3, 4]] }]);
  assert.deepEqual(centroidOf(still, 0), [3, 4]);
});

Deno.test("centroidOf() is the mean of points, NaN without geometry", () => {
  const two: FlatGeometry = {
    kinds: Uint8Array.of(1, 0),
    partStarts: Uint32Array.of(0, 2, 2),
    ringStarts: Uint32Array.of(0, 1, 2),
    vertexStarts: Uint32Array.of(0, 1, 2),
    xy: Float64Array.of(0, 0, 4, 6),
  };
  assert.deepEqual(centroidOf(two, 0), [2, 3]);
  assert.deepEqual(centroidOf(two, 1), [NaN, NaN]);
  assert.equal(perimeterOf(two, 0), 0);
});
