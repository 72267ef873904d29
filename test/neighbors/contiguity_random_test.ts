import assert from "node:assert/strict";
import { contiguityFinder } from "../../lib/neighbors/contiguity.ts";
import { parseLength } from "../../lib/project/length.ts";
import { randomNumbers } from "../support/maps.ts";
import { assertSound, topologyWhere } from "../support/links.ts";
import { flatFromGeometries, type GeoJsonGeometry } from "../support/flat_from_geojson.ts";

/** A rectangle: west, south, east, north. */
type Box = readonly [number, number, number, number];

/** Cuts a square into rectangles along whole numbers, at random places; their corners make T-junctions. */
function cutUp(seed: string): Box[] {
  const draws = randomNumbers(400, seed);
  let next = 0;
  const done: Box[] = [], open: Box[] = [[0, 0, 64, 64]];
  while (open.length > 0) {
    const [west, south, east, north] = open.pop()!;
    const wide = east - west > north - south;
    const low = wide ? west : south, high = wide ? east : north;
    const cut = low + 1 + Math.floor(draws[next++] * (high - low - 1));
    const small = high - low < 2 || (east - west) * (north - south) < 200 * draws[next++];
    if (small) done.push([west, south, east, north]);
    else if (wide) open.push([west, south, cut, north], [cut, south, east, north]);
    else open.push([west, south, east, cut], [west, cut, east, north]);
  }
  return done;
}

/** Length of the overlap of two rectangles eastward and northward; below 0 the gap between them. */
function overlap(a: Box, b: Box): [number, number] {
  return [Math.min(a[2], b[2]) - Math.max(a[0], b[0]), Math.min(a[3], b[3]) - Math.max(a[1], b[1])];
}

/** Areas of one or more rectangles, turned by an odd angle. */
function draw(areas: readonly (readonly Box[])[], angle = 0): GeoJsonGeometry[] {
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)];
  const turn = ([x, y]: [number, number]) => [cos * x - sin * y, sin * x + cos * y];
  return areas.map((boxes) => ({
    type: "MultiPolygon",
    coordinates: boxes.map(([west, south, east, north]) => [
      ([[west, south], [east, south], [east, north], [west, north], [west, south]] as [
        number,
        number,
      ][])
        .map(turn),
    ]),
  }));
}

Deno.test("contiguityFinder() agrees with comparing all rectangles of random cuts, turned", () => {
  for (let trial = 0; trial < 20; trial++) {
    const boxes = cutUp(`cuts ${trial}`);
    // Two out of three areas are one rectangle, the others two or more, wherever these are.
    const draws = randomNumbers(boxes.length, `areas ${trial}`);
    const areas: Box[][] = [];
    boxes.forEach((box, at) => {
      if (areas.length > 3 && draws[at] < 0.3) {
        areas[Math.floor(draws[at] / 0.3 * areas.length)].push(box);
      } else areas.push([box]);
    });
    const { touching, edge } = contiguityFinder(flatFromGeometries(draw(areas, trial * 0.37))).find(
      null,
    );
    const some = (i: number, j: number, test: (a: Box, b: Box) => boolean) =>
      areas[i].some((a) => areas[j].some((b) => test(a, b)));
    assertSound(touching);
    assert.deepEqual(
      touching,
      topologyWhere(areas.length, (i, j) => some(i, j, (a, b) => Math.min(...overlap(a, b)) >= 0)),
    );
    const side = (a: Box, b: Box) =>
      Math.min(...overlap(a, b)) >= 0 && Math.max(...overlap(a, b)) > 0;
    assert.deepEqual(edge, topologyWhere(areas.length, (i, j) => some(i, j, side)));
  }
});

