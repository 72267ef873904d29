import assert from "node:assert/strict";
import { standardizedRates } from "../../lib/prepare/standardized_rates.ts";
import { assertClose } from "../support/close.ts";
import { numberColumn, referenceCase } from "../support/reference.ts";

// Source: eb-nc74.json, computed with numpy 2.4.6; formulas of Assunção & Reis 1999.
Deno.test("standardizedRates() agrees with North Carolina", () => {
  const counts = {
    cases: numberColumn("nc.csv", "SID74"),
    population: numberColumn("nc.csv", "BIR74"),
  };
  const { expected } = referenceCase("eb-nc74");
  standardizedRates(counts).forEach((z, i) => assertClose(z, expected.z[i], 1e-9, `area ${i}`));
});

Deno.test("standardizedRates() does not depend on the unit of the population", () => {
  const cases = Float64Array.of(3, 0, 8, 1);
  const population = Float64Array.of(400, 90, 700, 20);
  const persons = standardizedRates({ cases, population });
  // Person-years: ten times the population, a tenth of every rate.
  const years = standardizedRates({ cases, population: population.map((size) => 10 * size) });
  years.forEach((z, i) => assertClose(z, persons[i], 1e-12));
});

Deno.test("standardizedRates() is not a number when there are no cases at all", () => {
  const none = { cases: new Float64Array(3), population: Float64Array.of(1, 2, 3) };
  assert.ok(standardizedRates(none).every(Number.isNaN));
});
