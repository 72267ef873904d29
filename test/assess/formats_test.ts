/** The main job gives one answer, whatever format native GDAL wrote the layer in and wherever it is run from. */
import assert from "node:assert/strict";
import { join } from "node:path";
import { assess, type Assessment } from "../../lib/assess/assess.ts";
import { readColumn } from "../../lib/layer/column.ts";
import { assertClose } from "../support/close.ts";
import { nativeGdal } from "../support/native_gdal.ts";
import { tempFolder } from "../support/temp_folder.ts";

/** Latin-1, so that every format can hold them; the last three are beyond it, for `sted`. */
const NAMES = ["Ærø", "Île-de-Ré", "Ñuñoa", "Zürich"], PLACES = ["Łódź", "Пермь", "東京"];
const SIDE = 6;

/** 36 squares of a hundredth of a degree, high in the southwest and low in the northeast. */
function inventedLayer(): string {
  const features = Array.from({ length: SIDE * SIDE }, (_, at) => {
    const [column, row] = [at % SIDE, Math.floor(at / SIDE)];
    const [x, y] = [10 + column / 100, 50 + row / 100];
    const corners = [[0, 0], [0.01, 0], [0.01, 0.01], [0, 0.01], [0, 0]];
    return {
      type: "Feature",
      properties: {
        "navn_ø": `${NAMES[at % 4]} ${at}`,
        "größe": Math.max(0, SIDE - column - row) + (at * 37 % 11) / 10,
        sted: PLACES[at % 3],
      },
      geometry: {
        type: "Polygon",
        coordinates: [corners.map(([dx, dy]) => [
          Number((x + dx).toFixed(2)),
          Number((y + dy).toFixed(2)),
        ])],
      },
    };
  });
  return JSON.stringify({ type: "FeatureCollection", features });
}

/** The same as TopoJSON, which native GDAL reads but does not write: every ring an arc of its own. */
function asTopology(geojson: string): string {
  const { features } = JSON.parse(geojson);
  return JSON.stringify({
    type: "Topology",
    arcs: features.map(({ geometry }: { geometry: { coordinates: unknown[] } }) =>
      geometry.coordinates[0]
    ),
    objects: {
      areas: {
        type: "GeometryCollection",
        geometries: features.map(({ properties }: { properties: unknown }, at: number) => (
          { type: "Polygon", arcs: [[at]], properties }
        )),
      },
    },
  });
}

/** File to write, and the arguments native GDAL needs for it. */
const FORMATS: Readonly<Record<string, readonly string[]>> = {
  "a.gpkg": [],
  "a.shp": ["-lco", "ENCODING=UTF-8"],
  "zipped.shz": ["-lco", "ENCODING=UTF-8"],
  "unter.shp.zip": ["-f", "ESRI Shapefile", "-lco", "ENCODING=UTF-8"],
  "again.geojson": [],
  "a.geojsonl": ["-f", "GeoJSONSeq"],
  "a.ndjson": ["-f", "GeoJSONSeq"],
  "indexed.fgb": [],
  "a.kml": ["-f", "KML"],
  "other.kml": ["-f", "LIBKML"],
  "a.gml": [],
  "a.tab": ["-f", "MapInfo File", "-lco", "ENCODING=CP1252"],
  "a.mif": ["-f", "MapInfo File", "-dsco", "FORMAT=MIF", "-lco", "ENCODING=CP1252"],
  "a.csv": ["-lco", "GEOMETRY=AS_WKT"],
};

const OPTIONS = { id: "navn_ø", value: "größe", sweep: false, localPermutations: 999 } as const;

/** Local results by area name, since a format may bring the rows in another order. */
function byName({ names, areas }: Assessment): Map<string, number> {
  const rows = names.map((_, row) => row).sort((a, b) => names[a] < names[b] ? -1 : 1);
  return new Map(rows.map((row) => [names[row], areas.i[row]]));
}

function assertSame(found: Assessment, wanted: Assessment): void {
  const [run, want] = [found.results.runs[0], wanted.results.runs[0]];
  assert.deepEqual(run.neighbors, want.neighbors);
  assertClose(run.global.moranI.value!, want.global.moranI.value!, 1e-12);
  const [locals, wantedLocals] = [byName(found), byName(wanted)];
  assert.deepEqual([...locals.keys()], [...wantedLocals.keys()]);
  for (const [name, value] of locals) assertClose(value, wantedLocals.get(name)!, 1e-9, name);
}

/** A folder with the layer in every format, in which the work is done by relative paths. */
async function inFolder(test: () => Promise<void>): Promise<void> {
  using folder = tempFolder();
  const home = Deno.cwd();
  await Deno.writeTextFile(join(folder.path, "fläche.geojson"), inventedLayer());
  Deno.chdir(folder.path);
  try {
    await test();
  } finally {
    Deno.chdir(home);
  }
}

Deno.test("assess() gives the same results from every format that native GDAL wrote", (t) =>
  inFolder(async () => {
    const wanted = await assess("fläche.geojson", OPTIONS);
    assert.equal(wanted.results.runs[0].neighbors.pairs, 110); // 30 + 30 sides and 25 + 25 corners
    await Promise.all(
      Object.entries(FORMATS).map(([file, args]) =>
        nativeGdal("ogr2ogr", [...args, "-nln", "areas", file, "fläche.geojson"])
      ),
    );
    await Deno.writeTextFile("a.topojson", asTopology(inventedLayer()));
    for (const file of [...Object.keys(FORMATS), "a.topojson"]) {
      await t.step(file, async () => {
        // CSV and TopoJSON declare no CRS; where a file declares one, that one holds.
        const found = await assess(file, { ...OPTIONS, crs: "EPSG:4326" });
        assertSame(found, wanted);
        if (/tab|mif/.test(file)) return; // their Latin-1 cannot hold the places
        const { values } = readColumn(found.layer, "sted");
        assert.deepEqual(new Set<unknown>(values), new Set<unknown>(PLACES));
      });
    }
  }));

Deno.test("assess() gives the same results from a table with x and y as from a GeoPackage of points", () =>
  inFolder(async () => {
    const points = ["-dialect", "SQLite", "-nln", "points", "-sql"];
    const query = 'SELECT ST_Centroid(geometry), * FROM "fläche"';
    await nativeGdal("ogr2ogr", ["points.gpkg", "fläche.geojson", ...points, query]);
    await nativeGdal("ogr2ogr", ["points.csv", "points.gpkg", "-lco", "GEOMETRY=AS_XY"]);
    const wanted = await assess("points.gpkg", OPTIONS);
    assert.equal(wanted.results.runs[0].neighbors.rule, "nearest:6");
    assertSame(await assess("points.csv", { ...OPTIONS, crs: "EPSG:4326" }), wanted);
  }));
