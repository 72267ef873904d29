import assert from "node:assert/strict";
import { UnfitDataError, UsageError } from "../../lib/layer/errors.ts";
import type { ColumnValues } from "../../lib/layer/layer.ts";
import { parseMissingValues } from "../../lib/prepare/missing_values.ts";
import { numbersOf } from "../../lib/prepare/numbers.ts";
import { fault } from "../support/fault.ts";

function textColumn(...values: (string | null)[]): ColumnValues {
  return { name: "RATE", kind: "text", storedAs: "String", values };
}

function numberColumn(...values: number[]): ColumnValues {
  return { name: "RATE", kind: "number", storedAs: "Real", values: Float64Array.from(values) };
}

Deno.test("numbersOf() counts every kind of missing value by its own text", () => {
  const column = textColumn("1.5", "*", "<5", "", null, "2", " * ", "-999", "-999.0", " ");
  const missing = parseMissingValues("*,..,<5,-999");
  const { values, missing: counts, reasons, notes } = numbersOf(column, { missing });
  assert.deepEqual(values, Float64Array.of(1.5, NaN, NaN, NaN, NaN, 2, NaN, NaN, NaN, NaN));
  assert.deepEqual(counts, [
    { kind: "null", count: 1 },
    { kind: "empty", count: 2 },
    { kind: "*", count: 2 },
    { kind: "<5", count: 1 },
    { kind: "-999", count: 2 },
  ]);
  assert.deepEqual(reasons, [
    null,
    "value missing: *",
    "value missing: <5",
    "value missing",
    "value missing",
    null,
    "value missing: *",
    "value missing: -999",
    "value missing: -999",
    "value missing",
  ]);
  assert.deepEqual(notes, []);
});

Deno.test("numbersOf() matches numeric markers in number columns and leaves the column alone", () => {
  const column = numberColumn(3, -999, NaN, -99);
  const { values, missing, reasons } = numbersOf(column, { missing: ["-999.0", "*"] });
  assert.deepEqual(values, Float64Array.of(3, NaN, NaN, -99));
  assert.deepEqual(missing, [{ kind: "null", count: 1 }, { kind: "-999.0", count: 1 }]);
  assert.deepEqual(reasons, [null, "value missing: -999.0", "value missing", null]);
  assert.deepEqual(column.values, Float64Array.of(3, -999, NaN, -99));
});

Deno.test("numbersOf() says what a null means where the caller knows", () => {
  const nullKind = "no row in rates.csv";
  const { missing, reasons } = numbersOf(textColumn("1", null), { nullKind });
  assert.deepEqual(missing, [{ kind: nullKind, count: 1 }]);
  assert.deepEqual(reasons, [null, `value missing: ${nullKind}`]);
});

Deno.test("numbersOf() reads decimal commas and grouped thousands of a whole column", () => {
  assert.deepEqual(
    numbersOf(textColumn("1.234,5", "987", "12.000")).values,
    Float64Array.of(1234.5, 987, 12000),
  );
  assert.deepEqual(
    numbersOf(textColumn("1\u00a0234", "987,5")).values,
    Float64Array.of(1234, 987.5),
  );
});

Deno.test("numbersOf() notes an ambiguous column with both readings and the remedy", () => {
  const { values, notes } = numbersOf(textColumn("1,234", "987"));
  assert.deepEqual(values, Float64Array.of(1234, 987));
  assert.equal(notes.length, 1);
  assert.match(notes[0], /^RATE: "1,234" was read as 1234 .*it would be 1\.234.*--decimal/);
  const decided = numbersOf(textColumn("1,234", "987"), { decimal: ",", thousands: "none" });
  assert.deepEqual(decided.values, Float64Array.of(1.234, 987));
  assert.deepEqual(decided.notes, []);
});

