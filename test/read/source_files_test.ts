/** Several files that make one source: archives and side files. */
import assert from "node:assert/strict";
import { zipSync } from "fflate";
import { join } from "node:path";
import { UnreadableError } from "../../lib/layer/errors.ts";
import { readSourceFiles } from "../../lib/read/source_files.ts";
import { readLayer, readVectorBytes } from "../../lib/read/vector.ts";
import { fault } from "../support/fault.ts";
import { writeInventedAreas } from "../support/invented_areas.ts";
import { nativeGdal } from "../support/native_gdal.ts";
import { tempFolder } from "../support/temp_folder.ts";

const folder = tempFolder();
const original = await writeInventedAreas(folder.path);
Deno.test.afterAll(() => folder[Symbol.dispose]());

const at = (name: string) => join(folder.path, name);
const bytesOf = (text: string) => new TextEncoder().encode(text);
const point = (x: number) => bytesOf(`{"type":"Point","coordinates":[${x},0]}`);

async function shapefile(stem: string): Promise<Record<string, Uint8Array>> {
  await nativeGdal("ogr2ogr", ["-select", "name", at(`${stem}.shp`), original]);
  const endings = ["shp", "shx", "dbf", "prj"];
  const members = await Promise.all(
    endings.map(async (
      ending,
    ) => [`${stem}.${ending}`, await Deno.readFile(at(`${stem}.${ending}`))]),
  );
  return Object.fromEntries(members);
}

Deno.test("readSourceFiles() takes the side files of a Shapefile in any letter case, and no others", async () => {
  await shapefile("town");
  await Deno.rename(at("town.prj"), at("TOWN.PRJ"));
  await Deno.rename(at("town.dbf"), at("Town.Dbf"));
  await Deno.writeTextFile(at("town.txt"), "not a part");
  const { files, datasets } = await readSourceFiles(at("town.shp"));
  assert.deepEqual(files.map(({ name }) => name), ["town.shp", "town.shx", "town.dbf", "town.prj"]);
  assert.deepEqual(datasets, ["town.shp"]);
  const layer = await readLayer(at("town.shp"));
  assert.equal(layer.crs?.code, "EPSG:32632");
  assert.deepEqual(layer.columns.map(({ name }) => name), ["name"]);
});

Deno.test("readLayer() reads a Shapefile that came without its index or in capitals", async () => {
  await shapefile("lone");
  await Deno.remove(at("lone.shx"));
  assert.equal((await readLayer(at("lone.shp"))).count, 5);
  const members = await shapefile("loud");
  for (const [name, bytes] of Object.entries(members)) {
    await Deno.remove(at(name));
    await Deno.writeFile(at(name.toUpperCase()), bytes);
  }
  const layer = await readLayer(at("LOUD.SHP"));
  assert.deepEqual([layer.count, layer.columns.length, layer.crs?.code], [5, 1, "EPSG:32632"]);
});

Deno.test("readLayer() reads a zipped Shapefile, in a folder of the archive too", async () => {
  const members = await shapefile("county");
  await Deno.writeFile(at("flat.zip"), zipSync({ ...members, "readme.txt": bytesOf("hello") }));
  assert.equal((await readLayer(at("flat.zip"))).count, 5);
  const nested = { data: { ...members, "._county.shp": bytesOf("clutter") }, "__MACOSX": members };
  await Deno.writeFile(at("nested.zip"), zipSync(nested));
  const layer = await readLayer(at("nested.zip"));
  assert.deepEqual([layer.name, layer.source, layer.count], ["county", "nested.zip", 5]);
  assert.equal(layer.crs?.code, "EPSG:32632");
});

Deno.test("readLayer() offers the layers of all datasets in an archive", async () => {
  const zip = zipSync({
    "2021/a.geojson": point(1),
    "2022/a.geojson": point(2),
    "b.json": point(3),
  });
  await assert.rejects(
    readVectorBytes("years.zip", zip),
    fault(UnreadableError, /holds 3 layers \(2021\/a\.geojson\/a, 2022\/a\.geojson\/a, b\)/),
  );
  const layer = await readVectorBytes("years.zip", zip, { layer: "2022/a.geojson/a" });
  assert.deepEqual([...layer.geometry.xy], [2, 0]);
});

Deno.test("readLayer() reads what was committed to a GeoPackage but still lies in its side file", async () => {
  // A writer that has the file open: SQLite keeps the change in `-wal` until it closes.
  const { DatabaseSync } = await import("node:sqlite");
  await Deno.copyFile(original, at("open.gpkg"));
  const database = new DatabaseSync(at("open.gpkg"));
  database.exec("PRAGMA journal_mode = wal; DELETE FROM areas WHERE fid > 2");
  assert.equal((await readLayer(at("open.gpkg"))).count, 2);
  database.close();
});
