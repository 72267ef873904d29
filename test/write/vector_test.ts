/** Layers in other formats, judged by native GDAL. */
import assert from "node:assert/strict";
import { join } from "node:path";
import { decodeLayer } from "../../lib/layer/decode_layer.ts";
import { UnwritableError, UsageError } from "../../lib/layer/errors.ts";
import type { ColumnValues } from "../../lib/layer/layer.ts";
import { WRITABLE_FORMATS } from "../../lib/read/formats.ts";
import { readLayer } from "../../lib/read/vector.ts";
import { appendColumns } from "../../lib/write/append_columns.ts";
import { convertFgb } from "../../lib/write/vector.ts";
import { fault } from "../support/fault.ts";
import { fgbOf } from "../support/fgb.ts";
import { INVENTED_NAMES, writeInventedAreas } from "../support/invented_areas.ts";
import { type NativeLayer, readNatively } from "../support/native_gdal.ts";
import { tempFolder } from "../support/temp_folder.ts";

const folder = tempFolder();
Deno.test.afterAll(() => folder[Symbol.dispose]());

const number = (name: string, values: number[]): ColumnValues => ({
  name,
  kind: "number",
  storedAs: "Float64",
  values: Float64Array.from(values),
});

const areas = await readLayer(await writeInventedAreas(folder.path));
const results = appendColumns(areas, [number("unemployment_rate_p", [0.25, NaN, NaN, 0.5, 2e-6])]);

/** A layer that every format can hold: polygons of one type, no nulls. */
const square = (x: number) => [[[x, 50], [x + 1, 50], [x + 1, 51], [x, 51], [x, 50]]];
const plain = decodeLayer(
  fgbOf([5, 7].map((x) => ({
    geometry: { type: "Polygon", coordinates: square(x) },
    properties: { name: `Süd ${x}`, rate: x / 4 },
  }))),
  "plain",
);

async function written(fgb: Uint8Array, format: string): Promise<NativeLayer> {
  const { files } = await convertFgb(fgb, "areas", format);
  const inside = await Deno.makeTempDir({ dir: folder.path });
  for (const { name, bytes } of files) await Deno.writeFile(join(inside, name), bytes);
  const first = files.find(({ name }) => name === `areas.${format}`) ?? files[0];
  const path = join(inside, first.name);
  return await readNatively(format === "shp" ? `/vsizip/${path}` : path);
}

Deno.test("convertFgb() writes every format so that native GDAL finds rows, names and numbers", async (t) => {
  for (const format of WRITABLE_FORMATS) {
    await t.step(format, async () => {
      const { features } = await written(plain.fgb, format);
      const name = format === "kml" ? "Name" : "name";
      assert.deepEqual(features.map(({ values }) => values.get(name)), ["Süd 5", "Süd 7"]);
      const rates = features.map(({ values }) => Number(values.get("rate")));
      assert.deepEqual(rates, [1.25, 1.75]);
      const shapeless = ["csv", "ods", "xlsx"].includes(format);
      assert.equal(features.every(({ geometry }) => /POLYGON/.test(geometry ?? "")), !shapeless);
    });
  }
});

Deno.test("convertFgb() keeps rows without geometry and null results", async (t) => {
  for (const format of ["gpkg", "shp", "gml", "sqlite", "geojson", "geojsonl", "fgb"]) {
    await t.step(format, async () => {
      const { features } = await written(results, format);
      const names = features.map(({ values }) => values.get("name") ?? null);
      // A spatial index puts the features in another order.
      const sorted = (list: readonly (string | null)[]) => [...list].sort();
      assert.deepEqual(sorted(names), sorted(INVENTED_NAMES));
      const p = format === "shp" ? "unemploy_p" : "unemployment_rate_p";
      const missing = features.filter(({ values }) => !values.has(p));
      assert.deepEqual(
        missing.map(({ values }) => values.get("name")).sort(),
        ["Ünterort", "Łódź-ähnlich"],
      );
      assert.equal(features.filter(({ geometry }) => geometry === null).length, 1);
    });
  }
});