Deno.test("numbersOf() drops percent signs and says for how many", () => {
  const { values, notes } = numbersOf(textColumn("12.5 %", "3%", "4"));
  assert.deepEqual(values, Float64Array.of(12.5, 3, 4));
  assert.deepEqual(notes, [
    "RATE: 2 of 3 texts carry a percent sign, which was dropped (12.5 % is read as 12.5)",
  ]);
});

Deno.test("numbersOf() names the first text that is neither number nor missing, and the remedy", () => {
  const column = textColumn("1", "*", "n/a", "n/a", "a, b");
  assert.throws(
    () => numbersOf(column, { missing: ["*"], source: "rates.csv" }),
    fault(
      UnfitDataError,
      /field RATE of rates\.csv .*row 3 \(_row 2\) holds "n\/a" \(and 2 more such cells\)/,
      /--missing-values '\*,n\/a,"a, b"'/,
    ),
  );
  // The proposed list must itself do.
  const { values } = numbersOf(column, { missing: parseMissingValues('*,n/a,"a, b"') });
  assert.deepEqual(values, Float64Array.of(1, NaN, NaN, NaN, NaN));
});

Deno.test("numbersOf() never takes words for numbers, nor a suppressed value for zero", () => {
  for (const text of ["NaN", "NA", "Infinity", "-", "<5", "2024-01-01"]) {
    assert.throws(
      () => numbersOf(textColumn("1", text)),
      fault(UnfitDataError, /row 2 \(_row 1\)/),
    );
  }
});

Deno.test("numbersOf() rejects infinite values in numbers and in texts", () => {
  for (const column of [numberColumn(1, -Infinity), textColumn("1", "1e999")]) {
    assert.throws(
      () => numbersOf(column),
      fault(UnfitDataError, /row 2 \(_row 1\).*no finite number/),
    );
  }
  const masked = numbersOf(textColumn("1", "1e999"), { missing: ["1e999"] });
  assert.deepEqual(masked.values, Float64Array.of(1, NaN));
});

Deno.test("numbersOf() looks only at the rows it is told to", () => {
  const column = textColumn("1,5", "n/a", "2.500", "*", "2,5");
  const where = (row: number) => row !== 1 && row !== 2;
  const { values, missing, reasons, notes } = numbersOf(column, { missing: ["*"], where });
  assert.deepEqual(values, Float64Array.of(1.5, NaN, NaN, NaN, 2.5));
  assert.deepEqual(missing, [{ kind: "*", count: 1 }]);
  assert.deepEqual(reasons, [null, null, null, "value missing: *", null]);
  assert.deepEqual(notes, []);
  const numbers = numbersOf(numberColumn(1, Infinity, -9), { missing: ["-9"], where });
  assert.deepEqual(numbers.values, Float64Array.of(1, NaN, NaN));
  assert.deepEqual(numbers.missing, []);
});

Deno.test("numbersOf() rejects dates and binary columns by their kind", () => {
  const dates: ColumnValues = { ...textColumn("2024-01-01"), kind: "datetime" };
  assert.throws(() => numbersOf(dates), fault(UnfitDataError, /field RATE.*holds dates/));
});

Deno.test("numbersOf() rejects one mark for both purposes", () => {
  assert.throws(
    () => numbersOf(textColumn("1"), { decimal: ",", thousands: "," }),
    fault(UsageError, /--decimal or --thousands/),
  );
});

Deno.test("numbersOf() gives back any numbers written in any format", () => {
  // A slow obvious twin: write known numbers in each format with Intl and read them back.
  const known = [0.25, 12, 1234.5, 987654.125, -1000000.75];
  for (const locale of ["en-US", "de-DE", "fr-FR", "de-CH", "sv-SE"]) {
    const write = new Intl.NumberFormat(locale, { maximumFractionDigits: 3 });
    const { values, notes } = numbersOf(textColumn(...known.map((value) => write.format(value))));
    assert.deepEqual([...values], known, locale);
    assert.deepEqual(notes, [], locale);
  }
});
