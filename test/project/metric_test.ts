import assert from "node:assert/strict";
import { readFileSync } from "node:fs";
import { UnfitDataError, UsageError } from "../../lib/layer/errors.ts";
import type { Crs } from "../../lib/layer/layer.ts";
import { geodesicDistance } from "../../lib/project/geodesic.ts";
import type { MetricLayer } from "../../lib/project/located_layer.ts";
import { chooseMetric } from "../../lib/project/metric.ts";
import { representativePoints } from "../../lib/project/points.ts";
import { fault } from "../support/fault.ts";
import { flatFromGeoJson, flatFromGeometries } from "../support/flat_from_geojson.ts";
import { referenceText } from "../support/reference.ts";

const { systems } = JSON.parse(
  readFileSync(new URL("../../testdata/crs/wkt.json", import.meta.url), "utf8"),
);

function crsOf(code: string): Crs {
  const { wkt } = systems.find((system: { code: string }) => system.code === code);
  const [, name] = /\["([^"]*)"/.exec(wkt)!;
  return { name, code, wkt, geographic: wkt.startsWith("GEOG") };
}

const WGS84_DEGREES: Crs = {
  name: "WGS 84",
  code: "EPSG:4326",
  wkt:
    'GEOGCRS["WGS 84",DATUM["World Geodetic System 1984",ELLIPSOID["WGS 84",6378137,298.257223563,LENGTHUNIT["metre",1]]],CS[ellipsoidal,2],AXIS["latitude",north],AXIS["longitude",east],ANGLEUNIT["degree",0.0174532925199433]]',
  geographic: true,
};

const lookup = { resolveCrs: (code: string) => Promise.resolve(crsOf(code)) };

function pointLayer(crs: Crs | null, ...coordinates: [number, number][]): MetricLayer {
  const geometry = flatFromGeometries(
    coordinates.map((position) => ({ type: "Point", coordinates: position })),
  );
  return { name: "places", crs, geometry };
}

/** North Carolina in NAD27 degrees: nc.geojson (r-cran-sf, MIT). */
const carolina: MetricLayer = {
  name: "counties",
  crs: crsOf("EPSG:4267"),
  geometry: flatFromGeoJson(JSON.parse(referenceText("nc.geojson"))),
};

Deno.test("chooseMetric() takes the UTM zone of a state in degrees, on the state's own ellipsoid", async () => {
  const metric = await chooseMetric(carolina);
  assert.equal(metric.kind, "projected");
  assert.equal(metric.name, "UTM zone 17N");
  assert.match(metric.definition, /\+proj=utm \+zone=17 \+a=6378206\.4 /);
  assert.equal(metric.unit, "m");
  // The east end lies 5.5 degrees off the central meridian, where UTM is 0.3 % too long.
  assert.ok(metric.worstDistortion! > 0.0025 && metric.worstDistortion! < 0.0035);
});

Deno.test("chooseMetric() promises no distance to be off by more than it says", async () => {
  const places = representativePoints(carolina.geometry, { geographic: true });
  const ground = await chooseMetric(carolina, "geodesic");
  const trueDistance = geodesicDistance(ground.project(places), ground.ellipsoid!);
  for (const choice of ["auto", "EPSG:3857", "+proj=laea +lat_0=35 +lon_0=-80 +ellps=clrk66"]) {
    const metric = await chooseMetric(carolina, choice, lookup);
    const xy = metric.project(places);
    for (let i = 0; i < 100; i++) {
      for (let j = 0; j < i; j++) {
        const flat = Math.hypot(xy[2 * i] - xy[2 * j], xy[2 * i + 1] - xy[2 * j + 1]);
        const error = Math.abs(flat / trueDistance(i, j) - 1);
        assert.ok(error <= metric.worstDistortion! + 1e-9, `${choice}: ${i}, ${j} off by ${error}`);
      }
    }
  }
});

