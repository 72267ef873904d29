import assert from "node:assert/strict";
import { boundsOf, type FlatGeometry, pickFeatures } from "../../lib/layer/geometry.ts";

/** A unit square, nothing, and a two-part area whose second part has a hole (as triangles). */
const layer: FlatGeometry = {
  kinds: Uint8Array.of(3, 0, 3),
  partStarts: Uint32Array.of(0, 1, 1, 3),
  ringStarts: Uint32Array.of(0, 1, 2, 4),
  vertexStarts: Uint32Array.of(0, 5, 9, 13, 17),
  xy: Float64Array.from({ length: 34 }, (_, at) => at),
};

Deno.test("pickFeatures() gives back the same record when all rows are picked in order", () => {
  assert.equal(pickFeatures(layer, Uint32Array.of(0, 1, 2)), layer);
});

Deno.test("pickFeatures() rebuilds the offsets when rows are dropped", () => {
  const picked = pickFeatures(layer, Uint32Array.of(1, 2));
  assert.deepEqual([...picked.kinds], [0, 3]);
  assert.deepEqual([...picked.partStarts], [0, 0, 2]);
  assert.deepEqual([...picked.ringStarts], [0, 1, 3]);
  assert.deepEqual([...picked.vertexStarts], [0, 4, 8, 12]);
  assert.deepEqual([...picked.xy], Array.from({ length: 24 }, (_, at) => at + 10));
});

Deno.test("boundsOf() is null when there are no coordinates", () => {
  assert.equal(boundsOf(pickFeatures(layer, Uint32Array.of(1))), null);
  assert.deepEqual(boundsOf(layer), [0, 1, 32, 33]);
});
