import assert from "node:assert/strict";
import { readdirSync, readFileSync } from "node:fs";
import { WGS84 } from "../../lib/project/ellipsoid.ts";
import { openProjection, type Projection } from "../../lib/project/projection.ts";

const cases = new URL("../../testdata/cases/", import.meta.url);
const readJson = (file: string) => JSON.parse(readFileSync(new URL(file, cases), "utf8"));

function opened(definition: string): Projection {
  const projection = openProjection(definition);
  assert.ok(projection, `cannot open ${definition}`);
  return projection;
}

/** One place in the projection's own units. */
function forward(projection: Projection, place: [number, number]): [number, number] {
  const [x, y] = projection.toMeters(Float64Array.from(place));
  return [x / projection.metersPerUnit, y / projection.metersPerUnit];
}

function assertAt(
  actual: ArrayLike<number>,
  expected: number[],
  tolerance: number,
  what: string,
): void {
  expected.forEach((value, at) =>
    assert.ok(Math.abs(actual[at] - value) <= tolerance, `${what}: ${actual[at]} is not ${value}`)
  );
}

// gn72-*: IOGP Guidance Note 7-2 (some values from memory); snyder-*: Snyder 1987, USGS
// Professional Paper 1395 (values from memory); os-guide-caister: Ordnance Survey, Guide to
// Coordinate Systems, annexe C (values from memory); all reproduced with PROJ 9.1.1. Published
// facts.
const published = readdirSync(cases).filter((file) => /^(gn72|snyder|os-guide)-/.test(file))
  .sort();

/**
 * proj4's own table rounds the polar axis of this ellipsoid to a millimeter; EPSG's figures do not.
 */
const AIRY = "+a=6377563.396 +rf=299.3249646";

for (const file of published) {
  Deno.test(`toMeters() gives the published coordinates of ${file}`, () => {
    const { inputs, expected, tolerance } = readJson(file);
    const projection = opened(inputs.proj.replace("+ellps=airy", AIRY));
    const place = forward(projection, [inputs.lon, inputs.lat]);
    const unit = /\+R=/.test(inputs.proj) ? 1e-9 : 1e-6;
    assertAt(place, [expected.published_E, expected.published_N], tolerance.published, "published");
    assertAt(place, [expected.proj_E, expected.proj_N], unit, "PROJ");
    const back = projection.toDegrees(Float64Array.from(place));
    assertAt(back, [inputs.lon, inputs.lat], 1e-8, "and back");
  });
}

// proj-points-open.json: printed by PROJ 9.1.1 (MIT; only the numbers are used).
for (const { crs, proj, points } of readJson("proj-points-open.json").expected) {
  Deno.test(`toMeters() places points of ${crs} within a millimeter`, () => {
    const projection = opened(proj);
    for (const { lon, lat, E, N } of points) {
      assertAt(forward(projection, [lon, lat]), [E, N], 0.001, `${lon}, ${lat}`);
    }
  });
}

// testdata/crs/wkt.json: written by GDAL 3.6.2 (MIT) from EPSG and ESRI definitions; places by PROJ
// 9.1.1.
interface StoredSystem {
  readonly code: string;
  readonly version: 1 | 2;
  readonly lon: number;
  readonly lat: number;
  /** As GDAL stores it. */
  readonly stored: [number, number];
  readonly tolerance: number;
  readonly wkt: string;
}
const systems: StoredSystem[] = readJson("../crs/wkt.json").systems;

