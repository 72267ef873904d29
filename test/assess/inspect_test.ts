/** What `inspect` sees in a file, and that the command it suggests runs as pasted. */
import assert from "node:assert/strict";
import { inspect } from "../../lib/assess/inspect.ts";
import { gridLayer } from "../support/grid_layer.ts";
import { nativeGdal } from "../support/native_gdal.ts";
import { runCli } from "../support/run_cli.ts";
import { withFolder } from "../support/temp_folder.ts";

/** A 4 × 4 grid of 1 km; the names of file and field need quotes in a shell. */
const FILE = "it's messy.geojson", FIELD = "Rate per 1'000";
const grid = gridLayer({ columns: 4, rows: 4 }, (at) => ({
  "the name": `Ort ${at}`,
  [FIELD]: at === 3 ? null : at * 1.5,
  year: 2020,
}));

/** The grid with a row without geometry, a bow tie, a duplicate and a multipart area. */
const messy = gridLayer({ columns: 4, rows: 4 }, (at) => ({
  "the name": `Ort ${at}`,
  [FIELD]: at === 3 ? null : at * 1.5,
  year: 2020,
}), (feature, at) => {
  const square = (x: number) => [[x, 0], [x + 900, 0], [x + 900, 900], [x, 900], [x, 0]];
  const tie = [[0, 0], [1000, 1000], [1000, 0], [0, 2000], [0, 0]];
  if (at === 5) return { ...feature, geometry: null };
  if (at === 6) return { ...feature, geometry: { type: "Polygon", coordinates: [tie] } };
  if (at === 7 || at === 8) {
    return { ...feature, geometry: { type: "Polygon", coordinates: [square(2000)] } };
  }
  if (at !== 9) return feature;
  const parts = [[square(4000)], [square(5000)]];
  return { ...feature, geometry: { type: "MultiPolygon", coordinates: parts } };
});

Deno.test("inspect() counts what is odd and measures the fields", () =>
  withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/${FILE}`, messy);
    const found = await inspect(`${folder}/${FILE}`);
    assert.deepEqual([found.features, found.shape], [16, "polygon"]);
    assert.match(found.crs!, /UTM zone 32N.*EPSG:25832/);
    const { none, selfCrossing, duplicates, multipart } = found.geometry;
    assert.deepEqual([...none], [5]);
    assert.deepEqual([...selfCrossing], [6]);
    assert.deepEqual([...duplicates], [8]);
    assert.deepEqual([...multipart], [9]);
    const [name, rate, year] = found.fields;
    assert.deepEqual([name.kind, name.missing, name.distinct], ["text", 0, 16]);
    assert.deepEqual([rate.missing, rate.smallest, rate.largest], [1, 0, 22.5]);
    assert.deepEqual([year.storedAs, year.distinct], ["Int32", 1]);
  }));

Deno.test("inspect() suggests a command that runs as pasted", () =>
  withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/${FILE}`, messy);
    const home = Deno.cwd();
    Deno.chdir(folder);
    const { suggestion } = await inspect(FILE).finally(() => Deno.chdir(home));
    const main = new URL("../../cli/main.ts", import.meta.url).pathname;
    const nearkin = `nearkin() { "${Deno.execPath()}" run -A --no-check "${main}" "$@"; }`;
    const pasted = `${nearkin}; ${suggestion} --no-sweep --local-permutations 999 --quiet`;
    const run = await new Deno.Command("sh", { args: ["-c", pasted], cwd: folder }).output();
    assert.equal(run.code, 0, new TextDecoder().decode(run.stderr));
    assert.ok((await Deno.stat(`${folder}/it's messy-outcome/report.html`)).isFile);
  }));

Deno.test("inspect() measures in map units where there is no CRS, and suggests --metric planar", () =>
  withFolder(async (folder) => {
    // On a line at 0, 1, 3, 6: nobody is alone within 3, and that also joins all.
    await Deno.writeTextFile(`${folder}/p.csv`, "x,y,v\n0,0,1.5\n1,0,2.5\n3,0,3.5\n6,0,4.5\n");
    const found = await inspect(`${folder}/p.csv`);
    assert.equal(found.crs, null);
    assert.deepEqual(found.distances, { noneAlone: 3, oneComponent: 3, unit: "map units" });
    assert.match(found.suggestion!, / --metric planar /);
  }));

Deno.test("inspect looks at the first layer with geometry of several and lists the others", () =>
  withFolder(async (folder) => {
    const file = `${folder}/several.gpkg`;
    await Deno.writeTextFile(`${folder}/grid.geojson`, grid);
    await Deno.writeTextFile(`${folder}/rows.csv`, "name,v\nA,1\nB,2\n");
    await nativeGdal("ogr2ogr", [file, `${folder}/rows.csv`, "-nln", "just rows"]);
    for (const name of ["north", "south"]) {
      await nativeGdal("ogr2ogr", ["-update", file, `${folder}/grid.geojson`, "-nln", name]);
    }
    const first = await runCli("inspect", file);
    assert.equal(first.code, 0, first.stderr);
    assert.match(first.stdout, /^several\.gpkg: layer north, 16 features \(polygon\)$/m);
    assert.match(
      first.stdout,
      /^Also here {2}south \(16 Polygon\), just rows \(2 rows without geometry\)$/m,
    );
    assert.match(first.stdout, /nearkin assess \S+several\.gpkg --layer north --value /);
    const rows = await runCli("inspect", file, "--layer", "just rows");
    assert.equal(rows.code, 0, rows.stderr);
    assert.match(rows.stdout, /no geometry; join them.*--join/);
    assert.doesNotMatch(rows.stdout, /nearkin assess/);
  }));

Deno.test("inspect says how to use a table without coordinates", () =>
  withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/rates.csv`, "code,rate\nA,1\nB,2\n");
    const { code, stderr } = await runCli("inspect", `${folder}/rates.csv`);
    assert.equal(code, 2);
    assert.match(stderr, /coordinates in rates\.csv, which has code, rate;.*--x and --y.*--join/);
  }));
