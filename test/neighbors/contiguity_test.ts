import assert from "node:assert/strict";
import { readdirSync } from "node:fs";
import { type Contiguity, contiguityFinder } from "../../lib/neighbors/contiguity.ts";
import { difference } from "../../lib/neighbors/combine.ts";
import { findComponents } from "../../lib/neighbors/components.ts";
import { parseLength } from "../../lib/project/length.ts";
import { referenceCase, referenceText, textColumn } from "../support/reference.ts";
import { assertSound, namedPairs, pairNames, rowsOf, topologyWhere } from "../support/links.ts";
import {
  flatFromGeoJson,
  flatFromGeometries,
  type GeoJson,
  geoJsonFromTopology,
  type GeoJsonGeometry,
  moveGeoJson,
} from "../support/flat_from_geojson.ts";

const asDrawn = (geometries: readonly GeoJsonGeometry[], geographic = false): Contiguity =>
  contiguityFinder(flatFromGeometries(geometries), { geographic }).find(null);

const ring = (...xy: number[]): number[][] => {
  const corners = Array.from({ length: xy.length / 2 }, (_, v) => [xy[2 * v], xy[2 * v + 1]]);
  return [...corners, corners[0]];
};

const polygon = (...rings: number[][][]): GeoJsonGeometry => ({
  type: "Polygon",
  coordinates: rings,
});

const box = (west: number, south: number, east: number, north: number): GeoJsonGeometry =>
  polygon(ring(west, south, east, south, east, north, west, north));

// Cases poly-*: small hand-made layers, each evident by drawing and computed with shapely / GEOS.
const polyCases = readdirSync(new URL("../../testdata/cases", import.meta.url))
  .filter((file) => file.startsWith("poly-"))
  .map((file) => file.replace(".json", ""));

/** 0 and 20 angles in which no side stays parallel to an axis. */
const ANGLES = Array.from({ length: 21 }, (_, turn) => turn * 0.2993);

for (const id of polyCases) {
  Deno.test(`contiguityFinder() finds the pairs of ${id}, turned by 20 odd angles too`, () => {
    const { inputs, expected } = referenceCase(id);
    const names = inputs.geojson.features.map((feature: { properties: { id: string } }) =>
      feature.properties.id
    );
    for (const angle of ANGLES) {
      const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
      const turned = moveGeoJson(inputs.geojson, (x, y) => [cos * x - sin * y, sin * x + cos * y]);
      const finder = contiguityFinder(flatFromGeoJson(turned));
      const { touching, edge } = finder.find(null);
      assert.deepEqual(pairNames(edge, names), namedPairs(expected.exact_shared_edge));
      assert.deepEqual(pairNames(touching, names), namedPairs(expected.exact_edge_or_corner));
      const rows = rowsOf(touching);
      assert.deepEqual(
        names.filter((_: string, i: number) => rows[i].length === 0),
        expected.no_neighbours,
      );
      if (expected.snap_distance === undefined) continue;
      const snapped = finder.find(parseLength(`${expected.snap_distance}m`));
      assert.deepEqual(pairNames(snapped.edge, names), namedPairs(expected.snapped_shared_edge));
      assert.deepEqual(
        pairNames(snapped.touching, names),
        namedPairs(expected.snapped_edge_or_corner),
      );
    }
  });
}

Deno.test("contiguityFinder() reports what only the tolerance and T-junctions made touch", () => {
  const { inputs } = referenceCase("poly-tjunction");
  const { report } = contiguityFinder(flatFromGeoJson(inputs.geojson)).find(null);
  // A-B and A-C share an outer corner each, B-C a side: no pair hangs on the T-junction alone.
  assert.equal(report.junctionPairs, 0);
  const tee = asDrawn([box(0, 1, 3, 2), box(1, 0, 2, 1)]).report;
  assert.deepEqual([tee.junctionPairs, tee.nearVertexPairs, tee.overlapPairs], [1, 0, 0]);
  const near = asDrawn([box(0, 0, 1, 1), box(1 + 1e-10, 0, 2, 1)]).report;
  assert.deepEqual([near.junctionPairs, near.nearVertexPairs], [0, 1]);
});