Deno.test("convertFgb() gives the same bytes on another day", async (t) => {
  const now = Date.now;
  for (const format of WRITABLE_FORMATS) {
    await t.step(format, async () => {
      const today = await convertFgb(plain.fgb, "areas", format);
      try {
        Date.now = () => now() + 40 * 24 * 3600 * 1000;
        assert.deepEqual(await convertFgb(plain.fgb, "areas", format), today);
      } finally {
        Date.now = now;
      }
    });
  }
});

Deno.test("convertFgb() reports names that a Shapefile cannot have", async () => {
  const { files, renamed } = await convertFgb(results, "areas", "shp");
  assert.deepEqual(files.map(({ name }) => name), ["areas.zip"]);
  assert.deepEqual(renamed, [{ from: "unemployment_rate_p", to: "unemploy_p" }]);
  const { types } = await written(results, "shp");
  assert.equal(types.get("unemploy_p"), "Real");
});

Deno.test("convertFgb() says which fields change their type", async () => {
  const { warnings } = await convertFgb(results, "areas", "kml");
  assert.deepEqual(warnings, [
    'Field "big" is Real as KML has no Integer64',
    'Field "day" is String as KML has no DateTime',
    'Field "moment" is String as KML has no DateTime',
    'Field "raw" is String as KML has no Binary',
  ]);
  assert.deepEqual((await convertFgb(results, "areas", "gpkg")).warnings, []);
});

Deno.test("convertFgb() does not let a field called fid or geom get in the way", async () => {
  const fields = [number("fid", [0.5, 0.5]), number("GEOM", [1, 2]), number("Name", [3, 4])];
  const fgb = appendColumns(plain, fields);
  const { types, features } = await written(fgb, "gpkg");
  assert.deepEqual([...types.keys()], ["name", "rate", "fid", "GEOM", "Name2"]);
  assert.deepEqual(features.map(({ values }) => values.get("fid")), ["0.5", "0.5"]);
  const { renamed } = await convertFgb(fgb, "areas", "gpkg");
  assert.deepEqual(renamed, [{ from: "Name", to: "Name2" }]);
});

Deno.test("convertFgb() puts GeoJSON in degrees and keeps the order of rows", async () => {
  const { features } = await written(results, "geojson");
  assert.deepEqual(features.map(({ values }) => values.get("name") ?? null), INVENTED_NAMES);
  assert.match(features[0].geometry ?? "", /^POLYGON \(\(9\.0 54\.148/);
});

Deno.test("convertFgb() refuses null numbers for MapInfo, which would make them 0", async () => {
  await assert.rejects(
    convertFgb(results, "areas", "tab"),
    fault(UnwritableError, /"areas" as MapInfo TAB .* has no nulls and field "é" holds some/),
  );
});

Deno.test("convertFgb() warns where MapInfo has no code page for the text", async () => {
  const points = [["Łódź", 1]].map(([name, x]) => ({
    geometry: { type: "Point", coordinates: [x, 1] },
    properties: { name },
  }));
  const { warnings } = await convertFgb(fgbOf(points), "areas", "mif");
  assert.match(warnings.join(), /Text is UTF-8/);
  assert.deepEqual((await convertFgb(plain.fgb, "areas", "mif")).warnings, []);
});

Deno.test("convertFgb() gives GDAL's reason when a format cannot hold the layer", async () => {
  const mixed = fgbOf([
    { geometry: { type: "Point", coordinates: [1, 1] } },
    { geometry: { type: "Polygon", coordinates: square(0) } },
  ]);
  await assert.rejects(
    convertFgb(mixed, "areas", "shp"),
    fault(UnwritableError, /layer "areas" as Shapefile \(.+\)/),
  );
});

Deno.test("convertFgb() names the formats for one it does not know", async () => {
  await assert.rejects(
    convertFgb(plain.fgb, "areas", "geopackage"),
    fault(UsageError, /Cannot write format "geopackage"; the formats are fgb, gpkg/),
  );
  await assert.rejects(convertFgb(plain.fgb, "areas", "gpk"), fault(UsageError, /mean "gpkg"/));
});
