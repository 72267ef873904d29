/**
 * The main job against numbers from outside the project, the whole way: files in, neighbors by rule or list,
 * statistics out. Each case file in `testdata/cases` names its source and license.
 */
import assert from "node:assert/strict";
import { assess } from "../../lib/assess/assess.ts";
import type { AssessOptions } from "../../lib/assess/options.ts";
import { assertClose } from "../support/close.ts";
import { ncVariables } from "../support/nc_variables.ts";
import { referenceCase, referenceText, textColumn } from "../support/reference.ts";
import { withFolder } from "../support/temp_folder.ts";

const NC = new URL("../../testdata/data/nc.gpkg", import.meta.url).pathname;
const FEW = { sweep: false, localPermutations: 999 } as const;

/** The variables of the cases nc-*; the formulas stand in the cases. */
const VARIABLES = ncVariables("74");

/** A comma-separated text of columns; numbers in shortest form, so that they read back bit for bit. */
function csvOf(columns: Readonly<Record<string, ArrayLike<number | string>>>): string {
  const names = Object.keys(columns), cells = Object.values(columns);
  const rows = Array.from(cells[0], (_, row) => cells.map((column) => column[row]).join(","));
  return [names.join(","), ...rows, ""].join("\n");
}

/** The published list as a table `from,to`. */
function linksOf(file: string): string {
  const { neighbours } = JSON.parse(referenceText(file)) as {
    neighbours: Record<string, string[]>;
  };
  const pairs = Object.entries(neighbours).flatMap(([from, list]) => list.map((to) => [from, to]));
  return csvOf({ from: pairs.map(([from]) => from), to: pairs.map(([, to]) => to) });
}

// deno-lint-ignore no-explicit-any
async function assertGlobal(path: string, options: AssessOptions, want: any): Promise<void> {
  const { results } = await assess(path, { ...FEW, ...options });
  const { moranI } = results.runs[0].global;
  assert.equal(results.layer.used, want.n);
  assertClose(moranI.value!, want.I, 1e-9, "I");
  assertClose(moranI.expected!, want.I_E, 1e-9, "expectation");
  assertClose(moranI.varianceNormality!, want.I_var_normality, 1e-9, "variance, normality");
  assertClose(moranI.varianceRandomization!, want.I_var_randomisation, 1e-9, "variance, orders");
  if (want.I_z_randomisation !== undefined) {
    assertClose(moranI.z!, want.I_z_randomisation, 1e-9, "z");
  }
}

// deno-lint-ignore no-explicit-any
async function assertLocal(path: string, options: AssessOptions, want: any): Promise<void> {
  const { areas } = await assess(path, { ...FEW, ...options });
  want.local_I.forEach((value: number, row: number) => {
    if (want.quadrant[row] === "none") {
      assert.equal(areas.class[row], "alone");
      assert.ok(Number.isNaN(areas.i[row]) && Number.isNaN(areas.p[row]));
      return;
    }
    assertClose(areas.i[row], value, 1e-9, `local I of row ${row}`);
    assert.equal(areas.quad[row], want.quadrant[row]);
  });
}

// Source: numpy dense computations on the open data of Cressie 1993.
for (
  const [id, neighbors, standardize] of [
    ["nc-global-queen_row", "touching", "row"],
    ["nc-global-queen_unscaled", "touching", "none"],
    ["nc-global-rook_unscaled", "edge", "none"],
  ] as const
) {
  Deno.test(`assess() from GeoPackage and table gives the values of ${id}`, () =>
    withFolder(async (folder) => {
      const counties = textColumn("nc.csv", "NAME");
      await Deno.writeTextFile(`${folder}/rates.csv`, csvOf({ NAME: counties, ...VARIABLES }));
      const options = { join: `${folder}/rates.csv`, on: "NAME", neighbors, standardize };
      for (const [value, want] of Object.entries(referenceCase(id).expected)) {
        await assertGlobal(NC, { ...options, value }, want);
      }
    }));
}

/** Tables of North Carolina's counties with the points that a case measures between, as stored. */
const seats = csvOf({
  x: textColumn("nc_points.csv", "seat_east_miles"),
  y: textColumn("nc_points.csv", "seat_north_miles"),
  county: textColumn("nc.csv", "NAME"),
  CNTY_ID: textColumn("nc.csv", "CNTY_ID"),
  ...VARIABLES,
});
const centroids = csvOf({
  x: textColumn("nc_points.csv", "centroid_lon"),
  y: textColumn("nc_points.csv", "centroid_lat"),
  ...VARIABLES,
});

