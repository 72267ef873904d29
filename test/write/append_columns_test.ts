/** Columns added to a file, judged by native GDAL. */
import assert from "node:assert/strict";
import { join } from "node:path";
import { readColumn } from "../../lib/layer/column.ts";
import { decodeLayer } from "../../lib/layer/decode_layer.ts";
import { UsageError } from "../../lib/layer/errors.ts";
import { readFgbHeader } from "../../lib/layer/fgb_header.ts";
import type { ColumnValues, Layer } from "../../lib/layer/layer.ts";
import { readLayer } from "../../lib/read/vector.ts";
import { appendColumns } from "../../lib/write/append_columns.ts";
import { fault } from "../support/fault.ts";
import { fgbOf } from "../support/fgb.ts";
import { writeInventedAreas } from "../support/invented_areas.ts";
import { readNatively } from "../support/native_gdal.ts";
import { tempFolder } from "../support/temp_folder.ts";

const folder = tempFolder();
const original = await writeInventedAreas(folder.path);
Deno.test.afterAll(() => folder[Symbol.dispose]());

const column = (
  name: string,
  kind: ColumnValues["kind"],
  values: readonly (number | null)[] | readonly (string | null)[],
): ColumnValues => ({
  name,
  kind,
  storedAs: "",
  values: kind === "text" || kind === "datetime"
    ? values as (string | null)[]
    : Float64Array.from(values as (number | null)[], (value) => value ?? NaN),
});

const RESULTS = [
  column("x_z", "number", [0.5, null, -1e300, 0, 2e-6]),
  column("_row", "integer", [0, 1, 2, 3, 4]),
  column("far", "integer", [2 ** 40, null, -1, 0, 1]),
  column("x_sig", "boolean", [1, 0, null, 1, 0]),
  column("x_class", "text", ["high among high", null, "łow", "", "high among high"]),
  column("when", "datetime", ["2024-02-29T13:45:10", null, null, null, null]),
];

Deno.test("appendColumns() leaves all values, types and geometry to native GDAL as they were", async () => {
  const path = join(folder.path, "more.fgb");
  await Deno.writeFile(path, appendColumns(await readLayer(original), RESULTS));
  const before = await readNatively(original), after = await readNatively(path);
  assert.equal(after.features.length, before.features.length);
  before.features.forEach((feature, row) => {
    assert.equal(after.features[row].geometry, feature.geometry);
    for (const [name, value] of feature.values) {
      // The format has no dates without a time.
      const expected = name === "day" ? `${value} 00:00:00` : value;
      assert.equal(after.features[row].values.get(name), expected, `${name} of row ${row}`);
    }
  });
  assert.deepEqual(
    [...after.types].slice(0, before.types.size),
    [...before.types].map(([name, type]) => [name, name === "day" ? "DateTime" : type]),
  );
  assert.match(after.text, /ID\["EPSG",32632\]\]\nData axis/);
});

Deno.test("appendColumns() adds columns that native GDAL reads, null where absent", async () => {
  const path = join(folder.path, "added.fgb");
  await Deno.writeFile(path, appendColumns(await readLayer(original), RESULTS));
  const { types, features } = await readNatively(path);
  assert.deepEqual([...types].slice(-RESULTS.length), [
    ["x_z", "Real"],
    ["_row", "Integer"],
    ["far", "Integer64"],
    ["x_sig", "Integer(Boolean)"],
    ["x_class", "String"],
    ["when", "DateTime"],
  ]);
  const seen = (name: string) => features.map(({ values }) => values.get(name) ?? null);
  assert.deepEqual(seen("x_z"), ["0.5", null, "-1e+300", "0", "2e-06"]);
  assert.deepEqual(seen("_row"), ["0", "1", "2", "3", "4"]);
  assert.deepEqual(seen("far"), ["1099511627776", null, "-1", "0", "1"]);
  assert.deepEqual(seen("x_sig"), ["1", "0", null, "1", "0"]);
  assert.deepEqual(seen("x_class"), ["high among high", null, "łow", "", "high among high"]);
  assert.deepEqual(seen("when"), ["2024/02/29 13:45:10", null, null, null, null]);
});

Deno.test("appendColumns() can be done again and gives the same bytes for the same input", async () => {
  const layer = await readLayer(original);
  const once = appendColumns(layer, RESULTS);
  assert.deepEqual(appendColumns(layer, RESULTS), once);
  const [first, ...rest] = RESULTS;
  const step = decodeLayer(appendColumns(layer, [first]), "step.fgb");
  const twice = decodeLayer(appendColumns(step, rest), "step.fgb");
  for (const { name, values } of RESULTS) {
    assert.deepEqual(readColumn(twice, name).values, values, name);
  }
  assert.deepEqual(twice.geometry, layer.geometry);
});

/** Layers by the format's own JavaScript package, which lays features out in another way than GDAL. */
function foreignLayer(): Layer {
  const square = (x: number) => [[[x, 0], [x + 1, 0], [x + 1, 1], [x, 0]]];
  return decodeLayer(
    fgbOf([
      { geometry: { type: "Polygon", coordinates: square(0) }, properties: { a: "x", b: 1 } },
      {
        geometry: { type: "MultiPolygon", coordinates: [square(2), square(4)] },
        properties: { a: "yy", b: null },
      },
      { geometry: { type: "Point", coordinates: [9, 9] }, properties: { a: null, b: null } },
    ]),
    "foreign.fgb",
  );
}

Deno.test("appendColumns() takes files of other writers", async () => {
  const path = join(folder.path, "foreign.fgb");
  const added = column("c", "text", ["one", "two", "three"]);
  await Deno.writeFile(path, appendColumns(foreignLayer(), [added]));
  const { features } = await readNatively(path);
  assert.deepEqual(features.map(({ values, geometry }) => [...values.values(), geometry]), [
    ["x", "1", "one", "POLYGON ((0 0,1 0,1 1,0 0))"],
    ["yy", "two", "MULTIPOLYGON (((2 0,3 0,3 1,2 0)),((4 0,5 0,5 1,4 0)))"],
    ["three", "POINT (9 9)"],
  ]);
});

Deno.test("appendColumns() keeps coordinates on multiples of 8 whatever lies before them", () => {
  const layer = foreignLayer();
  for (let length = 0; length < 8; length++) {
    const text = column("c", "text", ["x".repeat(length), null, "x"]);
    const grown = decodeLayer(appendColumns(layer, [text]), "t");
    assert.deepEqual(grown.geometry, layer.geometry);
    for (let row = 0; row < 3; row++) {
      assert.equal((grown.featureStarts[row + 1] - grown.featureStarts[row]) % 8, 0);
    }
  }
});

Deno.test("appendColumns() without columns only rewrites the header", () => {
  const layer = foreignLayer();
  const { header } = readFgbHeader(appendColumns(layer, []));
  assert.deepEqual(header.envelope, [0, 0, 9, 9]);
  assert.equal(header.featuresCount, 3);
});

Deno.test("appendColumns() refuses a name that is taken and columns of another length", () => {
  const layer = foreignLayer();
  const values = [1, 2, 3];
  assert.throws(
    () => appendColumns(layer, [column("a", "number", values)]),
    fault(UsageError, /field "a" to layer .* of foreign\.fgb/, /rename/),
  );
  const twice = [column("n", "number", values), column("n", "number", values)];
  assert.throws(() => appendColumns(layer, twice), fault(UsageError, /field "n"/));
  assert.throws(
    () => appendColumns(layer, [column("n", "number", [1])]),
    fault(UsageError, /"n" with 1 values .* with 3 rows/),
  );
});
