/** Geometries that formats, GDAL or FlatGeobuf treat in odd ways. */
import assert from "node:assert/strict";
import { join } from "node:path";
import { readColumn } from "../../lib/layer/column.ts";
import type { Layer } from "../../lib/layer/layer.ts";
import { readLayer } from "../../lib/read/vector.ts";
import { appendColumns } from "../../lib/write/append_columns.ts";
import { nativeGdal, readNatively } from "../support/native_gdal.ts";
import { tempFolder } from "../support/temp_folder.ts";

const folder = tempFolder();
Deno.test.afterAll(() => folder[Symbol.dispose]());

/** Writes one row for each WKT (empty: null) to a GeoPackage by native GDAL. */
async function geopackage(
  name: string,
  wkts: readonly string[],
  ...args: string[]
): Promise<string> {
  const csv = join(folder.path, `${name}.csv`);
  const path = join(folder.path, `${name}.gpkg`);
  const rows = wkts.map((wkt, row) => `"${wkt}",row ${row}`);
  await Deno.writeTextFile(csv, `WKT,label\n${rows.join("\n")}\n`);
  await nativeGdal("ogr2ogr", ["-a_srs", "EPSG:25832", ...args, path, csv]);
  return path;
}

const TRIANGLE = "POLYGON ((0 0,1 0,1 1,0 0))";

function assertRows(layer: Layer, kinds: readonly number[]): void {
  assert.deepEqual([...layer.geometry.kinds], kinds);
  assert.deepEqual(readColumn(layer, "label").values, kinds.map((_, row) => `row ${row}`));
}

Deno.test("readLayer() keeps rows with null or empty geometry, whatever is empty", async () => {
  const wkts = [
    TRIANGLE,
    "",
    "POLYGON EMPTY",
    "MULTIPOLYGON EMPTY",
    "POINT EMPTY",
    "LINESTRING EMPTY",
    "GEOMETRYCOLLECTION EMPTY",
    "MULTIPOLYGON (((0 0,1 0,1 1,0 0)))",
  ];
  assertRows(await readLayer(await geopackage("empty", wkts)), [3, 0, 0, 0, 0, 0, 0, 3]);
});

Deno.test("readLayer() does not take an empty point for a point at the origin", async () => {
  assertRows(await readLayer(await geopackage("point", ["POINT EMPTY", "POINT (0 0)"])), [0, 1]);
});

Deno.test("readLayer() keeps polygons and multipolygons side by side, and their types", async () => {
  const wkts = [TRIANGLE, "MULTIPOLYGON (((2 0,3 0,3 1,2 0)),((4 0,5 0,5 1,4 0)))", "POINT (9 9)"];
  const layer = await readLayer(await geopackage("mixed", wkts));
  assertRows(layer, [3, 3, 1]);
  assert.equal(layer.shape, "polygon");
  const path = join(folder.path, "mixed.fgb");
  await Deno.writeFile(path, layer.fgb);
  const { features } = await readNatively(path);
  assert.deepEqual(features.map(({ geometry }) => geometry), wkts);
});

Deno.test("readLayer() keeps heights and measures in the bytes", async () => {
  const polygons = [
    "POLYGON Z ((0 0 5,1 0 6,1 1 7,0 0 5))",
    "MULTIPOLYGON Z (((0 0 1,1 0 2,1 1 3,0 0 1)))",
  ];
  const lines = ["LINESTRING ZM (0 0 1 10,1 1 2 20)"];
  // Heights are found where the file declares no type; measures have to be declared.
  const cases = [
    [polygons, await geopackage("heights", polygons)],
    [lines, await geopackage("measures", lines, "-nlt", "LINESTRINGZM")],
  ] as const;
  for (const [wkts, path] of cases) {
    const copy = `${path}.fgb`;
    await Deno.writeFile(copy, appendColumns(await readLayer(path), []));
    const { features } = await readNatively(copy);
    assert.deepEqual(features.map(({ geometry }) => geometry), wkts);
  }
});

Deno.test("readLayer() makes curves straight", async () => {
  const curve = "CURVEPOLYGON (CIRCULARSTRING (0 0,1 1,2 0,1 -1,0 0))";
  const layer = await readLayer(await geopackage("curve", [curve]));
  assertRows(layer, [3]);
  // Every vertex lies on the circle of radius 1 around (1, 0).
  const { xy } = layer.geometry;
  assert.ok(xy.length > 40);
  for (let v = 0; v < xy.length; v += 2) {
    assert.ok(Math.abs(Math.hypot(xy[v] - 1, xy[v + 1]) - 1) < 1e-9);
  }
});

Deno.test("readLayer() gives no reference system where the file says undefined", async () => {
  const csv = join(folder.path, "bare.csv");
  await Deno.writeTextFile(csv, `WKT,label\n"${TRIANGLE}",a\n`);
  const path = join(folder.path, "bare.gpkg");
  await nativeGdal("ogr2ogr", [path, csv]);
  assert.match((await readNatively(path)).text, /Undefined/);
  assert.equal((await readLayer(path)).crs, null);
});
