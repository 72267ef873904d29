import assert from "node:assert/strict";
import { readColumn } from "../../lib/layer/column.ts";
import { UnreadableError, UsageError } from "../../lib/layer/errors.ts";
import type { Layer, Table } from "../../lib/layer/layer.ts";
import { tableLayer } from "../../lib/read/table_layer.ts";
import { fault } from "../support/fault.ts";

function tableOf(columns: Record<string, string[]>): Table {
  return {
    source: "sites.2024.csv",
    count: Object.values(columns)[0].length,
    columns: Object.entries(columns).map(([name, cells]) => ({ name, cells })),
  };
}

const valuesOf = (layer: Layer, name: string) => [...readColumn(layer, name).values];

Deno.test("tableLayer() makes points of lon and lat, row for row, and assumes WGS 84", async () => {
  const table = tableOf({
    id: ["0042", "0043", "0044"],
    Lat: ["52,5", "", "51"],
    LON: ["13,405", "13", "-0,25"],
  });
  const layer = await tableLayer(table);
  assert.equal(layer.source, "sites.2024.csv");
  assert.equal(layer.count, 3);
  assert.equal(layer.shape, "point");
  assert.deepEqual([...layer.geometry.kinds], [1, 0, 1]);
  assert.deepEqual([...layer.geometry.xy], [13.405, 52.5, -0.25, 51]);
  assert.equal(layer.crs?.code, "EPSG:4326");
  assert.match(layer.crs?.name ?? "", /assumed from columns LON and Lat/);
  assert.deepEqual(layer.columns.map(({ name }) => name), ["id", "Lat", "LON"]);
  assert.deepEqual(valuesOf(layer, "id"), ["0042", "0043", "0044"]);
  assert.deepEqual(valuesOf(layer, "Lat"), ["52,5", "", "51"]);
});

Deno.test("tableLayer() makes number fields of plain numbers only", async () => {
  const layer = await tableLayer(tableOf({
    x: ["1", "2"],
    y: ["3", "4"],
    zeros: ["01", "2"],
    whole: ["7", ""],
    mixed: ["7", "2.50"],
    suppressed: ["7", "*"],
    comma: ["1,5", "2"],
    empty: ["", ""],
    note: ['say "a, b"', "two\nlines"],
    day: ["2024-01-01", "2024-01-02"],
    "2020": ["1e3", "-0.5"],
  }));
  const kinds = Object.fromEntries(layer.columns.map(({ name, kind }) => [name, kind]));
  assert.deepEqual(kinds, {
    x: "integer",
    y: "integer",
    zeros: "text",
    whole: "integer",
    mixed: "number",
    suppressed: "text",
    comma: "text",
    empty: "text",
    note: "text",
    day: "text",
    "2020": "number",
  });
  assert.deepEqual(valuesOf(layer, "whole"), [7, NaN]);
  assert.deepEqual(valuesOf(layer, "mixed"), [7, 2.5]);
  assert.deepEqual(valuesOf(layer, "2020"), [1000, -0.5]);
  assert.deepEqual(valuesOf(layer, "note"), ['say "a, b"', "two\nlines"]);
  assert.deepEqual(valuesOf(layer, "empty"), ["", ""]);
  assert.equal(layer.crs, null);
});

Deno.test("tableLayer() reads polygons from WKT, whose column is no field any more", async () => {
  const square = "POLYGON ((0 0,1 0,1 1,0 1,0 0))";
  const layer = await tableLayer(tableOf({
    WKT: [square, " polygon empty", "", square.toLowerCase()],
    n: ["1", "2", "3", "4"],
  }));
  assert.equal(layer.shape, "polygon");
  assert.deepEqual([...layer.geometry.kinds], [3, 0, 0, 3]);
  assert.deepEqual(layer.columns.map(({ name }) => name), ["n"]);
  assert.deepEqual(valuesOf(layer, "n"), [1, 2, 3, 4]);
});

Deno.test("tableLayer() obeys named columns and a named CRS", async () => {
  const table = tableOf({
    "Rechts,wert": ["500000", "500100"],
    Hochwert: ["5400000", "5400100"],
    lon: ["1", "2"],
    lat: ["3", "4"],
  });
  const layer = await tableLayer(table, { x: "Rechts,wert", y: "Hochwert", crs: "EPSG:25832" });
  assert.deepEqual([...layer.geometry.xy], [500000, 5400000, 500100, 5400100]);
  assert.equal(layer.crs?.code, "EPSG:25832");
});

Deno.test("tableLayer() assumes no CRS beyond the range of degrees or for other names", async () => {
  const beyond = await tableLayer(tableOf({ lon: ["500000", "1"], lat: ["1", "2"] }));
  assert.equal(beyond.crs, null);
  const plane = await tableLayer(tableOf({ easting: ["1"], northing: ["2"] }));
  assert.equal(plane.crs, null);
});

Deno.test("tableLayer() names the row whose coordinate or geometry cannot be read", async () => {
  await assert.rejects(
    tableLayer(tableOf({ x: ["1", "abc"], y: ["1", "2"] })),
    fault(UnreadableError, /coordinate "abc" of column x in row 2 of sites\.2024\.csv/),
  );
  await assert.rejects(
    tableLayer(tableOf({ geom: ["POINT (1 2)", "POINT 3 4"], n: ["1", "2"] })),
    fault(UnreadableError, /geometry "POINT 3 4" of column geom in row 2 of sites\.2024\.csv/),
  );
});

Deno.test("tableLayer() asks for columns it cannot find, and for pairs", async () => {
  await assert.rejects(
    tableLayer(tableOf({ code: ["1"], lat: ["2"] })),
    fault(UsageError, /coordinates in sites.*code, lat.*--x and --y.*--wkt/),
  );
  const table = tableOf({ east: ["1"], north: ["2"], shape: ["POINT (1 2)"] });
  await assert.rejects(tableLayer(table, { x: "east" }), fault(UsageError, /--x alone/));
  await assert.rejects(tableLayer(table, { x: "eats", y: "north" }), fault(UsageError, /"east"/));
  await assert.rejects(
    tableLayer(table, { x: "east", y: "north", wkt: "shape" }),
    fault(UsageError, /--wkt together with/),
  );
});