// Source: numpy dense computations. Coordinates are taken as they stand: one map unit is a mile, or a degree.
for (
  const [id, table, neighbors, standardize] of [
    ["nc-global-band30_row", seats, "within:30m", "row"],
    ["nc-global-band30_unscaled", seats, "within:30m", "none"],
    ["nc-global-knn4_centroid_row", centroids, "nearest:4", "row"],
  ] as const
) {
  Deno.test(`assess() from a table with x and y gives the values of ${id}`, () =>
    withFolder(async (folder) => {
      await Deno.writeTextFile(`${folder}/places.csv`, table);
      for (const [value, want] of Object.entries(referenceCase(id).expected)) {
        const options = { value, neighbors, standardize, metric: "planar" };
        await assertGlobal(`${folder}/places.csv`, options, want);
      }
    }));
}

// Source: numpy dense computations; the list is that of Cressie & Chan 1989, with two counties alone.
Deno.test("assess() through links: gives the values of nc-global- and nc-local-cressie_chan_unscaled", () =>
  withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/seats.csv`, seats);
    await Deno.writeTextFile(
      `${folder}/links.csv`,
      linksOf("nc_neighbours_cressie_chan_1989.json"),
    );
    const options = {
      ...{ id: "CNTY_ID", neighbors: `links:${folder}/links.csv` },
      ...{ standardize: "none", metric: "planar" } as const,
    };
    const global = referenceCase("nc-global-cressie_chan_unscaled").expected;
    for (const [value, want] of Object.entries(global)) {
      await assertGlobal(`${folder}/seats.csv`, { ...options, value }, want);
    }
    const local = referenceCase("nc-local-cressie_chan_unscaled").expected;
    await assertLocal(`${folder}/seats.csv`, { ...options, value: "rate74" }, local);
  }));

// Source: numpy dense computations.
Deno.test("assess() from GeoPackage and table gives the local values of nc-local-queen_row", () =>
  withFolder(async (folder) => {
    const counties = textColumn("nc.csv", "NAME");
    await Deno.writeTextFile(`${folder}/rates.csv`, csvOf({ NAME: counties, ...VARIABLES }));
    const options = { value: "nw74", join: `${folder}/rates.csv`, on: "NAME" };
    await assertLocal(NC, options, referenceCase("nc-local-queen_row").expected);
  }));

/** The 26 Irish counties as a table of places without boundaries; where they lie plays no part with a list. */
async function writeIreland(folder: string): Promise<AssessOptions> {
  const [head, ...rows] = referenceText("eire_table.csv").trim().split(/\r?\n/);
  const placed = [`x,y,${head}`, ...rows.map((row, at) => `${at},${at % 5},${row}`)];
  await Deno.writeTextFile(`${folder}/ireland.csv`, placed.join("\n"));
  await Deno.writeTextFile(`${folder}/links.csv`, linksOf("eire_neighbours_cliff_ord.json"));
  return { value: "OWNCONS", id: "county", neighbors: `links:${folder}/links.csv` };
}

// Source: numpy dense computations on the counties of Cliff & Ord 1973.
Deno.test("assess() by table and list gives the values of eire-global-open and eire-local-open", () =>
  withFolder(async (folder) => {
    const options = await writeIreland(folder);
    const path = `${folder}/ireland.csv`;
    const { expected } = referenceCase("eire-global-open");
    for (const value of Object.keys(expected)) {
      const { B, R } = expected[value];
      await assertGlobal(path, { ...options, value, standardize: "none" }, B);
      await assertGlobal(path, { ...options, value, standardize: "row" }, R);
    }
    await assertLocal(path, options, referenceCase("eire-local-open").expected);
  }));

// Source: Anselin 1995 prints 0.417 and names Egypt and Sudan as the largest local values.
Deno.test("assess() by table and list gives the published 0.417 of anselin-1995-africa", () =>
  withFolder(async (folder) => {
    const { expected } = referenceCase("anselin-1995-africa");
    await Deno.writeTextFile(`${folder}/africa.csv`, referenceText("africa_conflict.csv"));
    await Deno.writeTextFile(
      `${folder}/links.csv`,
      linksOf("africa_conflict_neighbours_paper.json"),
    );
    const options = { value: "totcon", id: "code", neighbors: `links:${folder}/links.csv` };
    await assertGlobal(`${folder}/africa.csv`, options, expected);
    const { results, areas } = await assess(`${folder}/africa.csv`, { ...FEW, ...options });
    assert.equal(results.runs[0].global.moranI.value!.toFixed(3), "0.417");
    const names = textColumn("africa_conflict.csv", "name");
    const largest = Array.from(areas.i.keys()).sort((a, b) => areas.i[b] - areas.i[a]);
    for (const [rank, [name, value]] of expected.top_local.entries()) {
      assert.equal(names[largest[rank]], name);
      assertClose(areas.i[largest[rank]], value, 1e-9);
    }
    assertClose(areas.i.reduce((sum, value) => sum + value, 0), expected.sum_local_I, 1e-9);
  }));