Deno.test("contiguityFinder() links areas that meet in one point with all others there", () => {
  // Eight wedges around the origin: everybody touches everybody, each shares a side with two.
  const wedge = (turn: number) => {
    const at = (angle: number) => [Math.cos(angle), Math.sin(angle)];
    const [a, b] = [turn, turn + 1].map((t) => t * Math.PI / 4);
    return polygon(ring(0, 0, ...at(a), ...at(b)));
  };
  const { touching, edge } = asDrawn(Array.from({ length: 8 }, (_, turn) => wedge(turn)));
  assert.equal(touching.indices.length, 8 * 7);
  assert.equal(edge.indices.length, 8 * 2);
});

Deno.test("contiguityFinder() links duplicate areas, and each with the other's neighbors", () => {
  const { touching, edge } = asDrawn([box(0, 0, 1, 1), box(0, 0, 1, 1), box(1, 0, 2, 1)]);
  assert.deepEqual(rowsOf(touching), [[1, 2], [0, 2], [0, 1]]);
  assert.deepEqual(edge, touching);
});

Deno.test("contiguityFinder() links an area that lies inside another which has no hole for it", () => {
  const { edge, report } = asDrawn([box(0, 0, 9, 9), box(3, 3, 5, 5), box(20, 0, 30, 9)]);
  assert.deepEqual(rowsOf(edge), [[1], [0], []]);
  assert.equal(report.overlapPairs, 1);
});

Deno.test("contiguityFinder() links overlapping areas, by crossing boundaries too", () => {
  // A cross: no vertex of one lies on or in the other.
  const { edge, report } = asDrawn([box(0, 4, 9, 5), box(4, 0, 5, 9)]);
  assert.deepEqual(rowsOf(edge), [[1], [0]]);
  assert.equal(report.overlapPairs, 1);
});

Deno.test("contiguityFinder() finds where two whole layers lie over each other, out of step", () => {
  // Two boards of 4 × 4 unit squares, one moved by half a square both ways: deep inside, sides that are matched
  // within one board cross sides that are matched within the other.
  const corners = [0, 0.5].flatMap((by) =>
    [0, 1, 2, 3].flatMap((x) => [0, 1, 2, 3].map((y) => [x + by, y + by]))
  );
  const { touching } = asDrawn(corners.map(([x, y]) => box(x, y, x + 1, y + 1)));
  assert.deepEqual(
    touching,
    topologyWhere(
      32,
      (i, j) =>
        Math.abs(corners[i][0] - corners[j][0]) <= 1 &&
        Math.abs(corners[i][1] - corners[j][1]) <= 1,
    ),
  );
});

Deno.test("contiguityFinder() takes no sharp corner for a stretch", () => {
  // Two needles that meet at the origin under 0.06°.
  const { touching, edge } = asDrawn([
    polygon(ring(0, 0, 10, 0, 10, -1)),
    polygon(ring(0, 0, 10, 1, 10, 0.01)),
  ]);
  assert.deepEqual(rowsOf(touching), [[1], [0]]);
  assert.deepEqual(rowsOf(edge), [[], []]);
});

Deno.test("contiguityFinder() handles rings that cross themselves and rings of nothing", () => {
  const bowtie = polygon(ring(0, 0, 1, 1, 1, 0, 0, 1));
  const point = polygon(ring(5, 5, 5, 5, 5, 5));
  const { touching, edge } = asDrawn([bowtie, box(1, 0, 2, 1), point, polygon()]);
  assertSound(touching);
  assert.deepEqual(rowsOf(touching), [[1], [0], [], []]);
  assert.deepEqual(rowsOf(edge), [[1], [0], [], []]);
});

Deno.test("contiguityFinder() compares lines: crossing is a point, running together a stretch", () => {
  const line = (...xy: number[]): GeoJsonGeometry => ({
    type: "LineString",
    coordinates: ring(...xy).slice(0, -1),
  });
  const { touching, edge } = asDrawn([line(0, 0, 9, 0), line(4, -1, 4, 1), line(2, 0, 3, 0)]);
  assert.deepEqual(rowsOf(touching), [[1, 2], [0], [0]]);
  assert.deepEqual(rowsOf(edge), [[2], [], [0]]);
});