Deno.test("chooseMetric() keeps a projected layer's own system where it is true", async () => {
  const grid = pointLayer(crsOf("EPSG:27700"), [200_000, 200_000], [600_000, 700_000]);
  const metric = await chooseMetric(grid);
  assert.equal(metric.name, "OSGB36 / British National Grid");
  assert.equal(metric.definition, "EPSG:27700");
  assert.ok(metric.worstDistortion! < 0.001);
  assert.deepEqual([...metric.project(Float64Array.of(1.00000049, 2))], [1, 2]);
});

Deno.test("chooseMetric() turns feet into meters", async () => {
  const texas = pointLayer(crsOf("EPSG:2278"), [2_000_000, 13_000_000], [2_300_000, 13_500_000]);
  for (const choice of ["auto", "planar"]) {
    const metric = await chooseMetric(texas, choice);
    const [x, y] = metric.project(Float64Array.of(3937, 39370));
    assert.deepEqual([x, y, metric.unit], [1200, 12000, "m"]); // a survey foot is 1200/3937 m
    assert.ok(metric.worstDistortion! < 0.001);
  }
});

Deno.test("chooseMetric() leaves Web Mercator for UTM away from the equator", async () => {
  const web = crsOf("EPSG:3857");
  const bavaria = pointLayer(web, [1_200_000, 6_100_000], [1_300_000, 6_200_000]);
  assert.equal((await chooseMetric(bavaria)).name, "UTM zone 32N");
  const equator = pointLayer(web, [0, -50_000], [100_000, 50_000]);
  assert.equal((await chooseMetric(equator)).name, "WGS 84 / Pseudo-Mercator");
});

Deno.test("chooseMetric() falls back on an equal-area map of its own and states its distortion", async () => {
  const europe = pointLayer(WGS84_DEGREES, [-10, 35], [30, 70]);
  const metric = await chooseMetric(europe);
  assert.equal(metric.name, "Lambert azimuthal equal-area around 52.5° N, 10° E");
  assert.ok(metric.worstDistortion! > 0.01 && metric.worstDistortion! < 0.03);
  const arctic = await chooseMetric(pointLayer(WGS84_DEGREES, [-20, 85], [40, 89]));
  assert.match(arctic.name, /equal-area around 87° N, 10° E/); // UTM ends at 84 degrees
});

Deno.test("chooseMetric() lays both sides of the 180th meridian next to each other", async () => {
  const fiji = pointLayer(WGS84_DEGREES, [179.9, -17], [-179.9, -17], [177, -19]);
  const metric = await chooseMetric(fiji);
  assert.equal(metric.name, "UTM zone 60S");
  const [x0, y0, x1, y1] = metric.project(Float64Array.of(179.9, -17, -179.9, -17));
  const apart = Math.hypot(x0 - x1, y0 - y1);
  assert.ok(apart > 21_000 && apart < 22_000, `${apart} m for a fifth of a degree`);
});

Deno.test("chooseMetric() asks for geodesics when no plane is within 10 %", async () => {
  const world = pointLayer(WGS84_DEGREES, [-170, -50], [-60, 0], [0, 60], [100, 10], [170, 50]);
  await assert.rejects(
    chooseMetric(world),
    fault(UnfitDataError, /places flat .* 10 %; pass --metric geodesic/),
  );
  const metric = await chooseMetric(world, "geodesic");
  assert.deepEqual(
    [metric.kind, metric.unit, metric.worstDistortion, metric.ellipsoid!.a],
    ["geodesic", "m", 0, 6378137],
  );
  assert.deepEqual([...metric.project(Float64Array.of(190, 5, NaN, NaN))], [-170, 5, NaN, NaN]);
});

Deno.test("chooseMetric() takes a code or a proj string as told, however far off", async () => {
  const byCode = await chooseMetric(carolina, "epsg:3857", lookup);
  assert.equal(byCode.name, "WGS 84 / Pseudo-Mercator");
  assert.equal(byCode.definition, "EPSG:3857");
  assert.ok(byCode.worstDistortion! > 0.2);
  const byString = await chooseMetric(carolina, "+proj=lcc +lat_1=34 +lat_2=36 +lon_0=-79");
  assert.equal(byString.definition, "+proj=lcc +lat_1=34 +lat_2=36 +lon_0=-79");
  assert.ok(byString.worstDistortion! < 0.001);
});

