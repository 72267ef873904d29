import assert from "node:assert/strict";
import { spatialLag } from "../../lib/weights/lag.ts";
import { weigh } from "../../lib/weights/weigh.ts";

/** 0 and 1 are neighbors, 1 counts 2 as well, 2 counts nobody. */
const topology = { offsets: Uint32Array.of(0, 1, 3, 3), indices: Uint32Array.of(1, 0, 2) };

Deno.test("spatialLag() is the mean of the neighbors when rows sum to 1, 0 without any", () => {
  assert.deepEqual(
    spatialLag(weigh(topology), Float64Array.of(2, 5, 8)),
    Float64Array.of(5, 5, 0),
  );
});

Deno.test("spatialLag() is NaN only beside a NaN", () => {
  assert.deepEqual(
    spatialLag(weigh(topology), Float64Array.of(2, 5, NaN)),
    Float64Array.of(5, NaN, 0),
  );
});

Deno.test("spatialLag() refuses values of another length", () => {
  assert.throws(
    () => spatialLag(weigh(topology), Float64Array.of(1, 2)),
    /2 values with weights of 3 areas/,
  );
});
