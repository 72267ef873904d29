import assert from "node:assert/strict";
import { UsageError } from "../../lib/layer/errors.ts";
import type { ColumnValues } from "../../lib/layer/layer.ts";
import { compileFilter } from "../../lib/prepare/filter.ts";
import { fault } from "../support/fault.ts";

/** Four rows: a full one, an awkward one, one with nulls, one with texts that are no numbers. */
const COLUMNS: readonly ColumnValues[] = [
  { name: "region", kind: "text", storedAs: "String", values: ["north", "o'hare_50%", null, ""] },
  { name: "code", kind: "text", storedAs: "text", values: ["0042", "42", "9", "*"] },
  { name: "pop", kind: "integer", storedAs: "Int32", values: Float64Array.of(500, 1500, NaN, -3) },
  { name: "limit", kind: "number", storedAs: "Real", values: Float64Array.of(500, 1000, 5, NaN) },
  { name: "urban", kind: "boolean", storedAs: "Bool", values: Float64Array.of(1, 0, NaN, 1) },
  { name: "flag", kind: "text", storedAs: "text", values: ["TRUE", "false", "x", "true"] },
  {
    name: "day",
    kind: "datetime",
    storedAs: "Date",
    values: ["2024-01-31", "2023-12-31", null, "2024-03-01"],
  },
  { name: "2020", kind: "number", storedAs: "Real", values: Float64Array.of(1, 2, 3, 4) },
];

/** Rows that a filter selects. */
function selected(text: string): number[] {
  const test = compileFilter(text, COLUMNS);
  return [0, 1, 2, 3].filter(test);
}

Deno.test("compileFilter() compares numbers with every sign", () => {
  assert.deepEqual(selected("pop = 500"), [0]);
  assert.deepEqual(selected("pop <> 500"), [1, 3]);
  assert.deepEqual(selected("pop < 500"), [3]);
  assert.deepEqual(selected("pop <= 5e2"), [0, 3]);
  assert.deepEqual(selected("pop > -3"), [0, 1]);
  assert.deepEqual(selected("pop>=-3.0"), [0, 1, 3]);
  assert.deepEqual(selected("500 < pop"), [1]);
  assert.deepEqual(selected("pop >= limit"), [0, 1]);
});

Deno.test("compileFilter() compares texts exactly, with quotes escaped by doubling", () => {
  assert.deepEqual(selected("region = 'north'"), [0]);
  assert.deepEqual(selected("region = 'North'"), []);
  assert.deepEqual(selected("region = 'o''hare_50%'"), [1]);
  assert.deepEqual(selected("region = ''"), [3]);
  assert.deepEqual(selected("day >= '2024-01-01'"), [0, 3]);
});

Deno.test("compileFilter() compares text cells as numbers with a number, as texts with a text", () => {
  assert.deepEqual(selected("code = 42"), [0, 1]);
  assert.deepEqual(selected("code = '0042'"), [0]);
  assert.deepEqual(selected("code > 9"), [0, 1]);
  assert.deepEqual(selected("code > '9'"), []);
  assert.deepEqual(selected("pop = '0500'"), [0]);
});

Deno.test("compileFilter() leaves unknown what is null or no number, also under NOT", () => {
  assert.deepEqual(selected("NOT pop = 500"), [1, 3]);
  assert.deepEqual(selected("NOT code > 9"), [2]);
  // Three values: unknown OR true is true, unknown AND false is false, whose NOT is true.
  assert.deepEqual(selected("pop = 500 OR code = 9"), [0, 2]);
  assert.deepEqual(selected("NOT (pop = 500 AND code = 8)"), [0, 1, 2, 3]);
  // Row 2 is unknown AND true, which stays unknown.
  assert.deepEqual(selected("NOT (pop = 500 AND code = 9)"), [0, 1, 3]);
  assert.deepEqual(selected("pop = pop"), [0, 1, 3]);
});

Deno.test("compileFilter() tells null from the empty text", () => {
  assert.deepEqual(selected("region IS NULL"), [2]);
  assert.deepEqual(selected("region is not null"), [0, 1, 3]);
  assert.deepEqual(selected("pop IS NULL OR limit IS NULL"), [2, 3]);
});

Deno.test("compileFilter() binds NOT before AND before OR, and heeds parentheses", () => {
  assert.deepEqual(selected("pop = 500 OR pop = 1500 AND code = '42'"), [0, 1]);
  assert.deepEqual(selected("(pop = 500 OR pop = 1500) AND code = '42'"), [1]);
  assert.deepEqual(selected("not pop = 500 and pop > 0"), [1]);
  assert.deepEqual(selected("NOT NOT (pop = 500)"), [0]);
});

