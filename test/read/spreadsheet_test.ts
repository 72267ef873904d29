import assert from "node:assert/strict";
import { readFileSync } from "node:fs";
import { strToU8, zipSync } from "fflate";
import { UnreadableError, UsageError } from "../../lib/layer/errors.ts";
import { readSheetRows } from "../../lib/read/spreadsheet.ts";
import { fault } from "../support/fault.ts";

const folder = new URL("../../testdata/tables/", import.meta.url);
const fixture = (name: string) => new Uint8Array(readFileSync(new URL(name, folder)));

/** A workbook of one sheet from the XML of its rows, with Excel's namespaces. */
function workbook(rows: string): Uint8Array {
  const office = "http://schemas.openxmlformats.org";
  const main = `xmlns="${office}/spreadsheetml/2006/main"`;
  const relations = `${office}/officeDocument/2006/relationships`;
  return zipSync({
    "xl/workbook.xml": strToU8(
      `<workbook ${main} xmlns:r="${relations}"><sheets>` +
        `<sheet name="S" sheetId="1" r:id="rId1"/></sheets></workbook>`,
    ),
    "xl/_rels/workbook.xml.rels": strToU8(
      `<Relationships xmlns="${office}/package/2006/relationships"><Relationship Id="rId1" ` +
        `Type="${relations}/worksheet" Target="worksheets/sheet1.xml"/></Relationships>`,
    ),
    "xl/worksheets/sheet1.xml": strToU8(
      `<worksheet ${main}><sheetData>${rows}</sheetData></worksheet>`,
    ),
  });
}

Deno.test("readSheetRows() gives every cell as text", async () => {
  const rows = await readSheetRows(fixture("one_sheet.xlsx"), { source: "one_sheet.xlsx" });
  assert.deepEqual(rows, [
    ["Code", " Name ", "2020", "Rate", "Surveyed", "Urban", "Total"],
    // Text 0042 keeps its zeros and spaces; 12 shown as 12.00 is 12; the date has no time.
    ["0042", "Søndre Ås ", "12", "0.1", "2024-03-31", "true", ""],
    // A rate shown as 12.5 is read in full; the formula of the last column has no stored result.
    ["0043", "Zürich", "1234567", "12.46666666666667", "2024-03-31T18:30:00", "false", ""],
    ["0044", "", "*", "<5", "", "", ""],
  ]);
});

Deno.test("readSheetRows() undoes the 17 digits of stored numbers", async () => {
  const bytes = workbook(
    '<row r="1"><c r="A1"><v>0.10000000000000001</v></c><c r="B1"><v>1E-3</v></c>' +
      '<c r="C1"><v>12.0</v></c></row>',
  );
  assert.deepEqual(await readSheetRows(bytes, { source: "a.xlsx" }), [["0.1", "0.001", "12"]]);
});

Deno.test("readSheetRows() fills short rows, skipped rows and skipped cells", async () => {
  const bytes = workbook(
    '<row r="1"><c r="A1" t="inlineStr"><is><t>a</t></is></c><c r="C1"><v>3</v></c></row>' +
      '<row r="3"><c r="B3" t="e"><v>#N/A</v></c><c r="C3"><v>4</v></c></row>',
  );
  assert.deepEqual(await readSheetRows(bytes, { source: "a.xlsx" }), [
    ["a", "", "3"],
    ["", "", ""],
    ["", "", "4"],
  ]);
});

Deno.test("readSheetRows() asks which sheet where several are filled, and finds it by name", async () => {
  const bytes = fixture("two_sheets.xlsx"), source = "two_sheets.xlsx";
  await assert.rejects(
    readSheetRows(bytes, { source }),
    fault(UsageError, /two_sheets\.xlsx.*"Counts", "Rates".*--sheet/),
  );
  assert.deepEqual(await readSheetRows(bytes, { source, sheet: "Rates", header: 2 }), [
    ["Code", "Rate"],
    ["A", "0.5"],
  ]);
});

Deno.test("readSheetRows() suggests the nearest sheet", async () => {
  const options = { source: "two_sheets.xlsx", sheet: "rate" };
  await assert.rejects(
    readSheetRows(fixture("two_sheets.xlsx"), options),
    fault(UsageError, /sheet "rate".*did you mean "Rates"/),
  );
});

Deno.test("readSheetRows() tells old or foreign files from workbooks", async () => {
  const old = new Uint8Array(1024);
  old.set([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]);
  for (
    const [bytes, pattern] of [
      [old, /old XLS workbook or protected by a password/],
      [zipSync({ "content.xml": strToU8("<x/>") }), /save it again as \.xlsx or as CSV/],
      [Uint8Array.of(0x50, 0x4b, 3, 4, 0, 0), /save it again as \.xlsx or as CSV/],
    ] as const
  ) {
    await assert.rejects(
      readSheetRows(bytes, { source: "a.xls" }),
      fault(UnreadableError, pattern),
    );
  }
});
