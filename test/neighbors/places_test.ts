import assert from "node:assert/strict";
import { countSharingPlaces, distinctPlaces } from "../../lib/neighbors/places.ts";
import { roundPoints } from "../../lib/neighbors/rounded_points.ts";
import { randomPoints } from "../support/links.ts";

Deno.test("distinctPlaces() sorts points by place, in the order of the first point there", () => {
  const points = Float64Array.from([5, 5, NaN, NaN, 1, 1, 5, 5, 1, 2]);
  const { xy, starts, members } = distinctPlaces(roundPoints(points));
  assert.deepEqual([...xy], [5, 5, 1, 1, 1, 2]);
  assert.deepEqual([...starts], [0, 2, 3, 4]);
  assert.deepEqual([...members], [0, 3, 2, 4]);
});

Deno.test("countSharingPlaces() counts every point that is not alone at its place", () => {
  assert.equal(countSharingPlaces(Float64Array.from([5, 5, 1, 1, 5, 5, NaN, NaN, NaN, NaN])), 2);
  const points = randomPoints(500, "sharing", { side: 20, whole: true });
  const keys = Array.from({ length: 500 }, (_, i) => `${points[2 * i]} ${points[2 * i + 1]}`);
  const slow = keys.filter((key) => keys.filter((other) => other === key).length > 1);
  assert.equal(countSharingPlaces(points), slow.length);
});

Deno.test("roundPoints() keeps micrometers in meters and twelve digits of small coordinates", () => {
  assert.equal(roundPoints(Float64Array.from([0.12345678, 0, 5000, 1])).xy[0], 0.123457);
  assert.equal(roundPoints(Float64Array.from([0.12345678, 0, 1, 1])).xy[0], 0.12345678);
  assert.deepEqual([...roundPoints(Float64Array.from([NaN, 3, 1, 1])).xy], [NaN, NaN, 1, 1]);
});
