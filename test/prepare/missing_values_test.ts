import assert from "node:assert/strict";
import { UsageError } from "../../lib/layer/errors.ts";
import { parseMissingValues } from "../../lib/prepare/missing_values.ts";
import { fault } from "../support/fault.ts";

Deno.test("parseMissingValues() gives literal texts in order", () => {
  assert.deepEqual(parseMissingValues("*,..,<5,-999"), ["*", "..", "<5", "-999"]);
});

Deno.test("parseMissingValues() takes quoted texts as they are and trims the others", () => {
  assert.deepEqual(parseMissingValues(' * ,"n, a"," x ","say ""no""", no data '), [
    "*",
    "n, a",
    " x ",
    'say "no"',
    "no data",
  ]);
});

Deno.test("parseMissingValues() drops empty items and repeats", () => {
  assert.deepEqual(parseMissingValues(""), []);
  assert.deepEqual(parseMissingValues("*,,*,"), ["*"]);
});

Deno.test("parseMissingValues() rejects an open quote", () => {
  for (const list of ['"*,..', 'a"b']) {
    assert.throws(
      () => parseMissingValues(list),
      fault(UsageError, /missing values.*double quotes/),
    );
  }
});
