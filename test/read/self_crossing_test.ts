import assert from "node:assert/strict";
import { findSelfCrossings } from "../../lib/read/self_crossing.ts";
import { referenceText } from "../support/reference.ts";
import {
  flatFromGeoJson,
  flatFromGeometries,
  type GeoJsonGeometry,
} from "../support/flat_from_geojson.ts";

/** A polygon of one ring, given by its corners. */
function polygon(corners: readonly (readonly number[])[]): GeoJsonGeometry {
  return { type: "Polygon", coordinates: [[...corners, corners[0]]] };
}

/** A rose curve: `turns` times around the origin, crossing itself from the second time on. */
function rose(turns: number): GeoJsonGeometry {
  return polygon(Array.from({ length: 400 }, (_, step) => {
    const angle = 2 * Math.PI * step / 400;
    const radius = 2 + Math.cos(2.5 * turns * angle);
    return [radius * Math.cos(turns * angle), radius * Math.sin(turns * angle)];
  }));
}

Deno.test("findSelfCrossings() finds bowties and roses, and leaves proper rings alone", () => {
  const square = polygon([[0, 0], [1, 0], [1, 1], [0, 1]]);
  const bowtie = polygon([[0, 0], [1, 1], [1, 0], [0, 1]]);
  // Two squares that share the corner (1, 1): the ring touches itself without crossing.
  const touching = polygon([[0, 0], [1, 0], [1, 1], [2, 1], [2, 2], [1, 2], [1, 1], [0, 1]]);
  const layer = [square, bowtie, null, touching, rose(1), rose(2), bowtie];
  assert.deepEqual(findSelfCrossings(flatFromGeometries(layer)), [1, 5, 6]);
});

Deno.test("findSelfCrossings() looks at holes and at every part", () => {
  const bow = [[2, 2], [3, 3], [3, 2], [2, 3], [2, 2]];
  const outer = [[0, 0], [9, 0], [9, 9], [0, 9], [0, 0]];
  const layer: GeoJsonGeometry[] = [
    { type: "Polygon", coordinates: [outer, bow] },
    { type: "MultiPolygon", coordinates: [[outer], [bow]] },
    { type: "LineString", coordinates: bow },
  ];
  assert.deepEqual(findSelfCrossings(flatFromGeometries(layer)), [0, 1]);
});

Deno.test("findSelfCrossings() finds nothing in the counties of North Carolina", () => {
  const layer = flatFromGeoJson(JSON.parse(referenceText("nc.geojson")));
  assert.equal(findSelfCrossings(layer).length, 0);
});