for (const { code, version, lon, lat, stored, tolerance, wkt } of systems) {
  Deno.test(`toDegrees() reads what GDAL stores in ${code}, WKT ${version}`, () => {
    const projection = opened(wkt);
    const [longitude, latitude] = projection.toDegrees(Float64Array.from(stored));
    const metersPerDegree = 111_320;
    assertAt([longitude, latitude], [lon, lat], tolerance / metersPerDegree, code);
    const meters = projection.geographic
      ? [lon, lat]
      : stored.map((v) => v * projection.metersPerUnit);
    const place = [...projection.toMeters(Float64Array.of(lon, lat))];
    const layouts = [place, place.map((v) => -v), place.toReversed().map((v) => -v)];
    assert.ok(
      layouts.some((layout) => layout.every((v, at) => Math.abs(v - meters[at]) <= tolerance)),
      `${place} is not ${meters}`,
    );
  });
}

const wktOf = (code: string) => systems.find((system) => system.code === code)!.wkt;

Deno.test("openProjection() knows units, degrees and ellipsoids", () => {
  const texas = opened(wktOf("EPSG:2278"));
  assert.equal(texas.geographic, false);
  assert.ok(Math.abs(texas.metersPerUnit - 1200 / 3937) < 1e-12);
  const nad27 = opened(wktOf("EPSG:4267"));
  assert.equal(nad27.geographic, true);
  assert.deepEqual(nad27.ellipsoid, { a: 6378206.4, b: 6356583.8 });
  assert.deepEqual(opened(wktOf("EPSG:3857")).ellipsoid, WGS84);
});

Deno.test("toMeters() gives east and north even where a system counts west and south", () => {
  const cape = opened(wktOf("EPSG:2048"));
  const [east, north] = cape.toMeters(Float64Array.of(18.6, -33.9));
  assert.ok(east < 0 && north < 0); // west of the 19th meridian, south of the equator
});

Deno.test("toDegrees() and toMeters() give NaN for places that are none", () => {
  const utm = opened("+proj=utm +zone=32 +ellps=WGS84");
  assert.deepEqual([...utm.toMeters(Float64Array.of(NaN, NaN))], [NaN, NaN]);
  const equalArea = opened("+proj=laea +lat_0=40 +lon_0=-100 +R=3");
  const [x, y] = equalArea.toDegrees(Float64Array.of(100, 100)); // the whole sphere is 6 in radius
  assert.deepEqual([x, y], [NaN, NaN]);
  assert.deepEqual(
    [...equalArea.toMeters(Float64Array.of(80, -40, -100, 40))].map(Math.abs), // the antipode, the center
    [NaN, NaN, 0, 0],
  );
});

Deno.test("openProjection() gives null for what it cannot compute", () => {
  const paris =
    'GEOGCRS["NTF (Paris)",DATUM["NTF (Paris)",ELLIPSOID["Clarke 1880 (IGN)",6378249.2,293.466021293627,LENGTHUNIT["metre",1]]],PRIMEM["Paris",2.5969213,ANGLEUNIT["grad",0.0157079632679489]],CS[ellipsoidal,2],AXIS["latitude",north,ORDER[1],ANGLEUNIT["grad",0.0157079632679489]],AXIS["longitude",east,ORDER[2],ANGLEUNIT["grad",0.0157079632679489]]]';
  const unknown = [
    paris, // not in degrees
    wktOf("EPSG:27700").replace('METHOD["Transverse Mercator"', 'METHOD["Guam Projection"'),
    'ENGCRS["site grid",EDATUM["site"],CS[Cartesian,2],AXIS["x",east],AXIS["y",north],LENGTHUNIT["metre",1]]',
    'LOCAL_CS["site grid",UNIT["metre",1]]',
    'GEODCRS["WGS 84",DATUM["WGS 84",ELLIPSOID["WGS 84",6378137,298.257223563,LENGTHUNIT["metre",1]]],CS[Cartesian,3],AXIS["(X)",geocentricX,LENGTHUNIT["metre",1]],AXIS["(Y)",geocentricY,LENGTHUNIT["metre",1]],AXIS["(Z)",geocentricZ,LENGTHUNIT["metre",1]]]',
    "+proj=nonsense",
    "",
    "undefined",
  ];
  for (const definition of unknown) assert.equal(openProjection(definition), null, definition);
});
