import assert from "node:assert/strict";
import { readColumn, readColumns } from "../../lib/layer/column.ts";
import { decodeLayer } from "../../lib/layer/decode_layer.ts";
import { UsageError } from "../../lib/layer/errors.ts";
import type { ColumnValues, Layer } from "../../lib/layer/layer.ts";
import { appendColumns } from "../../lib/write/append_columns.ts";
import { fault } from "../support/fault.ts";
import { fgbOf } from "../support/fgb.ts";

const geometry = { type: "Point", coordinates: [0, 0] };
const layer: Layer = decodeLayer(
  fgbOf([
    { geometry, properties: { rate: 1.5, code: "0042", urban: true, note: null } },
    { geometry, properties: { rate: null, code: "Łódź", urban: false, note: "" } },
    { geometry, properties: { rate: -0, code: null, urban: null, note: "值" } },
  ]),
  "towns.fgb",
);

Deno.test("readColumn() gives numbers with NaN for null and text with null for null", () => {
  const rate = readColumn(layer, "rate");
  assert.equal(rate.kind, "number");
  assert.deepEqual(rate.values, Float64Array.of(1.5, NaN, -0));
  const urban = readColumn(layer, "urban");
  assert.equal(urban.kind, "boolean");
  assert.deepEqual(urban.values, Float64Array.of(1, 0, NaN));
  assert.deepEqual(readColumn(layer, "code").values, ["0042", "Łódź", null]);
});

Deno.test("readColumns() gives several columns in the order asked, one of them twice", () => {
  const columns = readColumns(layer, ["code", "rate", "code"]);
  assert.deepEqual(columns.map(({ name }) => name), ["code", "rate", "code"]);
  assert.deepEqual(columns[0].values, columns[2].values);
  assert.deepEqual(readColumns(layer, []), []);
});

Deno.test("readColumn() finds columns that were added after reading", () => {
  const joined: ColumnValues = {
    name: "joined",
    kind: "text",
    storedAs: "String",
    values: ["a", "b", null],
  };
  assert.equal(readColumn({ ...layer, added: [joined] }, "joined"), joined);
});

Deno.test("readColumn() names the fields there are and the nearest for one that is not", () => {
  assert.throws(
    () => readColumn(layer, "Rates"),
    fault(
      UsageError,
      /No field "Rates" in layer .* of towns\.fgb/,
      /rate, code, urban, note/,
      /did you mean "rate"/,
    ),
  );
});

Deno.test("readColumn() gives 64-bit integers as numbers while they are exact, else as text", () => {
  const with64 = (values: number[]) => {
    const column: ColumnValues = {
      name: "big",
      kind: "integer",
      storedAs: "Int64",
      values: Float64Array.from(values),
    };
    return readColumn(decodeLayer(appendColumns(layer, [column]), "t"), "big");
  };
  const exact = with64([2 ** 53 - 1, -(2 ** 40), NaN]);
  assert.deepEqual([exact.kind, exact.storedAs], ["integer", "Int64"]);
  assert.deepEqual(exact.values, Float64Array.of(2 ** 53 - 1, -(2 ** 40), NaN));
  const beyond = with64([2 ** 60, NaN, -1]);
  assert.equal(beyond.kind, "text");
  assert.deepEqual(beyond.values, ["1152921504606846976", null, "-1"]);
});
