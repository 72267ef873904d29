import assert from "node:assert/strict";
import proj4 from "proj4";
import { contiguityFinder } from "../../lib/neighbors/contiguity.ts";
import { parseLength } from "../../lib/project/length.ts";
import { referenceText } from "../support/reference.ts";
import { namedPairs, pairNames } from "../support/links.ts";
import {
  flatFromGeoJson,
  flatFromGeometries,
  type GeoJson,
  type GeoJsonGeometry,
  moveGeoJson,
} from "../support/flat_from_geojson.ts";

/**
 * An invented county in meters, as sloppy as they come:
 *
 * - Abbey and Brook share a side, but Abbey lacks the corner of Creek in the middle of its own (T-junction);
 * - Dale overlaps Creek by 2 cm along their side;
 * - Elm lies 3 cm off Dale, and Fen 8 m off Elm (a road, not an error);
 * - Abbey has a hole filled by Glen, and Hope inside it without a hole;
 * - Inn has two parts, one beside Fen, one beside Abbey's far corner;
 * - Jetty is an island 500 m out.
 */
const MESSY: Record<string, GeoJsonGeometry> = {
  Abbey: polygon(box(0, 0, 1000, 1000), box(100, 100, 300, 300)),
  Brook: polygon(box(1000, 0, 2000, 400)),
  Creek: polygon(box(1000, 400, 2000, 1000)),
  Dale: polygon(box(1999.98, 400, 3000, 1000)),
  Elm: polygon(box(3000.03, 400, 4000, 1000)),
  Fen: polygon(box(4008, 400, 5000, 1000)),
  Glen: polygon(box(100, 100, 300, 300)),
  Hope: polygon(box(600, 600, 700, 700)),
  Inn: {
    type: "MultiPolygon",
    coordinates: [[box(5000, 500, 5500, 700)], [box(-400, 1000, 0, 1400)]],
  },
  Jetty: polygon(box(0, -900, 300, -500)),
};

function polygon(...rings: number[][][]): GeoJsonGeometry {
  return { type: "Polygon", coordinates: rings };
}

function box(west: number, south: number, east: number, north: number): number[][] {
  return [[west, south], [east, south], [east, north], [west, north], [west, south]];
}

const NAMES = Object.keys(MESSY);
const finder = contiguityFinder(flatFromGeometries(Object.values(MESSY)));

const EDGES = [
  ["Abbey", "Brook"],
  ["Abbey", "Creek"],
  ["Brook", "Creek"],
  ["Creek", "Dale"],
  ["Abbey", "Glen"],
  ["Abbey", "Hope"],
  ["Fen", "Inn"],
];
// Dale's corner lies on Creek's lower side, 2 cm from Brook's corner: within no tolerance, but on Brook's side.
const POINTS = [["Abbey", "Inn"], ["Brook", "Dale"]];

Deno.test("contiguityFinder() finds who touches in the messy county", () => {
  const { touching, edge, report } = finder.find(null);
  assert.deepEqual(pairNames(touching, NAMES), namedPairs([...EDGES, ...POINTS]));
  assert.deepEqual(pairNames(edge, NAMES), namedPairs([...EDGES, ["Brook", "Dale"]]));
  assert.equal(report.snappedPairs, 0);
});

Deno.test("contiguityFinder() closes the gap of 3 cm with snap=5cm, not the road", () => {
  const { touching, edge, report } = finder.find(parseLength("0.05m"));
  assert.deepEqual(
    pairNames(touching, NAMES),
    namedPairs([...EDGES, ...POINTS, ["Dale", "Elm"]]),
  );
  assert.ok(pairNames(edge, NAMES).includes("Dale-Elm"));
  assert.equal(report.snappedPairs, 1);
});

