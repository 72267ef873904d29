import assert from "node:assert/strict";
import { WGS84 } from "../../lib/project/ellipsoid.ts";
import { earthSpace } from "../../lib/neighbors/earth_space.ts";
import { planeSpace } from "../../lib/neighbors/plane_space.ts";
import { neighborBuilder } from "../../lib/neighbors/build.ts";
import { ruleText } from "../../lib/neighbors/rule.ts";
import { planSweep } from "../../lib/sweep/plan.ts";
import { standardDefinitions, type StandardSweep } from "../../lib/sweep/standard.ts";
import { parseWeightRule } from "../../lib/weights/weight_rule.ts";
import { weigh } from "../../lib/weights/weigh.ts";
import { randomNumbers } from "./small_maps.ts";

function textsOf({ definitions }: StandardSweep): string[] {
  return definitions.map(({ rule, weights }) => `${ruleText(rule)} ${weights}`);
}

function randomPoints(count: number): Float64Array {
  const random = randomNumbers(8);
  return Float64Array.from({ length: 2 * count }, () => 50_000 * random());
}

/** Median distance to the k-th nearest by measuring everybody against everybody. */
function slowMedian(points: Float64Array, k: number): number {
  const places = Array.from(
    { length: points.length / 2 },
    (_, i) => [points[2 * i], points[2 * i + 1]],
  );
  const sorted = places.map(([x, y]) =>
    places.map(([a, b]) => Math.hypot(x - a, y - b)).sort((d, e) => d - e)[k]
  ).sort((d, e) => d - e);
  const { length } = sorted;
  return length % 2 === 1
    ? sorted[(length - 1) / 2]
    : (sorted[length / 2 - 1] + sorted[length / 2]) / 2;
}

Deno.test("standardDefinitions() of polygons are three contiguities, six nearest, five bands and more", () => {
  const points = randomPoints(40);
  const sweep = standardDefinitions({ shape: "polygon", space: planeSpace(points), count: 40 });
  const texts = textsOf(sweep);
  assert.deepEqual(texts.filter((text) => !text.includes("within")), [
    "touching equal",
    "edge equal",
    "touching upto=2 equal",
    ...[4, 5, 6, 8, 10, 12].map((k) => `nearest:${k} equal`),
    "triangulated equal",
    "gabriel equal",
    "nearest:12 inverse:1",
  ]);
  assert.equal(texts.filter((text) => text.includes("within")).length, 6);
  assert.deepEqual(sweep.notes, []);
});

Deno.test("standardDefinitions() of points have no contiguity but two more graphs", () => {
  const texts = textsOf(
    standardDefinitions({ shape: "point", space: planeSpace(randomPoints(40)), count: 40 }),
  );
  assert.ok(!texts.some((text) => /touching|edge/.test(text)));
  assert.ok(["relative equal", "sphere equal"].every((text) => texts.includes(text)));
});

Deno.test("standardDefinitions() reach as far as the median distances, rounded up", () => {
  for (const count of [40, 41]) {
    const points = randomPoints(count);
    const { definitions } = standardDefinitions({
      shape: "point",
      space: planeSpace(points),
      count,
    });
    const bands = definitions.flatMap(({ rule, weights }) =>
      rule.kind === "within" && weights === "equal" ? [rule.distance.meters] : []
    );
    assert.equal(bands.length, 5);
    [4, 6, 8, 12, 16].forEach((k, at) => {
      const median = slowMedian(points, k);
      assert.ok(
        bands[at] >= median - 1e-5 && bands[at] <= median * (1 + 1e-5),
        `${bands[at]} ${median}`,
      );
    });
    const weighted = definitions[definitions.length - 1];
    const [, to6th, , to12th] = definitions.filter(({ rule }) => rule.kind === "within");
    assert.equal(ruleText(weighted.rule), ruleText(to12th.rule));
    assert.equal(`within:${weighted.weights.slice("gaussian:".length)}`, ruleText(to6th.rule));
  }
});

Deno.test("standardDefinitions() give the whole lengths of a regular grid, shared bands once planned", () => {
  // 9 x 9 points, 1 km apart. The 49 that are not on the border have 4 others at 1 km and 4 more at sqrt(2)
  // km; only the 25 farther in have 12 within 2 km, so the median 12th nearest is sqrt(5) km away.
  const points = Float64Array.from(
    { length: 162 },
    (_, at) => 1000 * (at % 2 === 0 ? (at >> 1) % 9 : Math.floor((at >> 1) / 9)),
  );
  const { definitions } = standardDefinitions({
    shape: "point",
    space: planeSpace(points),
    count: 81,
  });
  const plan = planSweep({ main: definitions[0], vary: null, standard: definitions });
  const bands = plan.definitions.filter(({ family }) => family === "band").map((one) =>
    one.ruleText
  );
  assert.deepEqual(bands.slice(0, 3), ["within:1km", "within:1.41422km", "within:2.23607km"]);
  assert.ok(plan.repeated.includes("within:1.41422km"));
});

