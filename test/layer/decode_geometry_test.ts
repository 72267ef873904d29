import assert from "node:assert/strict";
import { decodeLayer } from "../../lib/layer/decode_layer.ts";
import type { FlatGeometry } from "../../lib/layer/geometry.ts";
import { type AnyGeometry, fgbOf } from "../support/fgb.ts";

/** Decodes geometries by way of bytes that another writer made. */
function decoded(...geometries: AnyGeometry[]): FlatGeometry {
  return decodeLayer(fgbOf(geometries.map((geometry) => ({ geometry }))), "test").geometry;
}

const lists = (geometry: FlatGeometry) => ({
  kinds: [...geometry.kinds],
  partStarts: [...geometry.partStarts],
  ringStarts: [...geometry.ringStarts],
  vertexStarts: [...geometry.vertexStarts],
  xy: [...geometry.xy],
});

const square = (x: number, y: number, side: number) => [
  [x, y],
  [x + side, y],
  [x + side, y + side],
  [x, y + side],
  [x, y],
];

Deno.test("decodeGeometry() lays out parts, rings and vertices of polygons with holes", () => {
  const geometry = decoded(
    { type: "Polygon", coordinates: [square(0, 0, 4), square(1, 1, 1)] },
    { type: "MultiPolygon", coordinates: [[square(5, 0, 1)], [square(7, 0, 3), square(8, 1, 1)]] },
  );
  assert.deepEqual([...geometry.kinds], [3, 3]);
  // One part of two rings; then a part of one ring and a part of two.
  assert.deepEqual([...geometry.partStarts], [0, 1, 3]);
  assert.deepEqual([...geometry.ringStarts], [0, 2, 3, 5]);
  assert.deepEqual([...geometry.vertexStarts], [0, 5, 10, 15, 20, 25]);
  assert.deepEqual([...geometry.xy.subarray(0, 4)], [0, 0, 4, 0]);
  assert.deepEqual([...geometry.xy.subarray(2 * 20)], square(8, 1, 1).flat());
});

Deno.test("decodeGeometry() makes each point and each line a part of one ring", () => {
  assert.deepEqual(
    lists(decoded(
      { type: "Point", coordinates: [1, 2] },
      { type: "MultiPoint", coordinates: [[3, 4], [5, 6]] },
      { type: "LineString", coordinates: [[0, 0], [1, 1]] },
      { type: "MultiLineString", coordinates: [[[2, 2], [3, 3], [4, 4]], [[5, 5], [6, 6]]] },
    )),
    {
      kinds: [1, 1, 2, 2],
      partStarts: [0, 1, 3, 4, 6],
      ringStarts: [0, 1, 2, 3, 4, 5, 6],
      vertexStarts: [0, 1, 2, 3, 5, 8, 10],
      xy: [1, 2, 3, 4, 5, 6, 0, 0, 1, 1, 2, 2, 3, 3, 4, 4, 5, 5, 6, 6],
    },
  );
});

Deno.test("decodeGeometry() keeps the members of highest dimension of a collection", () => {
  const geometry = decoded({
    type: "GeometryCollection",
    geometries: [
      { type: "Point", coordinates: [9, 9] },
      { type: "Polygon", coordinates: [square(0, 0, 1)] },
      { type: "LineString", coordinates: [[0, 0], [1, 1]] },
      { type: "Polygon", coordinates: [square(2, 0, 1)] },
    ],
  });
  assert.deepEqual([...geometry.kinds], [3]);
  assert.deepEqual([...geometry.partStarts], [0, 2]);
  assert.deepEqual([...geometry.xy], [...square(0, 0, 1), ...square(2, 0, 1)].flat());
});

Deno.test("decodeGeometry() counts a coordinate that is not finite as no geometry", () => {
  const geometry = decoded(
    { type: "Point", coordinates: [1, NaN] },
    { type: "Polygon", coordinates: [[[0, 0], [1, 0], [Infinity, 1], [0, 0]]] },
    { type: "Point", coordinates: [7, 8] },
  );
  assert.deepEqual(lists(geometry), {
    kinds: [0, 0, 1],
    partStarts: [0, 0, 0, 1],
    ringStarts: [0, 1],
    vertexStarts: [0, 1],
    xy: [7, 8],
  });
});

Deno.test("decodeGeometry() drops one bad member together with its whole feature", () => {
  const geometry = decoded({
    type: "MultiPolygon",
    coordinates: [[square(0, 0, 1)], [[[5, 5], [6, -Infinity], [6, 6], [5, 5]]]],
  });
  assert.deepEqual(lists(geometry), {
    kinds: [0],
    partStarts: [0, 0],
    ringStarts: [0],
    vertexStarts: [0],
    xy: [],
  });
});

Deno.test("decodeGeometry() passes over heights", () => {
  const geometry = decoded({ type: "LineString", coordinates: [[0, 1, 50], [2, 3, 60]] });
  assert.deepEqual([...geometry.xy], [0, 1, 2, 3]);
});
