import assert from "node:assert/strict";
import { worstDistortion } from "../../lib/project/distortion.ts";
import { WGS84 } from "../../lib/project/ellipsoid.ts";
import type { Extent } from "../../lib/project/extent.ts";
import { openProjection } from "../../lib/project/projection.ts";

const spot = (longitude: number, latitude: number): Extent => ({
  center: [longitude, latitude],
  grid: Float64Array.of(longitude, latitude),
});
const box = (west: number, south: number, east: number, north: number): Extent => ({
  center: [(west + east) / 2, (south + north) / 2],
  grid: Float64Array.of(west, south, east, south, west, north, east, north),
});
const distortionOf = (definition: string, extent: Extent, ellipsoid = WGS84) =>
  worstDistortion(extent, ellipsoid, openProjection(definition)!.toMeters);

Deno.test("worstDistortion() is the scale of a conformal projection", () => {
  // UTM shrinks its central meridian by 0.9996.
  assert.ok(Math.abs(distortionOf("+proj=utm +zone=32 +ellps=WGS84", spot(9, 48)) - 0.0004) < 2e-6);
  // Mercator on a sphere stretches by 1/cos(latitude): twice at 60 degrees.
  const sphere = { a: 6371000, b: 6371000 };
  assert.ok(Math.abs(distortionOf("+proj=merc +R=6371000", spot(20, 60), sphere) - 1) < 0.001);
});

Deno.test("worstDistortion() of an azimuthal equal-area map is the stretch across the rim", () => {
  // On a sphere circles at angular distance c are too long by 1/cos(c/2).
  const sphere = { a: 6371000, b: 6371000 };
  const rim: Extent = { center: [0, 0], grid: Float64Array.of(0, 0, 30, 0, 0, 30) };
  const expected = 1 / Math.cos(15 * Math.PI / 180) - 1;
  const measured = distortionOf("+proj=laea +lat_0=0 +lon_0=0 +R=6371000", rim, sphere);
  assert.ok(Math.abs(measured - expected) < 1e-4, `${measured}`);
});

Deno.test("worstDistortion() counts an ellipsoid of another size", () => {
  const smaller = { a: WGS84.a * 0.99, b: WGS84.b * 0.99 };
  const worst = distortionOf("+proj=tmerc +lon_0=9 +ellps=WGS84", spot(9, 48), smaller);
  assert.ok(Math.abs(worst - (1 / 0.99 - 1)) < 1e-5);
});

Deno.test("worstDistortion() finds a map that is torn apart though its scale is true", () => {
  // Plate carrée near the equator: true everywhere, but the two sides of the date line are a world
  // apart.
  const across = box(178, -1, 182, 1);
  assert.ok(distortionOf("+proj=eqc +lat_ts=0 +ellps=WGS84", across) > 10);
  assert.ok(distortionOf("+proj=eqc +lat_ts=0 +ellps=WGS84", box(-2, -1, 2, 1)) < 0.01);
});

Deno.test("worstDistortion() is infinite when the projection cannot show some of the extent", () => {
  assert.equal(distortionOf("+proj=laea +lat_0=0 +lon_0=0 +ellps=WGS84", spot(180, 0)), Infinity);
});