Deno.test("compileFilter() knows IN, BETWEEN and LIKE with their NOT", () => {
  assert.deepEqual(selected("code IN ('0042', '9')"), [0, 2]);
  assert.deepEqual(selected("code NOT IN ('0042', '9')"), [1, 3]);
  assert.deepEqual(selected("pop IN (500, -3)"), [0, 3]);
  assert.deepEqual(selected("pop NOT IN (500)"), [1, 3]);
  assert.deepEqual(selected("pop BETWEEN -3 AND 500 AND code = '*'"), [3]);
  assert.deepEqual(selected("pop NOT BETWEEN 0 AND 1000"), [1, 3]);
  assert.deepEqual(selected("region LIKE 'n%'"), [0]);
  assert.deepEqual(selected("region LIKE 'nort_'"), [0]);
  assert.deepEqual(selected("region LIKE '%'"), [0, 1, 3]);
  assert.deepEqual(selected("region NOT LIKE '%r%'"), [3]);
  assert.deepEqual(selected("region LIKE '%e\\_50\\%'"), [1]);
  assert.deepEqual(selected("code LIKE '*'"), [3]);
});

Deno.test("compileFilter() knows TRUE and FALSE in boolean and text columns", () => {
  assert.deepEqual(selected("urban = TRUE"), [0, 3]);
  assert.deepEqual(selected("urban <> true"), [1]);
  assert.deepEqual(selected("flag = TRUE"), [0, 3]);
  assert.deepEqual(selected("flag = 'TRUE'"), [0]);
});

Deno.test("compileFilter() reaches odd names in double quotes", () => {
  assert.deepEqual(selected('"2020" > 2'), [2, 3]);
  assert.deepEqual(selected('"pop" = 500'), [0]);
});

/** The filter must fail at the character below which `^` stands in the expected picture. */
function failsAt(filter: string, caret: string, ...patterns: RegExp[]): void {
  const at = caret.indexOf("^");
  assert.throws(
    () => selected(filter),
    fault(
      UsageError,
      new RegExp(`at character ${at + 1}:`),
      ...patterns,
      /\n {2}[^\n]*\n {2} *\^$/,
    ),
  );
  try {
    selected(filter);
  } catch (error) {
    assert.equal((error as Error).message.split("\n").at(-1), `  ${" ".repeat(at)}^`);
  }
}

Deno.test("compileFilter() points at the character where the grammar breaks", () => {
  failsAt("pop >= AND x = 1", "       ^", /a value or a field after >=, found AND/);
  failsAt("pop", "   ^", /a comparison .* found the end/);
  failsAt("pop = 5 code = 3", "        ^", /AND, OR or the end of the filter, found code/);
  failsAt("(pop = 5", "        ^", /expected \), found the end/);
  failsAt("pop IN 5", "       ^", /expected \(, found 5/);
  failsAt("pop IN (5", "         ^", /expected \)/);
  failsAt("pop BETWEEN 1 OR 2", "              ^", /expected AND, found OR/);
  failsAt("pop NOT = 5", "        ^", /BETWEEN, IN or LIKE/);
  failsAt("region LIKE 5", "            ^", /a text in single quotes after LIKE/);
  failsAt("region IS 5", "          ^", /expected NULL/);
  failsAt("", "^", /a field or a value, found the end/);
  failsAt("region = 'north", "         ^", /single quote opened here/);
  failsAt('"region = 5', "^", /double quote opened here/);
  failsAt("pop == 5", "    ^", /write = instead of ==/);
  failsAt("pop != 5", "    ^", /write <> instead of !=/);
  failsAt("pop = 5 && code = 3", "        ^", /write AND/);
  failsAt("2020a = 5", "^", /begins with a digit in double quotes/);
  failsAt("pop = 5 ; code", "        ^", /; has no meaning here/);
});

Deno.test("compileFilter() suggests the nearest field, or single quotes for a text", () => {
  failsAt("popp = 5", "^", /no field "popp"; did you mean "pop"/);
  failsAt('region = "south-west"', "         ^", /"south-west"; texts stand in single quotes/);
});

Deno.test("compileFilter() refuses comparisons that can never be right", () => {
  failsAt("pop = 'abc'", "      ^", /'abc' is compared with a field that holds numbers/);
  failsAt("urban = 'maybe'", "        ^", /must be TRUE or FALSE/);
  failsAt("pop LIKE '5%'", "^", /LIKE needs a text field/);
});
