import assert from "node:assert/strict";
import { WGS84 } from "../../lib/project/ellipsoid.ts";
import {
  earthCentered,
  geodesicDistance,
  openGeodesic,
  type Place,
} from "../../lib/project/geodesic.ts";
import { referenceCase } from "../support/reference.ts";

function assertNear(actual: number, expected: number, tolerance: number): void {
  assert.ok(Math.abs(actual - expected) <= tolerance, `${actual} is not ${expected}`);
}

Deno.test("destination() solves the direct problem of Karney 2013, table 2", () => {
  // karney-table2-direct.json: numbers from memory, reproduced with GeographicLib 2.1.2; published
  // facts.
  const { inputs, expected } = referenceCase("karney-table2-direct");
  const start: Place = [inputs.lon1, inputs.lat1];
  const [lon, lat] = openGeodesic(WGS84).destination(start, inputs.azi1, inputs.s12);
  assertNear(lat, expected.lat2, 1e-10);
  assertNear(lon, expected.lon2, 1e-10);
});

Deno.test("distance() solves the short inverse problem of Karney 2013, table 4", () => {
  // karney-table4-short.json: numbers from memory, recomputed with GeographicLib 2.1.2; published
  // facts.
  const { inputs, expected } = referenceCase("karney-table4-short");
  const meters = openGeodesic(WGS84).distance([inputs.lon1, inputs.lat1], [
    inputs.lon2,
    inputs.lat2,
  ]);
  assertNear(meters, expected.published_s12, 1e-6);
});

Deno.test("destination() solves line (a) of Vincenty 1975 on the Bessel ellipsoid", () => {
  // vincenty-1975-line-a.json: numbers from memory, recomputed with GeographicLib 2.1.2; published
  // facts.
  const { inputs, expected } = referenceCase("vincenty-1975-line-a");
  const bessel = { a: inputs.a, b: inputs.a * (1 - 1 / inputs.invf) };
  const start: Place = [inputs.lon1, inputs.lat1];
  const [lon, lat] = openGeodesic(bessel).destination(start, inputs.azi1, inputs.s12);
  assertNear(lat, expected.published_lat2, 1e-8);
  assertNear(lon, expected.published_dlon, 1e-8);
});

// geod-pairs-open.json: PROJ 9.1.1 and GeographicLib 2.1.2 agree to 1e-5 m; only the numbers are
// used.
type City = [name: string, longitude: number, latitude: number];
const pairs: { a: City; b: City; s12: number; great_circle_R6371008_8: number }[] =
  referenceCase("geod-pairs-open").expected;
const places = Float64Array.from(pairs.flatMap(({ a, b }) => [a[1], a[2], b[1], b[2]]));

Deno.test("geodesicDistance() is that of 30 pairs of cities, on the ellipsoid and on a sphere", () => {
  const onEllipsoid = geodesicDistance(places, WGS84);
  const onSphere = geodesicDistance(places, { a: 6371008.8, b: 6371008.8 });
  pairs.forEach(({ s12, great_circle_R6371008_8 }, at) => {
    assertNear(onEllipsoid(2 * at, 2 * at + 1), s12, 1e-3);
    assertNear(onSphere(2 * at, 2 * at + 1), great_circle_R6371008_8, 1e-3);
  });
});

Deno.test("geodesicDistance() is 0 at one place, on both sides of the 180th meridian", () => {
  const distance = geodesicDistance(Float64Array.of(180, -20, -180, -20, 179.5, -20), WGS84);
  assert.equal(distance(0, 1), 0);
  assert.equal(distance(2, 1), distance(2, 0));
});

Deno.test("earthCentered() gives straight lines that are never longer than the geodesics", () => {
  const xyz = earthCentered(places, WGS84);
  const distance = geodesicDistance(places, WGS84);
  for (let i = 0; i < places.length / 2; i++) {
    for (let j = 0; j < i; j++) {
      const [dx, dy, dz] = [0, 1, 2].map((axis) => xyz[3 * i + axis] - xyz[3 * j + axis]);
      const chord = Math.sqrt(dx * dx + dy * dy + dz * dz), geodesic = distance(i, j);
      assert.ok(chord <= geodesic + 1e-6, `${i}, ${j}`);
      // On a circle of the smallest radius of curvature the arc over the same chord is longer.
      const tightest = WGS84.b * WGS84.b / WGS84.a;
      if (chord < 2 * tightest) {
        assert.ok(geodesic <= 2 * tightest * Math.asin(chord / 2 / tightest) + 1e-6);
      }
    }
  }
});

Deno.test("earthCentered() puts equator and poles at the semi-axes", () => {
  const [x, y, z, , , pole] = earthCentered(Float64Array.of(0, 0, 0, 90), WGS84);
  assert.deepEqual([x, y, z], [WGS84.a, 0, 0]);
  assertNear(pole, WGS84.b, 1e-9);
});