Deno.test("chooseMetric() refuses systems without distances and words it does not know", async () => {
  await assert.rejects(
    chooseMetric(carolina, "EPSG:4267", lookup),
    fault(UsageError, /NAD27, which is in degrees; choose a projected system/),
  );
  await assert.rejects(
    chooseMetric(carolina, "+proj=nonsense"),
    fault(UsageError, /\+proj=nonsense, which is not understood here/),
  );
  await assert.rejects(chooseMetric(carolina, "utm"), fault(UsageError, /Unknown metric "utm"/));
  await assert.rejects(chooseMetric(carolina, "EPSG:3857"), RangeError);
});

Deno.test("chooseMetric() says what to do when a layer declares no system", async () => {
  const nowhere = pointLayer(null, [0, 0], [300, 400]);
  for (const choice of ["auto", "geodesic", "+proj=utm +zone=32"]) {
    await assert.rejects(
      chooseMetric(nowhere, choice),
      fault(UnfitDataError, /places as it declares no .*; pass --crs EPSG:N, or --metric planar/),
    );
  }
  const metric = await chooseMetric(nowhere, "planar");
  assert.deepEqual([metric.kind, metric.unit, metric.worstDistortion], [
    "planar",
    "map units",
    null,
  ]);
  assert.deepEqual([...metric.project(Float64Array.of(300, NaN))], [300, NaN]);
});

Deno.test("chooseMetric() rounds map units so that decimal ties are ties", async () => {
  const tenths = await chooseMetric(pointLayer(null, [0, 0], [0.9, 0.9]), "planar");
  const [a, b] = tenths.project(Float64Array.of(0.1 + 0.2, 0.3));
  assert.equal(a, b);
  const huge = await chooseMetric(pointLayer(null, [4e15, 0], [0, 0]), "planar");
  assert.deepEqual([...huge.project(Float64Array.of(4e15, 12))], [4e15, 0]); // 12 digits of 4e15
  const none = await chooseMetric(pointLayer(null, [0, 0]), "planar");
  assert.deepEqual([...none.project(Float64Array.of(0, 0))], [0, 0]);
});

Deno.test("chooseMetric() doubts a system that the coordinates do not fit", async () => {
  const meters = pointLayer(WGS84_DEGREES, [500_000, 5_500_000], [600_000, 5_600_000]);
  await assert.rejects(
    chooseMetric(meters),
    fault(UnfitDataError, /500000, 5500000 to 600000, 5600000, do not fit .* declares, WGS 84/),
  );
  const beyond = pointLayer(crsOf("EPSG:27700"), [1e9, 1e9], [2e9, 2e9]);
  await assert.rejects(chooseMetric(beyond), fault(UnfitDataError, /do not fit/));
  assert.equal((await chooseMetric(meters, "planar")).unit, "map units");
});

Deno.test("chooseMetric() names a system it cannot compute with, and planar still works", async () => {
  const wkt = crsOf("EPSG:27700").wkt.replace('"Transverse Mercator"', '"Guam Projection"');
  const guam = pointLayer({ name: "Guam 1963", code: null, wkt, geographic: false }, [0, 0], [
    9,
    9,
  ]);
  await assert.rejects(
    chooseMetric(guam),
    fault(UnfitDataError, /Cannot compute with Guam 1963, .*pass --metric planar/),
  );
  assert.equal((await chooseMetric(guam, "planar")).unit, "map units");
});

Deno.test("chooseMetric() says when nothing has a geometry", async () => {
  await assert.rejects(
    chooseMetric({ name: "places", crs: WGS84_DEGREES, geometry: flatFromGeometries([null]) }),
    fault(UnfitDataError, /none of its features has a geometry/),
  );
});

Deno.test("project() names a point that has no place on the map", async () => {
  const metric = await chooseMetric(
    pointLayer(WGS84_DEGREES, [0, 0], [1, 1]),
    "+proj=laea +lat_0=0 +lon_0=0",
  );
  assert.throws(
    () => metric.project(Float64Array.of(0, 0, 180, 0)),
    fault(UnfitDataError, /Cannot place the point 180, 0 of places/),
  );
});
