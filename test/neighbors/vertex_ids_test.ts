import assert from "node:assert/strict";
import { boundariesOf } from "../../lib/neighbors/boundaries.ts";
import { vertexIds } from "../../lib/neighbors/vertex_ids.ts";
import { referenceCase, referenceText } from "../support/reference.ts";
import { randomPoints } from "../support/links.ts";
import { flatFromGeoJson, geoJsonFromTopology } from "../support/flat_from_geojson.ts";

Deno.test("vertexIds() agrees with comparing all vertices, chains of near ones included", () => {
  for (const tolerance of [0, 0.6, 1, 3]) {
    const xy = randomPoints(300, `ids ${tolerance}`, { side: 60 }).map((u) =>
      Math.round(4 * u) / 4
    );
    const group = Array.from({ length: 300 }, (_, v) => v);
    const near = (a: number, b: number) =>
      Math.abs(xy[2 * a] - xy[2 * b]) <= tolerance &&
      Math.abs(xy[2 * a + 1] - xy[2 * b + 1]) <= tolerance;
    for (let changed = true; changed;) {
      changed = false;
      for (let a = 0; a < 300; a++) {
        for (let b = 0; b < 300; b++) {
          if (!near(a, b) || group[a] <= group[b]) continue;
          group[a] = group[b];
          changed = true;
        }
      }
    }
    const { ids, count } = vertexIds(xy, tolerance);
    assert.equal(count, new Set(group).size);
    assert.equal(new Set(group.map((g, v) => `${g} ${ids[v]}`)).size, count);
  }
});

Deno.test("vertexIds() joins near vertices across every border of its cells, in both orders", () => {
  // Pairs 0.9 tolerances apart, moved by 0.8 of a tolerance over more than two cells: whatever the borders are,
  // pairs lie across them.
  for (let step = 0; step < 3000; step++) {
    const [low, high] = [step * 0.8, step * 0.8 + 0.9];
    for (const xy of [[low, 0, high, 0], [high, 0, low, 0], [0, low, 0, high], [0, high, 0, low]]) {
      assert.equal(vertexIds(Float64Array.from(xy), 1).count, 1, `step ${step}`);
    }
  }
});

Deno.test("vertexIds() takes 0 and -0 as one place, and gives exact places when nothing is near", () => {
  const { ids, exactIds, count } = vertexIds(Float64Array.from([0, 1, -0, 1, 5, 5]), 1e-9);
  assert.deepEqual([...ids], [0, 0, 1]);
  assert.equal(ids, exactIds);
  assert.equal(count, 2);
});

// Case us-four-corners-point: one vertex of the states layer belongs to four states, at the monument.
Deno.test("vertexIds() finds the one vertex that four states share, and 61 that three share", () => {
  const { expected } = referenceCase("us-four-corners-point");
  const layer = geoJsonFromTopology(JSON.parse(referenceText("us_states_10m.topojson")), "states");
  const { xy, areaOf } = boundariesOf(flatFromGeoJson(layer));
  const { ids, count } = vertexIds(xy, 0);
  const statesAt = Array.from({ length: count }, () => new Set<number>());
  const first = new Map<number, number>();
  ids.forEach((id, v) => {
    statesAt[id].add(areaOf[v]);
    if (!first.has(id)) first.set(id, v);
  });
  const four = statesAt.flatMap((states, id) => states.size === 4 ? [id] : []);
  assert.equal(four.length, 1);
  assert.equal(
    statesAt.filter((states) => states.size === 3).length,
    expected.vertices_in_exactly_three_states,
  );
  const names = [...statesAt[four[0]]].map((i) => layer.features[i].properties.name).sort();
  assert.deepEqual(names, expected.vertices_in_four_states[0]);
  const v = first.get(four[0])!;
  assert.ok(Math.abs(xy[2 * v] - expected.layer_lon) < 1e-9);
  assert.ok(Math.abs(xy[2 * v + 1] - expected.layer_lat) < 1e-9);
  assert.ok(
    Math.hypot(xy[2 * v] - expected.monument_lon, xy[2 * v + 1] - expected.monument_lat) < 0.005,
  );
});
