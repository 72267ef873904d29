/** Files that are missing, foreign, ambiguous, broken or empty. */
import assert from "node:assert/strict";
import { join } from "node:path";
import { UnfitDataError, UnreadableError, UsageError } from "../../lib/layer/errors.ts";
import { listLayers, readLayer, readVectorBytes } from "../../lib/read/vector.ts";
import { fault } from "../support/fault.ts";
import { fgbOf } from "../support/fgb.ts";
import { tempFolder } from "../support/temp_folder.ts";

const folder = tempFolder();
Deno.test.afterAll(() => folder[Symbol.dispose]());

async function file(name: string, content: string | Uint8Array): Promise<string> {
  const path = join(folder.path, name);
  await Deno.writeFile(
    path,
    typeof content === "string" ? new TextEncoder().encode(content) : content,
  );
  return path;
}

const POINT = `{"type":"Feature","properties":{},"geometry":{"type":"Point","coordinates":[1,2]}}`;
const TOPOLOGY = `{"type":"Topology","arcs":[],"objects":{
  "counties":{"type":"GeometryCollection","geometries":[{"type":"Point","coordinates":[1,2]}]},
  "states":{"type":"GeometryCollection","geometries":[{"type":"Point","coordinates":[3,4]}]}}}`;

Deno.test("readLayer() names a file that is not there and the nearest that is", async () => {
  await file("counties.geojson", POINT);
  await assert.rejects(
    readLayer(join(folder.path, "countys.geojson")),
    fault(UnreadableError, /countys\.geojson .*no such file/, /did you mean "counties\.geojson"/),
  );
  await assert.rejects(
    readLayer(join(folder.path, "nowhere", "a.gpkg")),
    fault(UnreadableError, /no such file$/),
  );
});

Deno.test("readLayer() says that a file is no vector data", async () => {
  for (const [name, content] of [["notes.txt", "hello"], ["a.json", `{"a":1}`], ["x.shp", "no"]]) {
    await assert.rejects(
      readLayer(await file(name, content)),
      fault(UnreadableError, new RegExp(`Cannot read ${name}`), /nearkin formats/),
      name,
    );
  }
});

Deno.test("readLayer() says that a folder is none of the folders it reads", async () => {
  const inside = join(folder.path, "maps");
  await Deno.mkdir(inside);
  await assert.rejects(readLayer(inside), fault(UnreadableError, /it is a folder; name a file$/));
  await file("maps/b.gpkg", "x");
  await assert.rejects(readLayer(inside), fault(UnreadableError, /such as b\.gpkg/));
});

Deno.test("readLayer() lists the layers where several would do", async () => {
  const path = await file("us.topojson", TOPOLOGY);
  await assert.rejects(
    readLayer(path),
    fault(UnreadableError, /us\.topojson holds 2 layers \(counties, states\); choose one/),
  );
  assert.equal((await readLayer(path, { layer: "states" })).geometry.xy[0], 3);
});

Deno.test("readLayer() suggests the nearest layer for one that does not exist", async () => {
  await assert.rejects(
    readLayer(await file("us2.topojson", TOPOLOGY), { layer: "state" }),
    fault(UsageError, /No layer "state" in us2\.topojson/, /did you mean "states"/),
  );
});

Deno.test("readLayer() refuses a layer without features", async () => {
  await assert.rejects(
    readLayer(await file("none.geojson", `{"type":"FeatureCollection","features":[]}`)),
    fault(UnfitDataError, /none\.geojson has no features/),
  );
  await assert.rejects(
    readVectorBytes("none.kml", new TextEncoder().encode("<kml><Document/></kml>")),
    fault(UnfitDataError, /none\.kml has no features/),
  );
});

Deno.test("readLayer() words what is wrong inside a file of a known format", async () => {
  await assert.rejects(
    readLayer(await file("cut.geojson", POINT.slice(0, -10))),
    fault(UnreadableError, /cut\.geojson/),
  );
  await assert.rejects(
    readLayer(await file("cut.kml", "<kml><Placemark>")),
    fault(UnreadableError, /cut\.kml as KML \(.*1:/),
  );
  const fgb = fgbOf([JSON.parse(POINT), JSON.parse(POINT)]);
  await assert.rejects(
    readLayer(await file("cut.fgb", fgb.subarray(0, fgb.length - 9))),
    fault(UnreadableError, /cut\.fgb/),
  );
  await assert.rejects(
    readLayer(await file("cut.zip", "PK\x03\x04 and no more")),
    fault(UnreadableError, /cut\.zip as the zip archive is damaged/),
  );
});

Deno.test("readLayer() does not show the paths of GDAL's memory", async () => {
  const error: Error = await readLayer(await file("y.gpkg", "SQLite format 3\0")).catch((e) => e);
  assert.ok(error instanceof UnreadableError);
  assert.doesNotMatch(error.message, /\/nearkin\/\d/);
});

Deno.test("listLayers() throws as readLayer() does", async () => {
  await assert.rejects(listLayers(join(folder.path, "no.gpkg")), fault(UnreadableError, /no such/));
});
