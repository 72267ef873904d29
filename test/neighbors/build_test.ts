import assert from "node:assert/strict";
import { type Ground, neighborBuilder } from "../../lib/neighbors/build.ts";
import { parseRule } from "../../lib/neighbors/rule.ts";
import { flatFromGeometries } from "../support/flat_from_geojson.ts";
import { everyone, rowsOf } from "../support/links.ts";

/** Five unit squares: four in a row, A B C D, and E far to the east. */
const squares = flatFromGeometries([0, 1, 2, 3, 9].map((x) => ({
  type: "Polygon",
  coordinates: [[[x, 0], [x + 1, 0], [x + 1, 1], [x, 1], [x, 0]]],
})));

const ground: Ground = {
  geometry: squares,
  points: Float64Array.from([0.5, 0.5, 1.5, 0.5, 2.5, 0.5, 3.5, 0.5, 9.5, 0.5]),
  count: 5,
  usable: everyone(5),
  readLinks: () => ({
    from: Uint32Array.from([0, 1, 4, 2]),
    to: Uint32Array.from([1, 2, 0, 2]),
    weight: Float64Array.from([0.5, 2, 1, 3]),
  }),
  fieldKeys: () => ["x", "y", "x", null, "x"],
};

const links = (rule: string, over: Partial<Ground> = {}) =>
  rowsOf(neighborBuilder({ ...ground, ...over })(parseRule(rule)));

Deno.test("neighborBuilder() builds every kind of term", () => {
  assert.deepEqual(links("touching"), [[1], [0, 2], [1, 3], [2], []]);
  assert.deepEqual(links("edge"), [[1], [0, 2], [1, 3], [2], []]);
  assert.deepEqual(links("nearest:1"), [[1], [0], [1], [2], [3]]);
  assert.deepEqual(links("within:2m"), [[1, 2], [0, 2, 3], [0, 1, 3], [1, 2], []]);
  assert.deepEqual(links("triangulated"), [[1], [0, 2], [1, 3], [2, 4], [3]]);
  assert.deepEqual(links("same:REGION"), [[2, 4], [], [0, 4], [], [0, 2]]);
  assert.deepEqual(links("links:f.csv"), [[1], [2], [], [], [0]]);
});

Deno.test("neighborBuilder() applies options in a fixed order", () => {
  assert.deepEqual(links("touching order=2"), [[2], [3], [0], [1], []]);
  assert.deepEqual(links("touching upto=2"), [[1, 2], [0, 2, 3], [0, 1, 3], [1, 2], []]);
  assert.deepEqual(links("nearest:1 mutual"), [[1], [0], [], [], []]);
  assert.deepEqual(links("nearest:1 either"), [[1], [0, 2], [1, 3], [2, 4], [3]]);
  assert.deepEqual(links("touching islands=nearest"), [[1], [0, 2], [1, 3], [2, 4], [3]]);
  assert.deepEqual(links("(nearest:1 mutual) islands=nearest"), [[1], [0, 2], [1, 3], [2, 4], [3]]);
});

Deno.test("neighborBuilder() combines terms", () => {
  assert.deepEqual(links("touching + same:REGION"), [[1, 2, 4], [0, 2], [0, 1, 3, 4], [2], [0, 2]]);
  assert.deepEqual(links("touching & nearest:1"), [[1], [0], [1], [2], []]);
  assert.deepEqual(links("within:2m - touching"), [[2], [3], [0], [1], []]);
});

Deno.test("neighborBuilder() takes unusable areas out of contiguity and looks past them for distance", () => {
  const usable = Uint8Array.from([1, 0, 1, 1, 1]); // A C D E
  assert.deepEqual(links("touching", { usable }), [[], [2], [1], []]);
  assert.deepEqual(links("nearest:1", { usable }), [[1], [2], [1], [2]]);
  assert.deepEqual(links("touching islands=nearest", { usable }), [[1], [0, 2], [1, 3], [2]]);
  // A and C stay two steps apart although B, between them, has no value; as a group they are not.
  assert.deepEqual(links("touching order=2", { usable }), [[1], [0], [], []]);
  assert.deepEqual(links("(touching mutual) order=2", { usable }), [[], [], [], []]);
});

Deno.test("neighborBuilder() keeps the weights of given links, but not of oneself or of 0", () => {
  const topology = neighborBuilder(ground)(parseRule("links:f.csv"));
  assert.deepEqual(topology.given, Float64Array.from([0.5, 2, 1]));
  const none = { from: Uint32Array.of(0), to: Uint32Array.of(1), weight: Float64Array.of(0) };
  assert.deepEqual(links("links:f.csv", { readLinks: () => none }), [[], [], [], [], []]);
});

Deno.test("neighborBuilder() refuses a link that is given twice with different weights", () => {
  const twice = (weight: number[]) => () => ({
    from: Uint32Array.of(0, 0),
    to: Uint32Array.of(1, 1),
    weight: Float64Array.from(weight),
  });
  assert.deepEqual(links("links:f.csv", { readLinks: twice([2, 2]) })[0], [1]);
  assert.throws(() => links("links:f.csv", { readLinks: twice([2, 3]) }), {
    name: "UnfitDataError",
    message: /from area 0 to area 1 as it is given twice, with 2 and 3/,
  });
});

Deno.test("neighborBuilder() says what the ground lacks", () => {
  assert.throws(() => links("nearest:1", { points: null }), {
    name: "UnfitDataError",
    message: /Cannot measure distance .* --metric/,
  });
  assert.throws(() => links("touching", { geometry: null }), /this ground has no geometry/);
  assert.throws(() => links("links:f.csv", { readLinks: undefined }), /no link files/);
  assert.throws(() => links("same:A", { fieldKeys: undefined }), /no fields/);
  const points = flatFromGeometries([{ type: "Point", coordinates: [1, 2] }]);
  assert.throws(() => links("touching", { geometry: points }), {
    name: "UnfitDataError",
    message: /as the layer has only points; choose nearest:6/,
  });
});

Deno.test("neighborBuilder() refuses blocks that make too many links", () => {
  const count = 20_000;
  const crowd = {
    ...ground,
    count,
    usable: everyone(count),
    fieldKeys: () => new Array(count).fill(""),
  };
  assert.throws(() => neighborBuilder(crowd)(parseRule("same:COUNTRY")), {
    name: "UnfitDataError",
    message: /Cannot link the areas by the field COUNTRY as that makes 400 million links/,
  });
});

Deno.test("neighborBuilder() remembers what it built", () => {
  const build = neighborBuilder(ground);
  assert.equal(
    build(parseRule("touching + nearest:2")),
    build(parseRule("(touching) + nearest:2")),
  );
});
