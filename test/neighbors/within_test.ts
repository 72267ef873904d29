import assert from "node:assert/strict";
import { indexPoints } from "../../lib/neighbors/point_index.ts";
import { roundPoints } from "../../lib/neighbors/rounded_points.ts";
import { linkWithin } from "../../lib/neighbors/within.ts";
import { numberColumn, referenceCase, referenceText, textColumn } from "../support/reference.ts";
import { assertSound, pairNames, randomPoints, rowsOf, topologyWhere } from "../support/links.ts";

const within = (points: Float64Array, distance: number) =>
  linkWithin(indexPoints(roundPoints(points)), points.length / 2, distance);

Deno.test("linkWithin() includes the border: a 3-4-5 triangle at a distance of 5", () => {
  const points = Float64Array.from([0, 0, 3, 4, 3, 0]);
  assert.deepEqual(rowsOf(within(points, 5)), [[1, 2], [0, 2], [0, 1]]);
  assert.deepEqual(rowsOf(within(points, 4.99)), [[2], [2], [0, 1]]);
});

Deno.test("linkWithin() includes the border when miles become meters", () => {
  // (18, 24) and (30, 0) miles are 30 miles away; in meters neither square root is exact.
  const mile = 1609.344;
  const points = Float64Array.from([0, 0, 18, 24, 30, 0].map((miles) => miles * mile));
  assert.deepEqual(rowsOf(within(points, 30 * mile))[0], [1, 2]);
});

Deno.test("linkWithin() links points at the same place and none without one", () => {
  const points = Float64Array.from([1, 1, 1, 1, NaN, NaN, 9, 9]);
  assert.deepEqual(rowsOf(within(points, 0.5)), [[1], [0], [], []]);
});

Deno.test("linkWithin() agrees with measuring every pair", () => {
  const maps = {
    even: randomPoints(250, "even"),
    lattice: randomPoints(250, "lattice", { side: 20, whole: true }),
    clustered: randomPoints(250, "clustered").map((u) => (u / 1000) ** 6 * 1e6),
  };
  for (const points of Object.values(maps)) {
    const { xy, perUnit } = roundPoints(points);
    for (const distance of [0.001, 1, 5, 80, 3000]) {
      const topology = within(points, distance);
      assertSound(topology);
      const slow = topologyWhere(250, (i, j) => {
        const [dx, dy] = [xy[2 * i] - xy[2 * j], xy[2 * i + 1] - xy[2 * j + 1]];
        return Math.round(Math.sqrt(dx * dx + dy * dy) * perUnit) <= Math.round(distance * perUnit);
      });
      assert.deepEqual(topology, slow);
    }
  }
});

Deno.test("linkWithin() refuses more than 200 million links, with their number", () => {
  // 30,000 areas at one place: 30,000 × 29,999 links.
  assert.throws(() => within(new Float64Array(60_000).fill(1), 1), {
    name: "UnfitDataError",
    message: "Cannot link the areas by this distance as that makes 900 million links and only " +
      "200 million fit; choose a shorter one, or nearest:K",
  });
});

const names = textColumn("nc_points.csv", "NAME");

function seats(): Float64Array {
  const x = numberColumn("nc_points.csv", "seat_east_miles");
  const y = numberColumn("nc_points.csv", "seat_north_miles");
  return Float64Array.from([...x].flatMap((east, i) => [east, y[i]]));
}

// Case bands-nc-seats-open: county seats of North Carolina in whole miles, dense matrices (numpy).
Deno.test("linkWithin() counts links and isolated counties of North Carolina at nine distances", () => {
  const { links, isolates } = referenceCase("bands-nc-seats-open").expected;
  for (const [miles, count] of Object.entries(links)) {
    const rows = rowsOf(within(seats(), Number(miles)));
    assert.equal(rows.flat().length, count);
    const alone = names.filter((_, i) => rows[i].length === 0);
    if (isolates[miles]) assert.deepEqual(alone, isolates[miles]);
  }
});

// Case nc-30-mile-band-vs-literature: the neighbor list of Cressie & Chan (1989), seats within 30 miles.
Deno.test("linkWithin() differs from the published 30-mile list in two known pairs", () => {
  const { expected } = referenceCase("nc-30-mile-band-vs-literature");
  const band = within(seats(), 30);
  assert.equal(band.indices.length, expected.band_links);
  const rows = rowsOf(band);
  assert.deepEqual(names.filter((_, i) => rows[i].length === 0), expected.no_neighbour_band);
  const published = publishedPairs("nc_neighbours_cressie_chan_1989.json");
  const extra = pairNames(band, names).filter((pair) => !published.has(pair));
  const differences: [string, string][] = expected.differences;
  assert.deepEqual(extra, differences.map(([a, b]) => [a, b].sort().join("-")).sort());
  assert.equal(published.size, band.indices.length / 2 - differences.length);
});

function publishedPairs(file: string): Set<string> {
  const ids = textColumn("nc.csv", "CNTY_ID"), counties = textColumn("nc.csv", "NAME");
  const nameOf = new Map(ids.map((id, i) => [String(Number(id)), counties[i]]));
  const { neighbours } = JSON.parse(referenceText(file)) as {
    neighbours: Record<string, string[]>;
  };
  return new Set(
    Object.entries(neighbours).flatMap(([id, others]) =>
      others.map((other) => [nameOf.get(id)!, nameOf.get(other)!].sort().join("-"))
    ),
  );
}