Deno.test("contiguityFinder() gives the same links whatever the order and the start of rings", () => {
  const cells = [0, 1, 2].flatMap((x) => [0, 1, 2].map((y) => box(x, y, x + 1, y + 1)));
  const { touching, edge } = asDrawn(cells);
  const turned = asDrawn(cells.map((cell, at) => {
    const open = (cell.coordinates as number[][][])[0].slice(1);
    const moved = [...open.slice(at % 4), ...open.slice(0, at % 4)];
    const closed = [...moved, moved[0]];
    return polygon(at % 2 === 0 ? closed : closed.toReversed());
  }));
  assert.deepEqual(turned.touching, touching);
  assert.deepEqual(turned.edge, edge);
});

// Areas whose boundaries meet across the antimeridian, as data cut there have them.
Deno.test("contiguityFinder() joins both sides of the antimeridian in degrees only", () => {
  const cells = [box(170, 0, 180, 10), box(-180, 0, -170, 10), box(-180, 10, -170, 20)];
  assert.deepEqual(rowsOf(asDrawn(cells, true).touching), [[1, 2], [0, 2], [0, 1]]);
  assert.deepEqual(rowsOf(asDrawn(cells, true).edge), [[1], [0, 2], [1]]);
  assert.deepEqual(rowsOf(asDrawn(cells, false).touching), [[], [2], [1]]);
});

Deno.test("contiguityFinder() finds T-junctions on the antimeridian", () => {
  const cells = [box(170, 0, 180, 10), box(-180, 2, -170, 5)];
  const { edge } = asDrawn(cells, true);
  assert.deepEqual(rowsOf(edge), [[1], [0]]);
});

Deno.test("contiguityFinder() sees an area that is drawn across the antimeridian", () => {
  // One ring from 175° E to 175° W; its neighbors lie on either side, and a third far away inside its flat box.
  const across = polygon(ring(175, 0, -175, 0, -175, 10, 175, 10));
  const { edge } = asDrawn(
    [across, box(-175, 0, -165, 10), box(165, 2, 175, 8), box(0, 2, 10, 8)],
    true,
  );
  assert.deepEqual(rowsOf(edge), [[1, 2], [0], [0], []]);
});

Deno.test("contiguityFinder() finds T-junctions on a side that is drawn across the antimeridian", () => {
  const across = polygon(ring(175, 0, -175, 0, -175, 10, 175, 10));
  for (const west of [-179, 176]) {
    const north = box(west, 10, west + 2, 20);
    assert.deepEqual(rowsOf(asDrawn([north, across], true).edge), [[1], [0]]);
    assert.deepEqual(rowsOf(asDrawn([across, north], true).edge), [[1], [0]]);
  }
});

Deno.test("contiguityFinder() makes sectors touch at the pole", () => {
  const sectors = [-180, -60, 60].map((west) => box(west, -90, west + 120, -70));
  const { touching, edge } = asDrawn([...sectors, box(0, 0, 10, 10)], true);
  assert.deepEqual(rowsOf(touching), [[1, 2], [0, 2], [0, 1], []]);
  assert.deepEqual(rowsOf(edge), [[1, 2], [0, 2], [0, 1], []]);
});

// Case nc-contiguity-vs-literature: GEOS and shared vertices agree; the list is of Cressie & Read (1985).
Deno.test("contiguityFinder() finds 231 sides and 14 corners between the counties of North Carolina", () => {
  const { expected } = referenceCase("nc-contiguity-vs-literature");
  const layer: GeoJson = JSON.parse(referenceText("nc.geojson"));
  const names = namesOf(layer, "NAME");
  const { touching, edge } = contiguityFinder(flatFromGeoJson(layer), { geographic: true }).find(
    null,
  );
  assert.equal(edge.indices.length / 2, expected.rook_pairs);
  assert.equal(touching.indices.length / 2, expected.queen_pairs);
  assert.deepEqual(pairNames(difference(touching, edge), names), namedPairs(expected.corner_only));

  const ids = textColumn("nc.csv", "CNTY_ID"), counties = textColumn("nc.csv", "NAME");
  const nameOf = new Map(ids.map((id, i) => [String(Number(id)), counties[i]]));
  const { neighbours }: { neighbours: Record<string, string[]> } = JSON.parse(
    referenceText("nc_neighbours_cressie_read_1985.json"),
  );
  const published = new Set(
    Object.entries(neighbours).flatMap(([id, others]) =>
      namedPairs(others.map((other) => [nameOf.get(id)!, nameOf.get(other)!]))
    ),
  );
  assert.equal(published.size, expected.cressie_read_pairs);
  const found = new Set(pairNames(touching, names));
  const ours = [...found].filter((pair) => !published.has(pair));
  const theirs = [...published].filter((pair) => !found.has(pair));
  const listed = (side: string) =>
    namedPairs(expected.geometry_minus_literature.filter((row: unknown[]) => row[3] === side));
  assert.deepEqual(ours.sort(), listed("first only"));
  assert.deepEqual(theirs.sort(), listed("second only"));
});

