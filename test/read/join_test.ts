import assert from "node:assert/strict";
import { fileURLToPath } from "node:url";
import { readColumn } from "../../lib/layer/column.ts";
import { UnfitDataError, UsageError } from "../../lib/layer/errors.ts";
import type { Layer, Table } from "../../lib/layer/layer.ts";
import { compileFilter } from "../../lib/prepare/filter.ts";
import { numbersOf } from "../../lib/prepare/numbers.ts";
import { joinTable } from "../../lib/read/join.ts";
import { readTable, tableColumns } from "../../lib/read/table.ts";
import { readVectorBytes } from "../../lib/read/vector.ts";
import { fault } from "../support/fault.ts";

/** A layer of points with the given attributes. */
async function layerOf(
  ...rows: Record<string, string | number | boolean | null>[]
): Promise<Layer> {
  const features = rows.map((properties, i) => (
    { type: "Feature", properties, geometry: { type: "Point", coordinates: [i, 0] } }
  ));
  const text = JSON.stringify({ type: "FeatureCollection", features });
  return await readVectorBytes("areas.geojson", new TextEncoder().encode(text));
}

function tableOf(columns: Record<string, string[]>): Table {
  return {
    source: "rates.csv",
    count: Object.values(columns)[0].length,
    columns: Object.entries(columns).map(([name, cells]) => ({ name, cells })),
  };
}

const onCode = { layerKey: "CODE", tableKey: "CODE" };

Deno.test("joinTable() adds the table's columns as text, null where no row matches", async () => {
  const layer = await layerOf({ CODE: "0042" }, { CODE: "0043" }, { CODE: null }, { CODE: "0045" });
  const table = tableOf({
    CODE: ["0045", "0042", "0099", ""],
    RATE: ["1,5", "*", "3", "4"],
    "N 2020": ["", "7", "8", "9"],
  });
  const joined = joinTable(layer, table, onCode);
  assert.deepEqual(joined.layer.added, [
    { name: "RATE", kind: "text", storedAs: "text", values: ["*", null, null, "1,5"] },
    { name: "N 2020", kind: "text", storedAs: "text", values: ["7", null, null, ""] },
  ]);
  assert.deepEqual(joined.report, {
    table: "rates.csv",
    layerKey: "CODE",
    tableKey: "CODE",
    matched: 2,
    layerOnly: ["0043", "(no key)"],
    layerOnlyCount: 2,
    tableOnly: ["0099"],
    tableOnlyCount: 1,
    hint: null,
    renamed: [],
    notes: [],
  });
  assert.equal(layer.added.length, 0);
  const { values, missing } = numbersOf(readColumn(joined.layer, "RATE"), { missing: ["*"] });
  assert.deepEqual(values, Float64Array.of(NaN, NaN, NaN, 1.5));
  assert.deepEqual(missing, [{ kind: "null", count: 2 }, { kind: "*", count: 1 }]);
});

Deno.test("joinTable() matches numbers by their shortest text and 64-bit integers digit by digit", async () => {
  const layer = await layerOf({ id: 12, big: 1 }, { id: 7.5, big: 1 }, { id: 8, big: 1 });
  const table = tableOf({ id: ["12", "7.5", "08"], n: ["a", "b", "c"] });
  const { layer: joined, report } = joinTable(layer, table, { layerKey: "id", tableKey: "id" });
  assert.deepEqual(joined.added[0].values, ["a", "b", null]);
  assert.equal(report.hint, "1 more key would match after dropping leading zeros");

  const text =
    '{"type":"FeatureCollection","features":[{"type":"Feature","geometry":null,"properties":' +
    '{"id":9007199254740993}}]}';
  const long = await readVectorBytes("long.geojson", new TextEncoder().encode(text));
  const keys = tableOf({ id: ["9007199254740992", "9007199254740993"], n: ["wrong", "right"] });
  const found = joinTable(long, keys, { layerKey: "id", tableKey: "id" });
  assert.deepEqual(found.layer.added[0].values, ["right"]);
});

Deno.test("joinTable() hints at spaces, letter case, and all differences together", async () => {
  const layer = await layerOf({ CODE: "A" }, { CODE: "b1" }, { CODE: "07" }, { CODE: "ok" });
  const hint = (...keys: string[]) =>
    joinTable(layer, tableOf({ CODE: ["ok", ...keys], N: ["", ...keys] }), onCode).report.hint;
  assert.equal(hint("A ", "\u00a0b1"), "2 more keys would match after trimming spaces");
  assert.equal(hint("B1"), "1 more key would match after ignoring upper and lower case");
  assert.equal(
    hint("a", " b1", "7"),
    "3 more keys would match after trimming spaces and ignoring upper and lower case and " +
      "dropping leading zeros",
  );
  assert.equal(hint("C"), null);
});

Deno.test("joinTable() gives areas that share a key the same cells and says so", async () => {
  const layer = await layerOf({ CODE: "A" }, { CODE: "A" }, { CODE: "B" });
  const { layer: joined, report } = joinTable(
    layer,
    tableOf({ CODE: ["A", "B"], N: ["1", "2"] }),
    onCode,
  );
  assert.deepEqual(joined.added[0].values, ["1", "1", "2"]);
  assert.deepEqual(report.notes, [
    "3 areas were matched by 2 keys: areas that share a key got the same values",
  ]);
});

