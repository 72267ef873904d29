import assert from "node:assert/strict";
import { voronoiMesh } from "../../lib/demo/cell_mesh.ts";
import { outlineAreas, signedArea } from "../../lib/demo/outline.ts";

/** A bent lattice of 7 × 7 points, so that no four of them lie on one circle. */
const points = Float64Array.from({ length: 98 }, (_, i) => {
  const cell = Math.floor(i / 2), column = cell % 7, row = Math.floor(cell / 7);
  return i % 2 === 0 ? 100 * column + 7 * row : 100 * row + ((column * column * 5 + row) % 13);
});
const mesh = voronoiMesh(points);
const inner = (cell: number) => [cell % 7, Math.floor(cell / 7)].every((at) => at > 0 && at < 6);
const middle = 24;

Deno.test("outlineAreas() cuts an enclosed area out of the one around it", () => {
  const areaOf = Int32Array.from(
    { length: 49 },
    (_, cell) => cell === middle ? 1 : inner(cell) ? 0 : -1,
  );
  const [around, [[enclave]]] = outlineAreas(mesh, areaOf, 2);
  assert.equal(around.length, 1);
  const [outer, hole] = around[0];
  assert.ok(signedArea(outer) > 0 && signedArea(enclave) > 0);
  assert.ok(signedArea(hole) < 0 && Math.abs(signedArea(hole) + signedArea(enclave)) < 1e-6);
  const vertices = (ring: typeof hole) => new Set(ring.map((at) => at.join(" ")));
  assert.deepEqual(vertices(hole), vertices(enclave));
});

Deno.test("outlineAreas() gives separate pieces as parts, the largest first", () => {
  const areaOf = new Int32Array(49).fill(-1);
  for (const cell of [8, 22, 23]) areaOf[cell] = 0;
  const [parts] = outlineAreas(mesh, areaOf, 1);
  assert.equal(parts.length, 2);
  assert.ok(signedArea(parts[0][0]) > signedArea(parts[1][0]));
});

Deno.test("outlineAreas() closes rings and rounds to two decimals", () => {
  const areaOf = new Int32Array(49).fill(-1);
  areaOf[middle] = 0;
  const [[[ring]]] = outlineAreas(mesh, areaOf, 1);
  assert.deepEqual(ring[0], ring.at(-1));
  assert.ok(ring.flat().every((value) => value === Math.round(value * 100) / 100));
});

Deno.test("signedArea() is positive for counterclockwise rings", () => {
  assert.equal(signedArea([[0, 0], [2, 0], [2, 1], [0, 1], [0, 0]]), 2);
  assert.equal(signedArea([[0, 0], [0, 1], [2, 1], [2, 0], [0, 0]]), -2);
});
