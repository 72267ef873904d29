/** Reading files that native GDAL wrote, format by format. */
import assert from "node:assert/strict";
import { join } from "node:path";
import { readColumn } from "../../lib/layer/column.ts";
import type { Layer } from "../../lib/layer/layer.ts";
import { listLayers, readLayer, readVectorBytes } from "../../lib/read/vector.ts";
import {
  INVENTED_CRS,
  INVENTED_NAMES,
  INVENTED_NUMBERS,
  INVENTED_VERTICES,
  INVENTED_WORDS,
  writeInventedAreas,
} from "../support/invented_areas.ts";
import { nativeGdal, readNatively } from "../support/native_gdal.ts";
import { tempFolder } from "../support/temp_folder.ts";

const UTM_FIRST = [500000, 6000000];
const DEGREES_FIRST = [9, 54.1481041];

/** A format: the file to write, how native GDAL writes it, and how it differs from the original. */
interface Case {
  readonly file: string;
  readonly args?: readonly string[];
  /** Layer name where it is not `areas`. */
  readonly layer?: string;
  /** First coordinate. @default that of the original */
  readonly first?: readonly number[];
  readonly crs?: string;
  /** Rows that native GDAL leaves out, as it writes no null geometry there. */
  readonly lost?: readonly number[];
  /** Names as text of fewer characters allow. */
  readonly names?: readonly (string | null)[];
  /** Fields to leave out of the comparison, as the format has no such names or types. */
  readonly without?: readonly ("é" | "中文")[];
}

const IN_DEGREES = { first: DEGREES_FIRST, crs: "EPSG:4326" };
const FEW_FIELDS = ["-select", "name,é,count,day"];

const CASES: readonly Case[] = [
  { file: "copy.gpkg" },
  { file: "plain.fgb", args: ["-f", "FlatGeobuf", "-lco", "SPATIAL_INDEX=NO"], lost: [2] },
  { file: "planar.geojson" },
  { file: "degrees.geojson", args: ["-lco", "RFC7946=YES"], ...IN_DEGREES },
  { file: "lines.geojsonl", layer: "lines", ...IN_DEGREES },
  { file: "lines.ndjson", args: ["-f", "GeoJSONSeq"], layer: "lines", ...IN_DEGREES },
  { file: "google.kml", args: ["-f", "KML"], ...IN_DEGREES },
  { file: "library.kml", args: ["-f", "LIBKML"], ...IN_DEGREES },
  { file: "packed.kmz", args: ["-f", "LIBKML"], ...IN_DEGREES },
  { file: "version2.gml", args: ["-f", "GML", "-dsco", "FORMAT=GML2"] },
  { file: "version3.gml", args: ["-f", "GML", "-dsco", "FORMAT=GML3.2"] },
  {
    file: "utf8.shp",
    args: ["-lco", "ENCODING=UTF-8", ...FEW_FIELDS],
    layer: "utf8",
    without: ["中文"],
  },
  {
    file: "windows.shp",
    args: ["-lco", "ENCODING=CP1252", ...FEW_FIELDS],
    layer: "windows",
    names: ["Ærø Süd", "ód-ähnlich", "Ünterort", null, "Plain"],
    without: ["中文"],
  },
  {
    file: "eastern.shp",
    args: ["-lco", "ENCODING=CP1250", "-select", "name"],
    layer: "eastern",
    names: ["r Süd", "Łódź-ähnlich", "Ünterort", null, "Plain"],
    without: ["é", "中文"],
  },
  {
    file: "map.tab",
    args: ["-f", "MapInfo File", "-select", "name"],
    layer: "map",
    names: ["Ærø Süd", "Łódź-ähnlich", "Ünterort", "", "Plain"],
    without: ["é", "中文"],
  },
  {
    file: "map.mif",
    args: ["-f", "MapInfo File", "-select", "name"],
    layer: "map",
    names: ["Ærø Süd", "Łódź-ähnlich", "Ünterort", "", "Plain"],
    without: ["é", "中文"],
  },
  { file: "database.sqlite", args: ["-f", "SQLite"] },
  { file: "folder.gdb", args: ["-f", "OpenFileGDB", "-nlt", "MULTIPOLYGON"] },
];

/** The rows that are left, for comparison with a column. */
function kept<T>(values: readonly T[], { lost = [] }: Case): T[] {
  return values.filter((_, row) => !lost.includes(row));
}

function assertInvented(layer: Layer, wanted: Case): void {
  const { layer: name = "areas", first = UTM_FIRST, crs = INVENTED_CRS, without = [] } = wanted;
  assert.equal(layer.name, name);
  assert.equal(layer.source, wanted.file);
  assert.equal(layer.crs?.code, crs);
  assert.equal(layer.shape, "polygon");
  assert.deepEqual(readColumn(layer, "name").values, kept(wanted.names ?? INVENTED_NAMES, wanted));
  if (!without.includes("é")) {
    const numbers = kept(INVENTED_NUMBERS, wanted).map((value) => value ?? NaN);
    assert.deepEqual(readColumn(layer, "é").values, Float64Array.from(numbers));
  }
  if (!without.includes("中文")) {
    // Some formats do not tell empty text from null.
    const words = readColumn(layer, "中文").values as readonly (string | null)[];
    assert.deepEqual(
      words.map((word) => word || null),
      kept(INVENTED_WORDS, wanted).map((word) => word || null),
    );
  }
  const { partStarts, ringStarts, vertexStarts, xy } = layer.geometry;
  const vertices = Array.from({ length: layer.count }, (_, row) => {
    const at = (feature: number) => vertexStarts[ringStarts[partStarts[feature]]];
    return at(row + 1) - at(row);
  });
  assert.deepEqual(vertices, kept(INVENTED_VERTICES, wanted));
  // Outlines may start at another vertex or turn the other way.
  const near = (x: number, y: number) => Math.hypot(x - first[0], y - first[1]) < 1e-6;
  assert.ok(Array.from({ length: 5 }).some((_, v) => near(xy[2 * v], xy[2 * v + 1])));
}

