/**
 * The North Carolina cases as one sweep: every definition's global I against values computed outside the
 * project.
 */
import assert from "node:assert/strict";
import { readFile } from "node:fs/promises";
import { parse } from "csv-parse/sync";
import type { SweepDefinition } from "../../lib/sweep/merge.ts";
import { runSweep } from "../../lib/sweep/run.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { linkWeights } from "./small_maps.ts";

const testdata = new URL("../../testdata/", import.meta.url);
const text = (path: string) => readFile(new URL(path, testdata), "utf8");

interface Point {
  readonly seat_east_miles: string;
  readonly seat_north_miles: string;
}

// Source: 100 county seats and SIDS counts, Debian r-cran-spdata 2.2.1 (CC0-1.0), published in Cressie & Chan 1989.
const counties: Record<string, string>[] = parse(await text("data/nc.csv"), { columns: true });
const seats: Point[] = parse(await text("data/nc_points.csv"), { columns: true });
const rate74 = Float64Array.from(
  counties,
  ({ SID74, BIR74 }) => 1000 * Number(SID74) / Number(BIR74),
);

function milesBetween(i: number, j: number): number {
  return Math.hypot(
    Number(seats[i].seat_east_miles) - Number(seats[j].seat_east_miles),
    Number(seats[i].seat_north_miles) - Number(seats[j].seat_north_miles),
  );
}

/** Weights that fall with the distance between seats, up to a reach. */
function decay(reach: number, weightOf: (miles: number) => number): Weights {
  const links = linkWeights(
    100,
    (i, j) => milesBetween(i, j) <= reach && weightOf(milesBetween(i, j)) > 0,
  );
  const values = links.values.slice();
  for (let i = 0; i < 100; i++) {
    for (let e = links.offsets[i]; e < links.offsets[i + 1]; e++) {
      values[e] = weightOf(milesBetween(i, links.indices[e]));
    }
  }
  return { ...links, values, equalInRows: false };
}

function rowStandardized(weights: Weights): Weights {
  const values = weights.values.slice();
  for (let i = 0; i < 100; i++) {
    const row = values.subarray(weights.offsets[i], weights.offsets[i + 1]);
    const sum = row.reduce((total, value) => total + value, 0);
    row.forEach((value, k) => row[k] = value / sum);
  }
  return { ...weights, values };
}

/** The case's weights by its name, as its `weights_definition` says. */
const WEIGHTS: Record<string, Weights> = {
  band30_unscaled: decay(30, () => 1),
  band30_row: rowStandardized(decay(30, () => 1)),
  invd1_60mi_unscaled: decay(60, (d) => 1 / d),
  invd1_60mi_row: rowStandardized(decay(60, (d) => 1 / d)),
  invd2_60mi_row: rowStandardized(decay(60, (d) => 1 / d ** 2)),
  bisquare_40_row: rowStandardized(decay(40, (d) => (1 - (d / 40) ** 2) ** 2)),
  epanechnikov_40_row: rowStandardized(decay(40, (d) => 1 - (d / 40) ** 2)),
  gauss_h25_cut60_row: rowStandardized(decay(60, (d) => Math.exp(-0.5 * (d / 25) ** 2))),
};

Deno.test("runSweep() reproduces the published global I of every definition in one sweep", async () => {
  const definitions = Object.entries(WEIGHTS).map(([rule, weights], at): SweepDefinition => ({
    rule,
    weightsText: "equal",
    family: "band",
    main: at === 0,
    topologySummary: { pairs: 0, islands: 0, components: 1, meanNeighbors: null },
    weights,
  }));
  const { results } = await runSweep(rate74, definitions, {
    permutations: 99,
    localPermutations: 9999,
  });
  assert.equal(results.definitions.length, definitions.length);
  for (const { rule, value } of results.definitions) {
    // Source of each value: numpy dense matrices, named in the case file with its license.
    const { expected, tolerance } = JSON.parse(await text(`cases/nc-global-${rule}.json`));
    const published = expected.rate74.I;
    assert.ok(
      Math.abs(value! - published) <= tolerance.rel * Math.abs(published),
      `${rule}: ${value}`,
    );
  }
  assert.equal(results.joint.p, 0.02);
});
