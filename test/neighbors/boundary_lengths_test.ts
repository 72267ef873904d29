import assert from "node:assert/strict";
import { boundaryLengths } from "../../lib/neighbors/boundary_lengths.ts";
import { type Ground, neighborBuilder } from "../../lib/neighbors/build.ts";
import { parseRule } from "../../lib/neighbors/rule.ts";
import { parseLength } from "../../lib/project/length.ts";
import { everyone } from "../support/links.ts";
import { flatFromGeometries, type GeoJsonGeometry } from "../support/flat_from_geojson.ts";

function box(west: number, south: number, east: number, north: number): GeoJsonGeometry {
  const corners = [[west, south], [east, south], [east, north], [west, north], [west, south]];
  return { type: "Polygon", coordinates: [corners] };
}

function groundOf(cells: readonly GeoJsonGeometry[], more: Partial<Ground> = {}): Ground {
  const count = cells.length;
  return {
    geometry: flatFromGeometries(cells),
    points: null,
    count,
    usable: everyone(count),
    ...more,
  };
}

function lengths(ground: Ground, rule: string): number[] {
  const exact = boundaryLengths(ground, neighborBuilder(ground)(parseRule(rule)));
  return Array.from(exact, (length) => Number(length.toFixed(9)));
}

Deno.test("boundaryLengths() measures shared sides, T-junctions included, and 0 at corners", () => {
  // A wide area above two: B shares 1 with A, C shares 2; B and C share a side of 5. D meets C in a corner.
  const cells = [box(0, 5, 3, 9), box(0, 0, 1, 5), box(1, 0, 3, 5), box(3, -4, 9, 0)];
  // Rows: A: B C, B: A C, C: A B D, D: C
  assert.deepEqual(lengths(groundOf(cells), "touching"), [1, 2, 1, 5, 2, 5, 0, 0]);
  assert.deepEqual(lengths(groundOf(cells, { metersPerUnit: 0.3048 }), "edge"), [
    0.3048,
    0.6096,
    0.3048,
    1.524,
    0.6096,
    1.524,
  ]);
});

Deno.test("boundaryLengths() adds up stretches, and looks links up by usable position", () => {
  // A and B share 1 below and 2 above a lake between them; a third area, unusable, comes first.
  const left: GeoJsonGeometry = {
    type: "Polygon",
    coordinates: [[[0, 0], [5, 0], [5, 1], [4, 2], [5, 3], [5, 5], [0, 5], [0, 0]]],
  };
  const right: GeoJsonGeometry = {
    type: "Polygon",
    coordinates: [[[5, 0], [9, 0], [9, 5], [5, 5], [5, 3], [6, 2], [5, 1], [5, 0]]],
  };
  const ground = groundOf([box(-9, 0, 0, 5), left, right], { usable: Uint8Array.from([0, 1, 1]) });
  assert.deepEqual(lengths(ground, "touching"), [3, 3]);
});

Deno.test("boundaryLengths() measures degrees in meters at their place", () => {
  // A degree of latitude around 60.5° N is 111,421 m (WGS 84), one of longitude at 60° N 55,800 m.
  const ground = groundOf([box(0, 60, 1, 61), box(1, 60, 2, 61), box(0, 59, 1, 60)], {
    geographic: true,
  });
  const [east, south] = lengths(ground, "edge");
  assert.ok(Math.abs(east - 111_421) < 10);
  assert.ok(Math.abs(south - 55_800) < 10);
});

Deno.test("boundaryLengths() measures along gaps that snap closed", () => {
  const ground = groundOf([box(0, 0, 10, 10), box(10.1, 2, 20, 8)]);
  const topology = neighborBuilder(ground)(parseRule("edge snap=0.5m"));
  assert.deepEqual([...boundaryLengths(ground, topology, parseLength("0.5m"))], [6, 6]);
});