const STATES: GeoJson = geoJsonFromTopology(
  JSON.parse(referenceText("us_states_10m.topojson")),
  "states",
);

function namesOf({ features }: GeoJson, field = "name"): string[] {
  return features.map(({ properties }) => String(properties[field]));
}

// Cases us49-rook-graph and us49-corner-only-pairs: us-atlas 3.0.1, geographic facts.
Deno.test("contiguityFinder() finds 107 joins of the contiguous United States, 109 with corners", () => {
  const { inputs, expected } = referenceCase("us49-rook-graph");
  const layer = {
    features: STATES.features.filter(({ properties }) => !inputs.drop.includes(properties.name)),
  };
  const names = namesOf(layer);
  const { touching, edge } = contiguityFinder(flatFromGeoJson(layer), { geographic: true }).find(
    null,
  );
  assert.equal(names.length, expected.n);
  assert.deepEqual(pairNames(edge, names), namedPairs(expected.edges));
  rowsOf(edge).forEach((row, i) => assert.ok(expected.degree_table[row.length].includes(names[i])));
  const corners = referenceCase("us49-corner-only-pairs").expected;
  assert.equal(touching.indices.length / 2, corners.joins_queen);
  assert.deepEqual(pairNames(difference(touching, edge), names), namedPairs(corners.corner_only));
});

// Cases us-islands, us-multipart and us-four-corners-point: the whole layer of 56 areas.
Deno.test("contiguityFinder() leaves Alaska, Hawaii and the territories alone", () => {
  const { expected } = referenceCase("us-islands");
  const names = namesOf(STATES);
  const geometry = flatFromGeoJson(STATES);
  const { touching, edge } = contiguityFinder(geometry, { geographic: true }).find(null);
  for (const topology of [touching, edge]) {
    const rows = rowsOf(topology);
    assert.deepEqual(names.filter((_, i) => rows[i].length === 0).sort(), expected.no_neighbours);
    assert.equal(findComponents(topology).count, expected.n_components);
  }
  for (const [name, stored] of Object.entries(referenceCase("us-multipart").expected)) {
    const i = names.indexOf(name);
    const parts = geometry.partStarts[i + 1] - geometry.partStarts[i];
    assert.equal(parts, (stored as { parts: number }).parts);
  }
});

// Case world110-borders: world-atlas 2.0.2, Fiji, Russia and Antarctica go around the globe.
Deno.test("contiguityFinder() finds 313 borders between the countries of the world", () => {
  const { expected } = referenceCase("world110-borders");
  const layer = geoJsonFromTopology(
    JSON.parse(referenceText("world_countries_110m.topojson")),
    "countries",
  );
  const names = namesOf(layer);
  const { touching, edge, report } = contiguityFinder(flatFromGeoJson(layer), { geographic: true })
    .find(null);
  assert.equal(names.length, expected.n);
  assert.equal(edge.indices.length / 2, expected.shared_edge_pairs);
  assert.equal(touching.indices.length / 2, expected.edge_or_corner_pairs);
  assert.deepEqual(pairNames(difference(touching, edge), names), namedPairs(expected.corner_only));
  const rows = rowsOf(touching);
  assert.deepEqual(names.filter((_, i) => rows[i].length === 0).sort(), expected.no_neighbours);
  assert.equal(report.overlapPairs, 0);
});

Deno.test("contiguityFinder() sees no poles in coordinates that cannot be degrees", () => {
  // Kilometers in a file whose format knows only degrees: beyond 90 "north" there is no pole where all meet.
  const layer = [box(0, 80, 10, 90), box(100, 100, 110, 110), box(200, 100, 210, 110)];
  assert.deepEqual(rowsOf(asDrawn(layer, true).touching), [[], [], []]);
  const degrees = [box(0, 80, 10, 90), box(100, 80, 110, 90), box(20, 50, 30, 60)];
  assert.deepEqual(rowsOf(asDrawn(degrees, true).touching), [[1], [0], []]);
});
