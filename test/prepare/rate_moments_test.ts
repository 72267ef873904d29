import assert from "node:assert/strict";
import { rateMoments, rawRates } from "../../lib/prepare/rate_moments.ts";
import { assertClose } from "../support/close.ts";
import { numberColumn, referenceCase } from "../support/reference.ts";

/** Infant deaths and births of North Carolina 1974-78. */
const northCarolina = {
  cases: numberColumn("nc.csv", "SID74"),
  population: numberColumn("nc.csv", "BIR74"),
};

Deno.test("rateMoments() gives the worked values of three areas", () => {
  // b = 60 / 600 = 0.1; rates 0.2, 0.05, 0.1;
  // s² = (100 · 0.01 + 200 · 0.0025 + 300 · 0) / 600 = 0.0025; b / n̄ = 0.1 / 200 = 0.0005; a = 0.002
  const counts = { cases: Float64Array.of(20, 10, 30), population: Float64Array.of(100, 200, 300) };
  const { rate, variance, between } = rateMoments(counts);
  assertClose(rate, 0.1, 1e-14);
  assertClose(variance, 0.0025, 1e-14);
  assertClose(between, 0.002, 1e-14);
  // Only areas 0 and 1: b = 0.1, s² = (100 · 0.01 + 200 · 0.0025) / 300 = 0.005, b / n̄ = 0.1 / 150
  assertClose(rateMoments(counts, [0, 1]).between, 0.005 - 0.1 / 150, 1e-13);
});

Deno.test("rateMoments() finds nothing between areas when rates vary less than chance would make them", () => {
  const counts = { cases: Float64Array.of(10, 11, 10), population: Float64Array.of(50, 50, 50) };
  assert.equal(rateMoments(counts).between, 0);
});

// Source: eb-nc74.json, computed with numpy 2.4.6; formulas of Marshall 1991.
Deno.test("rateMoments() and rawRates() agree with North Carolina", () => {
  const { expected } = referenceCase("eb-nc74");
  const { rate, variance, between } = rateMoments(northCarolina);
  assertClose(rate, expected.m);
  assertClose(variance, expected.s2);
  assertClose(between, expected.A);
  rawRates(northCarolina).forEach((raw, i) => assertClose(raw, expected.raw[i], 1e-12));
});