Deno.test("joinTable() renames columns the layer has already, in whatever case", async () => {
  const layer = await layerOf({ CODE: "A", Name: "x" });
  const table = tableOf({ KEY: ["A"], NAME: ["y"], code: ["c"], N: ["1"] });
  const keys = { layerKey: "CODE", tableKey: "KEY" };
  const once = joinTable(layer, table, keys);
  assert.deepEqual(once.layer.added.map(({ name }) => name), [
    "NAME (rates.csv)",
    "code (rates.csv)",
    "N",
  ]);
  assert.deepEqual(once.report.renamed, [
    { from: "NAME", to: "NAME (rates.csv)" },
    { from: "code", to: "code (rates.csv)" },
  ]);
  assert.match(once.report.notes[0], /field "NAME" already.*"NAME \(rates\.csv\)"/);
  // Joining again keeps what was joined before.
  const twice = joinTable(once.layer, table, keys);
  assert.deepEqual(twice.layer.added.map(({ name }) => name).slice(3), [
    "NAME (rates.csv 2)",
    "code (rates.csv 2)",
    "N (rates.csv)",
  ]);
});

Deno.test("joinTable() lists the first 100 keys and counts all", async () => {
  const layer = await layerOf(...Array.from({ length: 130 }, (_, i) => ({ CODE: `L${i}` })));
  const cells = ["L0", ...Array.from({ length: 120 }, (_, i) => `T${i}`)];
  const { report } = joinTable(layer, tableOf({ CODE: cells, N: cells }), onCode);
  assert.deepEqual([report.layerOnlyCount, report.tableOnlyCount], [129, 120]);
  assert.deepEqual([report.layerOnly.length, report.tableOnly.length], [100, 100]);
  assert.deepEqual([report.layerOnly[0], report.tableOnly[99]], ["L1", "T99"]);
});

Deno.test("joinTable() explains that nothing matches with samples of both sides and a hint", async () => {
  const layer = await layerOf({ CODE: "0001" }, { CODE: "0002" });
  assert.throws(
    () =>
      joinTable(layer, tableOf({ AREA: ["1", "2"], N: ["", ""] }), {
        layerKey: "CODE",
        tableKey: "AREA",
      }),
    fault(
      UnfitDataError,
      /no AREA of the table \("1", "2"\) equals any CODE of the layer \("0001", "0002"\)/,
      /2 more keys would match after dropping leading zeros/,
    ),
  );
  assert.throws(
    () => joinTable(layer, tableOf({ CODE: ["x"], N: [""] }), onCode),
    fault(UnfitDataError, /check that --on/),
  );
});

Deno.test("joinTable() suggests the nearest key on either side", async () => {
  const layer = await layerOf({ CODE: "A" });
  const table = tableOf({ AREA: ["A"], N: ["1"] });
  assert.throws(
    () => joinTable(layer, table, { layerKey: "CODF", tableKey: "AREA" }),
    fault(UsageError, /"CODE"/),
  );
  assert.throws(
    () => joinTable(layer, table, { layerKey: "CODE", tableKey: "AREAS" }),
    fault(UsageError, /"AREA"/),
  );
});

Deno.test("joinTable() refuses a long table, proposing the filter that would do", async () => {
  const path = fileURLToPath(new URL("../../testdata/tables/long.csv", import.meta.url));
  const table = await readTable(path);
  const layer = await layerOf({ CODE: "E01" }, { CODE: "E02" }, { CODE: "E03" });
  const keys = { layerKey: "CODE", tableKey: "AREA" };
  const where = (filter: string) => ({ ...keys, keep: compileFilter(filter, tableColumns(table)) });
  // Neither year nor sex alone tells the 4 rows of an area apart.
  assert.throws(
    () => joinTable(layer, table, keys),
    fault(
      UnfitDataError,
      /long\.csv on AREA as key "E01" stands in 4 rows \(1, 2, 3, \.\.\.\) and 2 more keys repeat/,
      /--join-where "YEAR = 2021 AND SEX = 'm'"/,
    ),
  );
  // With one sex chosen, the year does.
  assert.throws(
    () => joinTable(layer, table, where("SEX = 'f'")),
    fault(UnfitDataError, /2 rows \(1, 3\).*--join-where "YEAR = 2021"/),
  );
  const { layer: joined, report } = joinTable(layer, table, where("YEAR = 2021 AND SEX = 'm'"));
  assert.deepEqual(joined.added.at(-1)?.values, ["4", "11", "1"]);
  assert.deepEqual([report.matched, report.layerOnlyCount, report.tableOnlyCount], [3, 0, 0]);
});

Deno.test("joinTable() proposes no filter where no column tells the rows apart", async () => {
  const layer = await layerOf({ CODE: "A" });
  assert.throws(
    () => joinTable(layer, tableOf({ CODE: ["A", "A"], N: ["1", "1"] }), onCode),
    fault(UnfitDataError, /key "A" stands in 2 rows \(1, 2\); .*--join-where 'FIELD = value'/),
  );
  assert.throws(
    () => joinTable(layer, tableOf({ CODE: ["A"], N: ["1"] }), { ...onCode, keep: () => false }),
    fault(UnfitDataError, /none of its 1 rows is selected by --join-where/),
  );
});
