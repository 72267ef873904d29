import assert from "node:assert/strict";
import { filterFields, parseFilter } from "../../lib/prepare/filter_syntax.ts";

Deno.test("parseFilter() gives a tree with the place of every operand", () => {
  assert.deepEqual(parseFilter("a.b <> 'x' or not c is null"), {
    kind: "or",
    parts: [
      {
        kind: "compare",
        sign: "<>",
        left: { kind: "field", name: "a.b", quoted: false, at: 0 },
        right: { kind: "text", value: "x", at: 7 },
      },
      {
        kind: "not",
        part: { kind: "null", operand: { kind: "field", name: "c", quoted: false, at: 18 } },
      },
    ],
  });
});

Deno.test("filterFields() lists each field once, in order", () => {
  const filter =
    `"a ""b""" = 1 AND (c LIKE 'x' OR NOT d IN (1, e)) AND c BETWEEN f AND 2 AND g IS NULL`;
  assert.deepEqual(filterFields(filter), ['a "b"', "c", "d", "e", "f", "g"]);
});
