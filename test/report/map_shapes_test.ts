import assert from "node:assert/strict";
import { GEOMETRY_KINDS } from "../../lib/layer/geometry.ts";
import type { MapFrame } from "../../lib/report/map_frame.ts";
import { addShape } from "../../lib/report/map_shapes.ts";
import { relativePath } from "../../lib/report/relative_path.ts";

type Ring = readonly (readonly [number, number])[];

/** A frame that only rounds, y kept as it is, around one feature. */
function frameOf(
  kind: "polygon" | "line" | "point",
  parts: readonly (readonly Ring[])[],
): MapFrame {
  const rings = parts.flat();
  const sum = (counts: readonly number[]) => {
    const starts = [0];
    for (const count of counts) starts.push(starts[starts.length - 1] + count);
    return Uint32Array.from(starts);
  };
  return {
    geometry: {
      kinds: Uint8Array.of(GEOMETRY_KINDS.indexOf(kind)),
      partStarts: Uint32Array.of(0, parts.length),
      ringStarts: sum(parts.map((part) => part.length)),
      vertexStarts: sum(rings.map((ring) => ring.length)),
      xy: Float64Array.from(rings.flat(2)),
    },
    width: 100,
    height: 100,
    across: Math.round,
    down: Math.round,
    turn: 0,
    metersPerUnit: null,
  };
}

function pathOf(frame: MapFrame, radius = 10): string {
  const path = relativePath();
  addShape(path, frame, 0, { name: "high among high", radius });
  return path.text();
}

const SQUARE: Ring = [[0, 0], [10, 0], [10, 10], [0, 10], [0, 0]];

Deno.test("addShape() writes steps and closes the ring without repeating its first point", () => {
  assert.equal(pathOf(frameOf("polygon", [[SQUARE]])), "m0 0 10 0 0 10-10 0z");
});

Deno.test("addShape() drops vertices that round to the same place or go straight on", () => {
  const busy: Ring = [
    [0, 0],
    [0.2, 0.1],
    [4, 0],
    [7, 0.3],
    [10, 0],
    [10, 5],
    [10, 10],
    [0, 10],
    [0, 0],
  ];
  assert.equal(pathOf(frameOf("polygon", [[busy]])), "m0 0 10 0 0 10-10 0z");
});

Deno.test("addShape() turns outer rings one way and holes the other, however they are stored", () => {
  const hole: Ring = [[2, 2], [4, 2], [4, 4], [2, 4], [2, 2]];
  const expected = pathOf(frameOf("polygon", [[SQUARE, hole]]));
  const back = (ring: Ring) => [...ring].reverse();
  // Reversed rings start at the same vertex, since the stored one repeats it at the end.
  const areas = (text: string) =>
    text.split("z").filter(Boolean).map((ring) => {
      const numbers = ring.match(/-?\d+/g)!.map(Number);
      let x = 0, y = 0, twice = 0;
      for (let i = 2; i < numbers.length; i += 2) {
        const [nextX, nextY] = [x + numbers[i], y + numbers[i + 1]];
        twice += x * nextY - nextX * y;
        [x, y] = [nextX, nextY];
      }
      return twice / 2;
    });
  assert.deepEqual(areas(expected), [100, -4]);
  for (const rings of [[back(SQUARE), hole], [SQUARE, back(hole)], [back(SQUARE), back(hole)]]) {
    assert.deepEqual(areas(pathOf(frameOf("polygon", [rings]))), [100, -4]);
  }
});

Deno.test("addShape() leaves one dot for a part too small to see, and none for a hole", () => {
  const speck: Ring = [[5, 5], [5.1, 5], [5.1, 5.1], [5, 5]];
  const other: Ring = [[5.2, 5.2], [5.3, 5.2], [5.3, 5.3], [5.2, 5.2]];
  assert.equal(pathOf(frameOf("polygon", [[speck], [other]])), "m5 5h1v1h-1z");
  assert.equal(pathOf(frameOf("polygon", [[SQUARE, speck]])), "m0 0 10 0 0 10-10 0z");
});

Deno.test("addShape() draws every vertex of a point feature as a mark", () => {
  const path = pathOf(frameOf("point", [[[[0, 0]]], [[[100, 0]]]]));
  // An upward triangle: 12 up, then 9 down from the middle, 12 to each side.
  assert.equal(path, "m0-12 12 21-24 0zm100 0 12 21-24 0z");
});

Deno.test("addShape() draws lines open", () => {
  assert.equal(pathOf(frameOf("line", [[[[0, 0], [3, 4], [3, 9]]]])), "m0 0 3 4 0 5");
  assert.equal(pathOf(frameOf("line", [[[[1, 1], [1.2, 1]]]])), "m1 1h1v1h-1z");
});
