import assert from "node:assert/strict";
import { UnfitDataError, UsageError } from "../../lib/layer/errors.ts";
import { earthSpace } from "../../lib/neighbors/earth_space.ts";
import { openSpace } from "../../lib/neighbors/open_space.ts";
import { type Ellipsoid, WGS84 } from "../../lib/project/ellipsoid.ts";
import { geodesicDistance } from "../../lib/project/geodesic.ts";
import { referenceCase } from "../support/reference.ts";
import { assertSound, rowsOf, topologyWhere } from "../support/links.ts";
import { randomNumbers } from "../support/maps.ts";

/** Points all over the globe, evenly by area. */
function worldWide(count: number): Float64Array {
  const draws = randomNumbers(2 * count, "world");
  return draws.map((u, at) => at % 2 === 0 ? 360 * u - 180 : Math.asin(2 * u - 1) * 180 / Math.PI);
}

/** Points in a box of degrees; longitudes beyond ±180 are wrapped. */
function boxed(
  count: number,
  [west, south, east, north]: readonly [number, number, number, number],
): Float64Array {
  return randomNumbers(2 * count, `box ${west}`).map((u, at) => {
    if (at % 2 === 1) return south + u * (north - south);
    const longitude = west + u * (east - west);
    return longitude > 180 ? longitude - 360 : longitude;
  });
}

const MAPS: Readonly<Record<string, Float64Array>> = {
  "all over the world": worldWide(120),
  "across the 180th meridian": boxed(90, [176, -20, 184, -12]),
  "around the north pole": boxed(90, [-180, 84, 180, 90]),
  "in a city": boxed(90, [11.5, 48.1, 11.6, 48.2]),
  "with shared and missing places": Float64Array.of(
    ...boxed(30, [179, -1, 181, 1]),
    ...[180, 0, -180, 0, 10, 90, 20, 90, NaN, NaN, 5, 5, 5, 5],
  ),
};

/** All others of a point by distance, ties by position. */
function sortedOthers(points: Float64Array, i: number): { j: number; d: number }[] {
  const distance = geodesicDistance(points, WGS84);
  const all = Array.from({ length: points.length / 2 }, (_, j) => j);
  return all.filter((j) => j !== i && !Number.isNaN(points[2 * j] + points[2 * i]))
    .map((j) => ({ j, d: distance(i, j) })).sort((a, b) => a.d - b.d || a.j - b.j);
}

for (const [where, points] of Object.entries(MAPS)) {
  const count = points.length / 2;

  Deno.test(`earthSpace() finds the nearest by geodesics ${where}`, () => {
    const { nearest, toNearest } = earthSpace(points, WGS84);
    for (const k of [7, 1, 12]) {
      const { topology, tied } = nearest(k);
      const reach = toNearest(k);
      let ties = 0;
      rowsOf(topology).forEach((row, i) => {
        const others = sortedOthers(points, i);
        assert.deepEqual(row, others.slice(0, k).map(({ j }) => j).sort((a, b) => a - b));
        if (others.length === 0) return assert.ok(Number.isNaN(reach[i]));
        assert.equal(reach[i], others[k - 1].d);
        if (others[k - 1].d === others[k]?.d) ties++;
      });
      assert.equal(tied, ties);
      assertSound(topology);
    }
  });

  Deno.test(`earthSpace() finds all within a geodesic distance ${where}`, () => {
    const { within } = earthSpace(points, WGS84);
    const distance = geodesicDistance(points, WGS84);
    // The border counts: one of the lengths is a distance between two of the points.
    for (const length of [distance(0, 1), distance(0, 1) - 1e-6, 3 * distance(0, 1)]) {
      const slow = topologyWhere(count, (i, j) => distance(i, j) <= length);
      assert.deepEqual(rowsOf(within(length)), rowsOf(slow));
    }
  });

  Deno.test(`earthSpace() finds the connecting distances ${where}`, () => {
    const { noneAlone, oneComponent } = earthSpace(points, WGS84).connecting();
    const located = [...Array(count).keys()].filter((i) => !Number.isNaN(points[2 * i]));
    assert.equal(noneAlone, Math.max(...located.map((i) => sortedOthers(points, i)[0].d)));
    assert.equal(oneComponent, longestOfTree(points, located));
  });
}

/** Prim's minimum spanning tree over all pairs: the longest edge taken. */
function longestOfTree(points: Float64Array, located: readonly number[]): number {
  const distance = geodesicDistance(points, WGS84);
  const reach = new Map(located.map((i) => [i, i === located[0] ? 0 : Infinity]));
  let longest = 0;
  while (reach.size > 0) {
    const [next, length] = [...reach].reduce((a, b) => b[1] < a[1] ? b : a);
    reach.delete(next);
    longest = Math.max(longest, length);
    for (const [i, known] of reach) reach.set(i, Math.min(known, distance(next, i)));
  }
  return longest;
}

Deno.test("earthSpace() measures the line of Karney 2013, table 4", () => {
  // karney-table4-short.json: published, recomputed with GeographicLib 2.1.2.
  const short = referenceCase("karney-table4-short");
  const { lon1, lat1, lon2, lat2 } = short.inputs;
  const space = earthSpace(Float64Array.of(lon1, lat1, lon2, lat2), WGS84);
  assert.ok(Math.abs(space.distance(0, 1) - short.expected.published_s12) < 2e-6);
  assert.ok(Math.abs(space.toNearest(1)[0] - short.expected.published_s12) < 2e-6);
  assert.deepEqual(rowsOf(space.within(space.distance(0, 1))), [[1], [0]]);
  assert.deepEqual(rowsOf(space.within(space.distance(0, 1) - 1e-6)), [[], []]);
});

Deno.test("earthSpace() counts places once whatever their name", () => {
  // 180° and -180° are one meridian, all longitudes are one at the pole; a pair at (5, 5).
  const points = Float64Array.of(180, 0, -180, 0, 10, 90, 20, 90, 5, 5, 5, 5, 1, 1, NaN, NaN);
  assert.equal(earthSpace(points, WGS84).countSharing(), 6);
  assert.equal(earthSpace(points, WGS84).located, 7);
});

Deno.test("earthSpace() refuses graphs and more nearest than there are", () => {
  const space = earthSpace(worldWide(5), WGS84);
  assert.equal(space.planar, false);
  assert.throws(
    () => space.graph("gabriel"),
    (error: Error) =>
      error instanceof UsageError && /gabriel.*ellipsoid.*--metric/.test(error.message),
  );
  assert.throws(() => space.nearest(5), UnfitDataError);
  assert.deepEqual(earthSpace(new Float64Array(0), WGS84).connecting(), {
    noneAlone: NaN,
    oneComponent: NaN,
  });
});

Deno.test("openSpace() is the sphere's where both axes are equal, and the plane without an ellipsoid", () => {
  const sphere: Ellipsoid = { a: 1e6, b: 1e6 };
  const right = Float64Array.of(0, 0, 90, 0);
  assert.ok(Math.abs(openSpace(right, sphere).distance(0, 1) - Math.PI / 2 * 1e6) < 1e-6);
  assert.equal(openSpace(right).distance(0, 1), 90);
});