Deno.test("nearMisses() lists the digitizing error and, looking farther, the road", () => {
  const named = (gap: number) =>
    finder.nearMisses(gap).map((
      { one, other, gap },
    ) => [NAMES[one], NAMES[other], Number(gap.toFixed(6))]);
  assert.deepEqual(named(0.05), [["Dale", "Elm", 0.03]]);
  assert.deepEqual(named(10), [["Dale", "Elm", 0.03], ["Elm", "Fen", 8]]);
});

Deno.test("contiguityFinder() measures snap in meters at its place, in degrees and in feet", () => {
  // At 60° N a gap of 5e-6° is 0.279 m from west to east and 0.557 m from south to north.
  const square = (x: number, y: number) => polygon(box(x, y, x + 0.01, y + 0.01));
  const gap = 5e-6;
  const cells = [square(10, 60), square(10.01 + gap, 60), square(10, 60.01 + gap)];
  const degrees = contiguityFinder(flatFromGeometries(cells), { geographic: true });
  const names = ["home", "east", "north"];
  assert.deepEqual(pairNames(degrees.find(parseLength("0.4m")).edge, names), ["east-home"]);
  assert.deepEqual(pairNames(degrees.find(parseLength("0.6m")).edge, names), [
    "east-home",
    "home-north",
  ]);
  const misses = degrees.nearMisses(0.6).map(({ gap }) => gap.toFixed(3));
  assert.deepEqual(misses, ["0.279", "0.557"]);

  const feet = contiguityFinder(
    flatFromGeometries([polygon(box(0, 0, 10, 10)), polygon(box(11, 0, 20, 10))]),
    { metersPerUnit: 0.3048 },
  );
  assert.equal(feet.find(parseLength("0.9ft")).touching.indices.length, 0);
  assert.equal(feet.find(parseLength("1.001ft")).touching.indices.length, 2);
});

Deno.test("contiguityFinder() closes gaps across the antimeridian", () => {
  const cells = [polygon(box(170, 0, 179.99999, 10)), polygon(box(-179.99999, 0, -170, 10))];
  const { edge } = contiguityFinder(flatFromGeometries(cells), { geographic: true })
    .find(parseLength("3m"));
  assert.equal(edge.indices.length, 2); // 2e-5° of longitude at the equator are 2.2 m
});

Deno.test("contiguityFinder() does not link what lies on either side of an area thinner than snap", () => {
  // West and east are 0.5 m apart, with a strip between them; the areas north and south of all three have
  // its corners too, so that nothing is loose near it.
  const cap = (from: number, to: number) =>
    polygon([[0, from], [10, from], [10.5, from], [20, from], [20, to], [0, to], [0, from]]);
  const cells = [
    polygon(box(0, 0, 10, 10)),
    polygon(box(10, 0, 10.5, 10)),
    polygon(box(10.5, 0, 20, 10)),
    cap(10, 20),
    cap(0, -10),
  ];
  const { touching } = contiguityFinder(flatFromGeometries(cells)).find(parseLength("1m"));
  assert.equal(touching.indices.length / 2, 2 + 3 + 3);
});

// North Carolina (R package sf, MIT): counties in degrees, and in meters of the state plane, EPSG:32119.
Deno.test("contiguityFinder() gives the same links of a real layer in degrees and in meters", () => {
  const statePlane =
    "+proj=lcc +lat_0=33.75 +lon_0=-79 +lat_1=36.1666666666667 +lat_2=34.3333333333333 " +
    "+x_0=609601.22 +y_0=0 +ellps=GRS80 +units=m +no_defs";
  const layer: GeoJson = JSON.parse(referenceText("nc.geojson"));
  const meters = moveGeoJson(
    layer,
    (x, y) => proj4(statePlane).forward([x, y]) as [number, number],
  );
  const drawn = contiguityFinder(flatFromGeoJson(layer), { geographic: true }).find(null);
  const projected = contiguityFinder(flatFromGeoJson(meters)).find(null);
  assert.deepEqual(projected.touching, drawn.touching);
  assert.deepEqual(projected.edge, drawn.edge);
});
