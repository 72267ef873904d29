import assert from "node:assert/strict";
import { stepsFrom, voronoiMesh } from "../../lib/demo/cell_mesh.ts";

// A point at the origin and four at distance 2 on the axes: the cell of the first is the square of side 2 around it.
const cross = voronoiMesh(Float64Array.of(0, 0, 2, 0, 0, 2, -2, 0, 0, -2));

Deno.test("voronoiMesh() walks the square cell amid four points once around", () => {
  const sides = [0, 1, 2, 3].map((s) => cross.offsets[0] + s);
  assert.equal(cross.offsets[1] - cross.offsets[0], 4);
  assert.deepEqual([...cross.neighbors.slice(0, 4)].sort(), [1, 2, 3, 4]);
  const place = (corner: number) => [cross.corners[2 * corner], cross.corners[2 * corner + 1]];
  for (const s of sides) {
    const [x, y] = place(cross.from[s]);
    assert.deepEqual([Math.abs(x), Math.abs(y)], [1, 1]);
    // The side that starts where this one ends is another side of the same cell.
    assert.equal(sides.filter((next) => cross.from[next] === cross.to[s]).length, 1);
  }
});

Deno.test("voronoiMesh() marks cells on the hull as open", () => {
  assert.deepEqual([...cross.open], [0, 1, 1, 1, 1]);
});

Deno.test("voronoiMesh() refuses points on one line", () => {
  assert.throws(
    () => voronoiMesh(Float64Array.of(0, 0, 1, 1, 2, 2)),
    /3 points .* span no triangle/,
  );
});

Deno.test("stepsFrom() counts cells from the nearest source", () => {
  // A row of points over a row of points: cells 0 1 2 3 below, 4 5 6 7 above.
  const mesh = voronoiMesh(
    Float64Array.of(0, 0, 1, 0.1, 2, -0.1, 3, 0, 0, 1.2, 1, 1.1, 2, 1, 3, 1.1),
  );
  assert.deepEqual([...stepsFrom(mesh, Uint8Array.of(1, 0, 0, 0, 1, 0, 0, 0))].slice(0, 4), [
    0,
    1,
    2,
    3,
  ]);
  assert.deepEqual([...stepsFrom(mesh, new Uint8Array(8))], new Array(8).fill(-1));
});
