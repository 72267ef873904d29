/** The outcome folder: what is in it, and that others can read it. */
import assert from "node:assert/strict";
import { assess, type Assessment } from "../../lib/assess/assess.ts";
import { writeAssessment } from "../../lib/assess/write_assessment.ts";
import { resultsSchema } from "../../lib/write/results.ts";
import { assertClose } from "../support/close.ts";
import { gridLayer } from "../support/grid_layer.ts";
import { nativeGdal, readNatively } from "../support/native_gdal.ts";
import { withFolder } from "../support/temp_folder.ts";

/** 6 × 6 areas, high in the southwest, with names beyond ASCII and one missing value. */
const grid = gridLayer({ columns: 6, rows: 6 }, (at) => ({
  name: at === 0 ? "=Ærø" : `Łódź ${at}`,
  rate: at === 35 ? null : Math.max(0, 6 - (at % 6) - Math.floor(at / 6)) + at / 100,
  counted: at,
}));

async function onOutcome(
  test: (folder: string, assessment: Assessment) => Promise<void>,
): Promise<void> {
  await withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/grid.geojson`, grid);
    const assessment = await assess(`${folder}/grid.geojson`, {
      ...{ value: "rate", id: "name", localPermutations: 9_999, vary: ["edge", "nearest:4..6"] },
    });
    await writeAssessment(assessment, `${folder}/out`, { also: ["gpkg", "shp"] });
    await test(`${folder}/out`, assessment);
  });
}

Deno.test("writeAssessment() writes layers that native GDAL reads with fields, types and values", () =>
  onOutcome(async (folder, { areas, results }) => {
    for (const name of ["areas.fgb", "areas.gpkg"]) {
      const layer = await readNatively(`${folder}/${name}`);
      assert.equal(layer.features.length, 36, name);
      assert.match(layer.text, /ETRS89 \/ UTM zone 32N/, name);
      assert.match(layer.geometryType, /Polygon/, name);
      const rowOf = (row: number) =>
        layer.features.find(({ values }) => values.get("_row") === String(row))!.values;
      assert.equal(rowOf(0).get("name"), "=Ærø");
      assert.equal(rowOf(0).get("rate_class"), areas.class[0]);
      // ogrinfo prints 15 digits.
      assertClose(Number(rowOf(0).get("rate_i")), areas.i[0], 1e-14);
      assertClose(Number(rowOf(0).get("rate_p")), areas.p[0], 1e-14);
      assert.equal(rowOf(35).get("_left_out"), "value missing");
      assert.equal(rowOf(35).get("rate_class"), "no value");
      assert.equal(rowOf(35).get("rate_z") ?? "(null)", "(null)");
      const types = Object.fromEntries(layer.types);
      assert.equal(types["_row"], "Integer");
      assert.equal(types["counted"], "Integer");
      assert.equal(types["rate_p"], "Real");
      assert.equal(types["rate_sig"], "Integer(Boolean)");
      assert.equal(types["rate_quad"], "String");
    }
    const links = await readNatively(`${folder}/links.fgb`);
    assert.equal(links.features.length, results.runs[0].neighbors.links);
    assert.match(links.geometryType, /Line String/);
    assert.match(links.text, /ETRS89 \/ UTM zone 32N/);
    const zipped = await nativeGdal("ogrinfo", ["-al", "-so", `/vsizip/${folder}/areas.zip`]);
    assert.match(zipped, /Feature Count: 36/);
  }));

Deno.test("writeAssessment() writes results that fit the published schema", () =>
  onOutcome(async (folder, { results }) => {
    const written = JSON.parse(await Deno.readTextFile(`${folder}/results.json`));
    assert.deepEqual(resultsSchema.parse(written), written);
    assert.equal(written.runs[0].global.moranI.value, results.runs[0].global.moranI.value);
  }));

Deno.test("writeAssessment() writes a table in input order that no spreadsheet runs as formulas", () =>
  onOutcome(async (folder) => {
    const bytes = await Deno.readFile(`${folder}/areas.csv`);
    assert.deepEqual([...bytes.subarray(0, 3)], [0xef, 0xbb, 0xbf], "byte-order mark");
    const lines = new TextDecoder().decode(bytes).trim().split("\r\n");
    assert.equal(lines.length, 37);
    assert.match(lines[0], /^name,rate,counted,_row,_left_out,rate_z,/);
    assert.match(lines[1], /^'=Ærø,/);
  }));

Deno.test("writeAssessment() keeps a record with the checksum of the input and every decision", () =>
  onOutcome(async (folder) => {
    const record = JSON.parse(await Deno.readTextFile(`${folder}/record.json`));
    const digest = await crypto.subtle.digest("SHA-256", new TextEncoder().encode(grid));
    const hex = Array.from(new Uint8Array(digest), (byte) => byte.toString(16).padStart(2, "0"));
    assert.equal(record.inputs[0].sha256, hex.join(""));
    assert.equal(record.plan.level, 0.05);
    assert.equal(record.plan.adjust, "bh");
    assert.equal(record.seed, "nearkin");
    assert.ok(record.renamedFields["areas.zip"], "short names are mapped, not cut");
  }));

Deno.test("writeAssessment() gives the same bytes when the run is repeated", () =>
  onOutcome(async (folder) => {
    const bytes = await filesOf(folder);
    await onOutcome(async (other) => {
      const again = await filesOf(other);
      assert.deepEqual([...again.keys()], [...bytes.keys()]);
      for (const [name, content] of bytes) {
        // The record names the input by its path, which differs between the two folders.
        if (name !== "record.json") assert.deepEqual(again.get(name), content, name);
      }
    });
  }));

async function filesOf(folder: string): Promise<Map<string, Uint8Array>> {
  const files = new Map<string, Uint8Array>();
  for (
    const { name, isFile } of [...Deno.readDirSync(folder)].sort((a, b) => a.name < b.name ? -1 : 1)
  ) {
    if (isFile) files.set(name, await Deno.readFile(`${folder}/${name}`));
  }
  return files;
}
