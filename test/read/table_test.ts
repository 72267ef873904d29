import assert from "node:assert/strict";
import { fileURLToPath } from "node:url";
import { UnreadableError, UsageError } from "../../lib/layer/errors.ts";
import { readTable, tableColumn, tableColumns, tableFromBytes } from "../../lib/read/table.ts";
import { fault } from "../support/fault.ts";

const path = (name: string) =>
  fileURLToPath(new URL(`../../testdata/tables/${name}`, import.meta.url));
const bytes = (text: string) => new TextEncoder().encode(text);

Deno.test("readTable() reads the same table from Windows-1252 and from UTF-16", async () => {
  const columns = [
    { name: "Kreis", cells: ["Köln", "Düren", "„Eifel“"] },
    { name: "Fläche", cells: ["405,15", "941,5", "1.246,1"] },
    { name: "Quote", cells: ["3,5", "*", "2,25"] },
  ];
  for (const source of ["windows_1252.csv", "utf_16le.csv"]) {
    assert.deepEqual(await readTable(path(source)), { source, count: 3, columns });
  }
});

Deno.test("readTable() reads a workbook whatever its ending says", async () => {
  const table = await readTable(path("one_sheet.xlsx"));
  assert.equal(table.count, 3);
  assert.deepEqual(tableColumn(table, "Name").cells, ["Søndre Ås ", "Zürich", ""]);
  const workbook = await Deno.readFile(path("one_sheet.xlsx"));
  assert.deepEqual((await tableFromBytes("renamed.csv", workbook)).columns, table.columns);
});

Deno.test("readTable() names a missing file, as one sentence", async () => {
  await assert.rejects(
    readTable("no/such.csv"),
    fault(UnreadableError, /no\/such\.csv as there is no such file/),
  );
});

Deno.test("tableFromBytes() trims column names and keeps numbers and ids as text", async () => {
  const table = await tableFromBytes("a.csv", bytes(" code , 2020\n0042,12.0\n"));
  assert.deepEqual(table.columns, [
    { name: "code", cells: ["0042"] },
    { name: "2020", cells: ["12.0"] },
  ]);
});

Deno.test("tableFromBytes() drops empty rows at the end but none in between", async () => {
  const table = await tableFromBytes("a.csv", bytes("a;b\n1;2\n;\n3;4\n;\n ;\n"));
  assert.equal(table.count, 3);
  assert.deepEqual(table.columns[0].cells, ["1", "", "3"]);
});

Deno.test("tableFromBytes() names a filled column without a name and drops an empty one", async () => {
  const table = await tableFromBytes("a.csv", bytes(",a,\n1,2,\n2,3,\n"));
  assert.deepEqual(table.columns.map(({ name }) => name), ["column 1", "a"]);
});

Deno.test("tableFromBytes() rejects empty and ragged files and repeated names", async () => {
  await assert.rejects(
    tableFromBytes("a.csv", bytes("")),
    fault(UnreadableError, /a\.csv as it is empty/),
  );
  await assert.rejects(
    tableFromBytes("a.csv", bytes("\uFEFF\n")),
    fault(UnreadableError, /is empty/),
  );
  await assert.rejects(tableFromBytes("a.csv", bytes("a,b\n")), fault(UnreadableError, /no rows/));
  await assert.rejects(
    tableFromBytes("a.csv", bytes("a,b\n1\n")),
    fault(UnreadableError, /line 2 has 1 cell/),
  );
  await assert.rejects(
    tableFromBytes("a.csv", bytes("a,b, a,b\n1,2,3,4\n")),
    fault(UnreadableError, /several columns are called "a", "b"/),
  );
  await assert.rejects(
    tableFromBytes("a.csv", bytes("a\n1"), { header: 0 }),
    fault(UsageError, /row 0/),
  );
});

Deno.test("tableFromBytes() passes flags on to the reader", async () => {
  const latin2 = Uint8Array.of(0x61, 0x2c, 0x62, 0x0a, 0xb3, 0x2c, 0x31, 0x0a);
  const options = { encoding: "iso-8859-2", delimiter: "," };
  assert.deepEqual((await tableFromBytes("a.csv", latin2, options)).columns[0].cells, ["ł"]);
});

Deno.test("tableColumn() suggests the nearest column; tableColumns() shares the cells", async () => {
  const table = await tableFromBytes("a.csv", bytes("code,rate\n1,2\n"));
  assert.throws(
    () => tableColumn(table, "rat"),
    (error) =>
      error instanceof UsageError && /"rat" in a\.csv.*code, rate.*"rate"/.test(error.message),
  );
  const [code] = tableColumns(table);
  assert.deepEqual({ ...code }, { name: "code", kind: "text", storedAs: "text", values: ["1"] });
  assert.equal(code.values, table.columns[0].cells);
});