const folder = tempFolder();
const original = await writeInventedAreas(folder.path);
Deno.test.afterAll(() => folder[Symbol.dispose]());

Deno.test("readLayer() reads what native GDAL wrote in each format", async (t) => {
  const path = ({ file }: Case) => join(folder.path, file);
  await Promise.all(
    CASES.map((wanted) => nativeGdal("ogr2ogr", [...(wanted.args ?? []), path(wanted), original])),
  );
  for (const wanted of CASES) {
    await t.step(wanted.file, async () => assertInvented(await readLayer(path(wanted)), wanted));
  }
});

Deno.test("readLayer() keeps every field type that FlatGeobuf has", async () => {
  const layer = await readLayer(original);
  assert.deepEqual(
    layer.columns.map(({ name, kind, storedAs }) => `${name} ${kind} ${storedAs}`),
    [
      "name text String",
      "é number Float64",
      "中文 text String",
      "count integer Int32",
      "big integer Int64",
      "day datetime DateTime",
      "moment datetime DateTime",
      "flag boolean Bool",
      "single number Float32",
      "raw binary Binary",
    ],
  );
  const big = ["9007199254740993", "-1", null, "0", "42"];
  assert.deepEqual(readColumn(layer, "big").values, big);
  assert.deepEqual(readColumn(layer, "flag").values, Float64Array.of(1, 0, NaN, 1, NaN));
  assert.deepEqual(readColumn(layer, "raw").values, ["0001ff", null, null, null, null]);
  assert.deepEqual(readColumn(layer, "中文").values, INVENTED_WORDS);
});

Deno.test("readLayer() reads Shapefile text without a mark as UTF-8 or as the encoding asked for", async () => {
  for (const encoding of ["UTF-8", "CP1250"]) {
    const path = join(folder.path, `${encoding}.shp`);
    await nativeGdal("ogr2ogr", [
      "-lco",
      `ENCODING=${encoding}`,
      "-select",
      "name",
      path,
      original,
    ]);
    await Deno.remove(join(folder.path, `${encoding}.cpg`));
    // The language byte of a dBase header is another mark.
    const table = join(folder.path, `${encoding}.dbf`);
    await Deno.writeFile(table, (await Deno.readFile(table)).fill(0, 29, 30));
    const options = encoding === "UTF-8" ? {} : { encoding };
    const names = readColumn(await readLayer(path, options), "name").values;
    assert.equal(names[1], "Łódź-ähnlich", encoding);
  }
});

Deno.test("readLayer() keeps GeoJSON text that looks like a date, and arrays as text", async () => {
  const text = JSON.stringify({
    type: "FeatureCollection",
    features: [{
      type: "Feature",
      properties: { day: "2024/02/29", code: "0042", list: [1, 2], deep: { a: 1 } },
      geometry: { type: "Point", coordinates: [1, 2] },
    }],
  });
  const layer = await readVectorBytes("dates.geojson", new TextEncoder().encode(text));
  assert.deepEqual(readColumn(layer, "day").values, ["2024/02/29"]);
  assert.deepEqual(readColumn(layer, "code").values, ["0042"]);
  assert.equal(readColumn(layer, "list").kind, "text");
  assert.match(String(readColumn(layer, "list").values[0]), /^\[ ?1, ?2 ?\]$/);
});

Deno.test("readLayer() turns list fields into text", async () => {
  const path = join(folder.path, "lists.gml");
  const gml = `<c xmlns:gml="http://www.opengis.net/gml"><gml:featureMember><area>
    <tag>a</tag><tag>b</tag><gml:Point><gml:pos>1 2</gml:pos></gml:Point>
  </area></gml:featureMember></c>`;
  await Deno.writeTextFile(path, gml);
  assert.match(String(readColumn(await readLayer(path), "tag").values[0]), /a,b/);
});

/** The areas, and a table that hangs beside them. */
async function writeWithTable(name: string): Promise<string> {
  const path = join(folder.path, name);
  await Deno.copyFile(original, path);
  const rows = join(folder.path, "rows.csv");
  await nativeGdal("ogr2ogr", ["-update", path, rows, "-nln", "layer_styles", "-nlt", "NONE"]);
  return path;
}

Deno.test("readLayer() picks the only layer with geometry and leaves tables aside", async () => {
  const path = await writeWithTable("styled.gpkg");
  assert.equal((await readLayer(path)).name, "areas");
  assert.equal((await readLayer(path, { layer: "layer_styles" })).shape, "none");
});

Deno.test("listLayers() tells name, size and geometry of each layer", async () => {
  assert.deepEqual(await listLayers(await writeWithTable("listed.gpkg")), [
    { name: "areas", count: 5, geometry: "Geometry" },
    { name: "layer_styles", count: 5, geometry: null },
  ]);
});

Deno.test("readLayer() reads an indexed FlatGeobuf in the order of the file", async () => {
  const path = join(folder.path, "indexed.fgb");
  await nativeGdal("ogr2ogr", [path, original]);
  const { features } = await readNatively(path);
  const names = features.map(({ values }) => values.get("name") ?? null);
  assert.notDeepEqual(names, INVENTED_NAMES);
  assert.deepEqual(readColumn(await readLayer(path), "name").values, names);
});
