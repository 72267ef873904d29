import assert from "node:assert/strict";
import { detectNumberFormat, numberParser } from "../../lib/read/number_format.ts";

/** Detects and reads a column in one go. */
function read(...texts: string[]): (number | null)[] {
  return texts.map(numberParser(detectNumberFormat(texts).format));
}

Deno.test("detectNumberFormat() takes plain numbers as they are, without doubt", () => {
  const texts = ["12", "-0.5", "1e-3", ".25", "7.", "+3"];
  assert.deepEqual(detectNumberFormat(texts), {
    format: { decimal: ".", thousands: "none" },
    doubt: null,
  });
  assert.deepEqual(read(...texts), [12, -0.5, 0.001, 0.25, 7, 3]);
});

Deno.test("detectNumberFormat() lets one telling cell decide the whole column", () => {
  // 1.234 alone would be 1.234; beside 2,5 the point can only group thousands.
  assert.deepEqual(read("1.234", "2,5"), [1234, 2.5]);
  assert.deepEqual(read("1,234", "2.5"), [1234, 2.5]);
  assert.deepEqual(read("1.234,5", "1.234"), [1234.5, 1234]);
  assert.deepEqual(read("1,234.5", "1,234"), [1234.5, 1234]);
  assert.deepEqual(read("1.234.567", "1.234"), [1234567, 1234]);
  // A group never begins with 0, so the comma of 0,123 is a decimal comma and that of 1,234 too.
  assert.deepEqual(read("0,123", "1,234"), [0.123, 1.234]);
});

Deno.test("detectNumberFormat() knows every space and apostrophe that groups digits", () => {
  assert.deepEqual(read("1 234", "12\u00a0345,5", "1\u202f234\u202f567"), [1234, 12345.5, 1234567]);
  assert.deepEqual(read("1\u2009234.5"), [1234.5]);
  assert.deepEqual(read("1'234.5", "12’345"), [1234.5, 12345]);
});

Deno.test("detectNumberFormat() doubts a column whose every mark stands before three digits", () => {
  const comma = detectNumberFormat(["987", "1,234"]);
  assert.deepEqual(comma.format, { decimal: ".", thousands: "," });
  assert.deepEqual(comma.doubt, { text: "1,234", other: { decimal: ",", thousands: "none" } });
  const point = detectNumberFormat(["987", "1.234"]);
  assert.deepEqual(point.format, { decimal: ".", thousands: "none" });
  assert.deepEqual(point.doubt, { text: "1.234", other: { decimal: ",", thousands: "." } });
});

Deno.test("detectNumberFormat() has no doubt once a mark is named", () => {
  const texts = ["987", "1,234"];
  assert.deepEqual(detectNumberFormat(texts, { decimal: "." }), {
    format: { decimal: ".", thousands: "," },
    doubt: null,
  });
  assert.deepEqual(detectNumberFormat(texts, { thousands: "none" }).format, {
    decimal: ",",
    thousands: "none",
  });
  assert.deepEqual(detectNumberFormat(["1.234"], { decimal: "," }), {
    format: { decimal: ",", thousands: "." },
    doubt: null,
  });
});

Deno.test("detectNumberFormat() follows the majority past a cell that is no number", () => {
  const { format } = detectNumberFormat(["1,5", "n/a", "2,5"]);
  assert.deepEqual(format, { decimal: ",", thousands: "none" });
});

Deno.test("numberParser() refuses broken groups, words and empty texts", () => {
  const parse = numberParser({ decimal: ".", thousands: "," });
  assert.equal(parse("12,34"), null);
  assert.equal(parse("1,2345"), null);
  assert.equal(parse("1234,567"), null);
  assert.equal(parse("1,,234"), null);
  assert.equal(parse("0,123"), null);
  for (const text of ["", " ", "-", ".", "NaN", "Infinity", "0x10", "1 2", "5-", "1.2.3", "%"]) {
    assert.equal(parse(text), null, text);
  }
});

Deno.test("numberParser() reads signs, blanks, exponents and percent signs", () => {
  const parse = numberParser({ decimal: ",", thousands: "." });
  assert.equal(parse(" \u22121.234,50 "), -1234.5);
  assert.equal(parse("12,5 %"), 12.5);
  assert.equal(parse("12,5%"), 12.5);
  assert.equal(parse("1,5E+3"), 1500);
});
