import assert from "node:assert/strict";
import type { ColumnValues } from "../../lib/layer/layer.ts";
import { csvText } from "../../lib/write/csv_text.ts";

const text = (name: string, values: (string | null)[]): ColumnValues => ({
  name,
  kind: "text",
  storedAs: "String",
  values,
});

Deno.test("csvText() disarms texts that a spreadsheet would run as a formula", () => {
  const csv = csvText([text("=name", ["=1+1", "+x", "-x", "@x", "\tx", "plain"])]);
  assert.equal(csv, "\uFEFF'=name\r\n'=1+1\r\n'+x\r\n'-x\r\n'@x\r\n'\tx\r\nplain\r\n");
});

Deno.test("csvText() leaves negative numbers alone and writes null and NaN as empty cells", () => {
  const csv = csvText([
    { name: "z", kind: "number", storedAs: "Double", values: Float64Array.of(-1.5, NaN, 0.1) },
    { name: "ok", kind: "boolean", storedAs: "Bool", values: Float64Array.of(1, 0, NaN) },
    text("big", [null, "9007199254740993", ""]),
  ]);
  assert.equal(csv, "\uFEFFz,ok,big\r\n-1.5,true,\r\n,false,9007199254740993\r\n0.1,,\r\n");
});

Deno.test("csvText() quotes delimiters, quotes, line breaks and outer spaces", () => {
  const csv = csvText([text("a", ['x,"y"', "two\nlines", " padded "])]);
  assert.equal(csv, '\uFEFFa\r\n"x,""y"""\r\n"two\nlines"\r\n" padded "\r\n');
});
