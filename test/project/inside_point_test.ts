import assert from "node:assert/strict";
import { insidePoint } from "../../lib/project/inside_point.ts";
import { flatFromGeometries, type Position } from "../support/flat_from_geojson.ts";

Deno.test("insidePoint() is the middle of the widest run at half height", () => {
  // A U: two arms 1 and 2 wide joined at the bottom; at half height (2) the right arm is the wider
  // one.
  const u: Position[] = [[0, 0], [6, 0], [6, 4], [4, 4], [4, 1], [1, 1], [1, 4], [0, 4], [0, 0]];
  assert.deepEqual(insidePoint(flatFromGeometries([{ type: "Polygon", coordinates: [u] }]), 0), [
    5,
    2,
  ]);
});

Deno.test("insidePoint() goes around holes and to the widest part", () => {
  const outer: Position[] = [[0, 0], [10, 0], [10, 10], [0, 10], [0, 0]];
  const hole: Position[] = [[1, 1], [8, 1], [8, 9], [1, 9], [1, 1]];
  const islet: Position[] = [[20, 4], [21, 4], [21, 5], [20, 5], [20, 4]];
  const geometry = flatFromGeometries([
    { type: "MultiPolygon", coordinates: [[islet], [outer, hole]] },
  ]);
  assert.deepEqual(insidePoint(geometry, 0), [9, 5]);
});

Deno.test("insidePoint() takes vertices at half height once", () => {
  // A diamond whose left and right corners lie exactly there.
  const diamond: Position[] = [[0, 1], [1, 0], [2, 1], [1, 2], [0, 1]];
  const geometry = flatFromGeometries([{ type: "Polygon", coordinates: [diamond] }]);
  assert.deepEqual(insidePoint(geometry, 0), [1, 1]);
});

Deno.test("insidePoint() is null when there is no inside", () => {
  const flat: Position[] = [[0, 0], [1, 0], [2, 0], [0, 0]];
  assert.equal(
    insidePoint(flatFromGeometries([{ type: "Polygon", coordinates: [flat] }]), 0),
    null,
  );
  assert.equal(insidePoint(flatFromGeometries([null]), 0), null);
});
