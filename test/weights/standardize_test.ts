import assert from "node:assert/strict";
import { STANDARDIZATIONS, standardize } from "../../lib/weights/standardize.ts";

// Area 0 has two neighbors, area 1 one, area 2 none, area 3 three.
const offsets = Uint32Array.of(0, 2, 3, 3, 6);
const raw = Float64Array.of(3, 4, 5, 1, 2, 2);

const sum = (values: ArrayLike<number>) => Array.from(values).reduce((a, b) => a + b, 0);
const isNear = (a: ArrayLike<number>, b: number[]) => {
  assert.equal(a.length, b.length);
  b.forEach((value, at) => assert.ok(Math.abs(a[at] - value) < 1e-15, `${a[at]} is not ${value}`));
};

Deno.test("standardize() makes rows sum to 1 when row is asked", () => {
  isNear(standardize(offsets, raw, "row"), [3 / 7, 4 / 7, 1, 0.2, 0.4, 0.4]);
});

Deno.test("standardize() copies when none is asked", () => {
  const same = standardize(offsets, raw, "none");
  assert.deepEqual(same, raw);
  assert.notEqual(same, raw);
});

Deno.test("standardize() makes all sum to the areas with a neighbor when total is asked", () => {
  // Sum 17, three areas with a neighbor.
  isNear(standardize(offsets, raw, "total"), [9, 12, 15, 3, 6, 6].map((w) => w / 17));
});

Deno.test("standardize() divides by root sums of squares first when variance is asked", () => {
  // Root sums of squares 5, 5, 3: rows 0.6 0.8 | 1 | 1/3 2/3 2/3, which sum to 1.4 + 1 + 5/3 =
  // 61/15; times 3 / (61/15) = 45/61.
  isNear(
    standardize(offsets, raw, "variance"),
    [0.6, 0.8, 1, 1 / 3, 2 / 3, 2 / 3].map((w) => w * 45 / 61),
  );
});

Deno.test("standardize() gives the same weights whatever constant they carried", () => {
  const tripled = raw.map((weight) => 3 * weight);
  for (const how of STANDARDIZATIONS) {
    const scaled = standardize(offsets, tripled, how);
    const factor = how === "none" ? 3 : 1;
    isNear(scaled, [...standardize(offsets, raw, how)].map((weight) => factor * weight));
    if (how !== "none") assert.ok(Math.abs(sum(scaled) - 3) < 1e-14);
  }
});

Deno.test("standardize() gives nothing when there are no links", () => {
  for (const how of STANDARDIZATIONS) {
    assert.equal(standardize(Uint32Array.of(0, 0, 0), new Float64Array(0), how).length, 0);
  }
});
