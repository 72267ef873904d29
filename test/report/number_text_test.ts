import assert from "node:assert/strict";
import {
  decimalText,
  lengthText,
  percentText,
  pText,
  valueText,
  wholeText,
} from "../../lib/report/number_text.ts";

Deno.test("wholeText() and decimalText() group thousands and use a true minus", () => {
  assert.equal(wholeText(999), "999");
  assert.equal(wholeText(1234567), "1,234,567");
  assert.equal(decimalText(-1234.5), "−1,234.50");
  assert.equal(decimalText(0.0004, 3), "0.000");
  assert.equal(decimalText(-0.0004, 3), "0.000");
  assert.equal(decimalText(null), "–");
  assert.equal(decimalText(NaN), "–");
});

Deno.test("valueText() shows about four digits that matter", () => {
  assert.equal(valueText(0), "0");
  assert.equal(valueText(98), "98");
  assert.equal(valueText(12.3456), "12.35");
  assert.equal(valueText(0.0123456), "0.01235");
  assert.equal(valueText(1234567.8), "1,234,568");
  assert.equal(valueText(-1e-12), "−1.000e−12");
});

Deno.test("pText() never rounds across the level and never uses exponents", () => {
  assert.equal(pText(0.012, 0.05), "0.012");
  assert.equal(pText(2e-6, 0.05), "0.0000020");
  assert.equal(pText(0.0500001, 0.05), "0.0500001");
  assert.equal(pText(0.04996, 0.05), "0.04996");
  assert.equal(pText(0.05, 0.05), "0.050");
  assert.equal(pText(1, 0.05), "1.0");
  assert.equal(pText(0, 0.05), "0");
  assert.equal(pText(NaN, 0.05), "–");
});

Deno.test("percentText() calls only all 100 % and only none 0 %", () => {
  assert.equal(percentText(1), "100\u00A0%");
  assert.equal(percentText(0.9999), ">\u00A099\u00A0%");
  assert.equal(percentText(0.001), "<\u00A01\u00A0%");
  assert.equal(percentText(0), "0\u00A0%");
  assert.equal(percentText(null), "–");
});

Deno.test("lengthText() changes to kilometers at 1,000 m", () => {
  assert.equal(lengthText(850.4), "850\u00A0m");
  assert.equal(lengthText(12_345), "12.3\u00A0km");
});