Deno.test("contiguityFinder() closes random gaps with snap, and nearMisses() lists them", () => {
  for (let trial = 0; trial < 10; trial++) {
    const draws = randomNumbers(4000, `gaps ${trial}`);
    const boxes = cutUp(`gapped ${trial}`).map((box, at): Box => {
      const shrink = [0, 1, 2, 3].map((side) => 0.02 * draws[4 * at + side]);
      return [box[0] + shrink[0], box[1] + shrink[1], box[2] - shrink[2], box[3] - shrink[3]];
    });
    const finder = contiguityFinder(
      flatFromGeometries(draw(boxes.map((box) => [box]), trial * 0.53)),
    );
    assert.equal(finder.find(null).touching.indices.length, 0);
    const gap = (i: number, j: number) =>
      Math.hypot(...overlap(boxes[i], boxes[j]).map((length) => Math.min(0, length)));
    for (const snap of [0.01, 0.03, 0.06]) {
      const { touching, edge, report } = finder.find(parseLength(`${snap}m`));
      assert.deepEqual(touching, topologyWhere(boxes.length, (i, j) => gap(i, j) <= snap));
      assert.equal(report.snappedPairs, touching.indices.length / 2);
      // Sides are whole numbers long less two shrinks; a common corner overlaps by less than two snaps.
      const along = (i: number, j: number) => Math.max(...overlap(boxes[i], boxes[j])) > 2 * snap;
      assert.deepEqual(
        edge,
        topologyWhere(boxes.length, (i, j) => gap(i, j) <= snap && along(i, j)),
      );
      const misses = finder.nearMisses(snap);
      assert.equal(misses.length, report.snappedPairs);
      misses.forEach((miss, at) => {
        assert.ok(Math.abs(miss.gap - gap(miss.one, miss.other)) < 1e-9);
        assert.ok(at === 0 || misses[at - 1].gap <= miss.gap);
      });
    }
  }
});

type Corner = readonly [number, number];

/** Twice the area of a triangle, positive when its corners go around to the left. */
function turnOf(a: Corner, b: Corner, c: Corner): number {
  return (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
}

/** Whether two triangles in general position have a point in common. */
function meet(a: readonly Corner[], b: readonly Corner[]): boolean {
  const inside = (p: Corner, t: readonly Corner[]) => {
    const turns = [0, 1, 2].map((k) => Math.sign(turnOf(t[k], t[(k + 1) % 3], p)));
    return Math.abs(turns[0] + turns[1] + turns[2]) === 3;
  };
  const cross = (k: number, l: number) => {
    const [p, q, r, s] = [a[k], a[(k + 1) % 3], b[l], b[(l + 1) % 3]];
    return turnOf(p, q, r) * turnOf(p, q, s) < 0 && turnOf(r, s, p) * turnOf(r, s, q) < 0;
  };
  return inside(a[0], b) || inside(b[0], a) ||
    [0, 1, 2].some((k) => [0, 1, 2].some((l) => cross(k, l)));
}

Deno.test("contiguityFinder() agrees with comparing all triangles that overlap at random", () => {
  for (let trial = 0; trial < 20; trial++) {
    const draws = randomNumbers(60 * 7, `triangles ${trial}`);
    const triangles = Array.from({ length: 60 }, (_, t): Corner[] => {
      const [x, y, size] = [
        100 * draws[7 * t],
        100 * draws[7 * t + 1],
        2 + 30 * draws[7 * t + 2] ** 3,
      ];
      return [3, 4, 5].map((k) => {
        const angle = 2 * Math.PI * (k + 0.8 * draws[7 * t + k]) / 3;
        return [x + size * Math.cos(angle), y + size * Math.sin(angle)];
      });
    });
    const { touching, edge, report } = contiguityFinder(flatFromGeometries(
      triangles.map((corners) => ({ type: "Polygon", coordinates: [[...corners, corners[0]]] })),
    )).find(null);
    const slow = topologyWhere(60, (i, j) => meet(triangles[i], triangles[j]));
    assert.deepEqual(touching, slow);
    assert.deepEqual(edge, slow);
    assert.equal(report.overlapPairs, slow.indices.length / 2);
  }
});
