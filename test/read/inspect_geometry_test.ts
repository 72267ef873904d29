import assert from "node:assert/strict";
import { decodeLayer } from "../../lib/layer/decode_layer.ts";
import { geometryHealth } from "../../lib/read/inspect_geometry.ts";
import { crossesItself } from "../../lib/read/self_crossing.ts";
import { type AnyGeometry, fgbOf } from "../support/fgb.ts";

const polygon = (...rings: number[][][]): AnyGeometry => ({ type: "Polygon", coordinates: rings });
const health = (...geometries: AnyGeometry[]) =>
  geometryHealth(decodeLayer(fgbOf(geometries.map((geometry) => ({ geometry }))), "t"));

const SQUARE = [[0, 0], [4, 0], [4, 4], [0, 4], [0, 0]];
const HOLE = [[1, 1], [2, 1], [2, 2], [1, 2], [1, 1]];
const BOW_TIE = [[0, 0], [4, 4], [4, 0], [0, 4], [0, 0]];

Deno.test("geometryHealth() finds nothing wrong with sound polygons", () => {
  assert.deepEqual(health(polygon(SQUARE, HOLE), { type: "Point", coordinates: [0, 0] }), {
    none: [],
    shortRings: [],
    openRings: [],
    flatRings: [],
    selfCrossing: [],
    duplicates: [],
    multipart: [],
  });
});

Deno.test("geometryHealth() lists the rows of each fault", () => {
  const found = health(
    { type: "Point", coordinates: [NaN, 0] },
    polygon(SQUARE),
    polygon(BOW_TIE),
    polygon(SQUARE),
    polygon([[0, 0], [4, 0], [4, 4], [0, 4]]),
    polygon([[0, 0], [4, 0], [0, 0]]),
    { type: "MultiPolygon", coordinates: [[SQUARE], [[[9, 9], [10, 9], [10, 10], [9, 9]]]] },
  );
  assert.deepEqual(found, {
    none: [0],
    shortRings: [5],
    openRings: [4],
    // The bow tie's halves cancel; the ring of three vertices has no inside.
    flatRings: [2, 5],
    selfCrossing: [2],
    duplicates: [3],
    multipart: [6],
  });
});

Deno.test("geometryHealth() counts a polygon as duplicate only when its rings are the same", () => {
  const more = polygon(SQUARE, HOLE);
  assert.deepEqual(health(polygon(SQUARE), more, more, polygon(SQUARE)).duplicates, [2, 3]);
  const split = { type: "MultiPolygon", coordinates: [[SQUARE], [HOLE]] };
  assert.deepEqual(health(more, split).duplicates, []);
});

const flat = (ring: readonly (readonly number[])[]) => Float64Array.from(ring.flat());

Deno.test("crossesItself() sees a hole that leaves its polygon", () => {
  assert.ok(crossesItself([flat(SQUARE), flat([[3, 1], [5, 1], [5, 2], [3, 1]])]));
  assert.ok(!crossesItself([flat(SQUARE), flat(HOLE)]));
});

Deno.test("crossesItself() lets rings touch, repeat vertices and double back", () => {
  assert.ok(!crossesItself([flat(SQUARE), flat([[0, 0], [2, 1], [1, 2], [0, 0]])]));
  assert.ok(!crossesItself([flat([[0, 0], [4, 0], [4, 0], [4, 4], [0, 0]])]));
  assert.ok(!crossesItself([flat([[0, 0], [4, 0], [6, 0], [4, 0], [4, 4], [0, 0]])]));
});

Deno.test("crossesItself() agrees with comparing all pairs on random rings", () => {
  let state = 12345;
  const random = () => (state = (state * 1103515245 + 12345) % 2 ** 31) / 2 ** 31;
  let crossing = 0;
  for (let round = 0; round < 300; round++) {
    const ring = Array.from({ length: 4 + round % 4 }, () => [random(), random()]);
    ring.push(ring[0]);
    const slow = allPairsCross(ring);
    if (slow) crossing++;
    assert.equal(crossesItself([flat(ring)]), slow);
  }
  assert.ok(crossing > 50 && crossing < 250);
});

function allPairsCross(ring: number[][]): boolean {
  const area = ([ax, ay]: number[], [bx, by]: number[], [px, py]: number[]) =>
    (bx - ax) * (py - ay) - (by - ay) * (px - ax);
  for (let i = 0; i + 1 < ring.length; i++) {
    for (let j = 0; j < i; j++) {
      const [a, b, c, d] = [ring[i], ring[i + 1], ring[j], ring[j + 1]];
      const apart = area(a, b, c) * area(a, b, d) < -1e-12 &&
        area(c, d, a) * area(c, d, b) < -1e-12;
      if (apart) return true;
    }
  }
  return false;
}