Deno.test("standardDefinitions() leave out what few areas do not allow, and say so", () => {
  const nine = standardDefinitions({
    shape: "polygon",
    space: planeSpace(randomPoints(9)),
    count: 9,
  });
  const texts = textsOf(nine);
  assert.ok(texts.includes("nearest:8 equal") && !texts.some((text) => /nearest:1/.test(text)));
  assert.equal(texts.filter((text) => text.includes("within")).length, 3);
  assert.deepEqual(nine.notes, [
    "With 9 areas no definition by the 10th nearest area or beyond could be tried",
  ]);
  const two = standardDefinitions({ shape: "point", space: planeSpace(randomPoints(2)), count: 2 });
  assert.deepEqual(two.definitions, []);
  assert.equal(
    standardDefinitions({ shape: "point", space: planeSpace(new Float64Array(0)), count: 0 }).notes
      .length,
    1,
  );
});

Deno.test("standardDefinitions() without distances are the contiguities", () => {
  const sweep = standardDefinitions({ shape: "polygon", space: null, count: 100 });
  assert.deepEqual(textsOf(sweep), ["touching equal", "edge equal", "touching upto=2 equal"]);
  assert.match(sweep.notes[0], /Without a CRS or a planar metric/);
  assert.deepEqual(
    standardDefinitions({ shape: "point", space: null, count: 100 }).definitions,
    [],
  );
});

Deno.test("standardDefinitions() do not use lengths of 0 nor inverse distances of 0", () => {
  // Twenty places with six areas each: the five nearest others are at the same place.
  const places = randomPoints(20);
  const points = Float64Array.from({ length: 240 }, (_, at) => places[at % 40]);
  const sweep = standardDefinitions({ shape: "point", space: planeSpace(points), count: 120 });
  const texts = textsOf(sweep);
  assert.ok(!texts.some((text) => text.includes("inverse")));
  assert.equal(texts.filter((text) => /^within.* equal$/.test(text)).length, 4);
  assert.match(sweep.notes[0], /Half of the areas have 4 or more others at the same point/);
  assert.match(sweep.notes[1], /inverse:1 could not be tried/);
});

Deno.test("standardDefinitions() leave areas without a place out of all distances", () => {
  const points = Float64Array.of(...randomPoints(10), NaN, NaN);
  const sweep = standardDefinitions({ shape: "point", space: planeSpace(points), count: 11 });
  assert.ok(!textsOf(sweep).some((text) => text.startsWith("nearest:10")));
  assert.equal(sweep.notes[0], "1 of 11 areas have no place and no neighbor by distance");
  assert.ok(textsOf(sweep).every((text) => !text.includes("NaN")));
});

Deno.test("every standard definition can be built and weighed", () => {
  const count = 60, points = randomPoints(count);
  const { definitions } = standardDefinitions({ shape: "point", space: planeSpace(points), count });
  const build = neighborBuilder({
    geometry: null,
    points,
    count,
    usable: new Uint8Array(count).fill(1),
  });
  for (const { rule, weights } of definitions) {
    const weighed = weigh(build(rule), { weights: parseWeightRule(weights), points });
    assert.equal(weighed.offsets.length, count + 1, ruleText(rule));
    assert.ok(weighed.indices.length > 0, ruleText(rule));
  }
});

Deno.test("standardDefinitions() on the ellipsoid have bands in meters but no graphs, and say so", () => {
  // A thousandth of a degree is about 111 m, so the bands are hundreds of meters wide.
  const degrees = randomPoints(40).map((u) => u / 1e6);
  const space = earthSpace(degrees, WGS84);
  const { definitions, notes } = standardDefinitions({ shape: "point", space, count: 40 });
  const rules = definitions.map(({ rule }) => ruleText(rule));
  assert.ok(rules.some((rule) => rule.startsWith("within:")));
  assert.ok(!rules.some((rule) => /triangulated|gabriel|relative|sphere/.test(rule)));
  assert.ok(notes.some((note) => /ellipsoid/.test(note)));
});
