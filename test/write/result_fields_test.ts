import assert from "node:assert/strict";
import { resultFields } from "../../lib/write/result_fields.ts";
import type { AreaResults } from "../../lib/write/results.ts";

const areas: AreaResults = {
  prefix: "damp",
  leftOut: [null, "value missing"],
  value: Float64Array.of(1, NaN),
  z: Float64Array.of(0.5, NaN),
  lag: Float64Array.of(0.25, NaN),
  i: Float64Array.of(0.125, NaN),
  p: Float64Array.of(0.01, NaN),
  q: Float64Array.of(0.02, NaN),
  quad: ["HH", null],
  class: ["high among high", "no value"],
  sig: [true, null],
  agree: null,
  steady: null,
  rates: null,
};

Deno.test("resultFields() puts the indicator's name in front of every finding", () => {
  const { columns, renamed } = resultFields(areas, ["id", "damp"]);
  assert.deepEqual(columns.map(({ name }) => name), [
    "_row",
    "_left_out",
    "damp_z",
    "damp_lag",
    "damp_i",
    "damp_p",
    "damp_q",
    "damp_quad",
    "damp_class",
    "damp_sig",
  ]);
  assert.deepEqual(renamed, []);
  assert.deepEqual(columns[0].values, Float64Array.of(0, 1));
  assert.deepEqual(columns[9].values, Float64Array.of(1, NaN));
});

Deno.test("resultFields() gives way when the layer already has a field of that name", () => {
  const { columns, renamed } = resultFields(areas, ["_ROW", "damp_z", "damp_z_2"]);
  assert.equal(columns[0].name, "_row_2");
  assert.deepEqual(renamed, [
    { from: "_row", to: "_row_2" },
    { from: "damp_z", to: "damp_z_3" },
  ]);
});

Deno.test("resultFields() adds agreement and steadiness when there was a sweep", () => {
  const swept = { ...areas, agree: Float64Array.of(1, NaN), steady: ["steady", null] as const };
  const names = resultFields(swept, []).columns.map(({ name }) => name);
  assert.deepEqual(names.slice(-2), ["damp_agree", "damp_steady"]);
});

Deno.test("resultFields() adds the rates when the indicator is one", () => {
  const rates = {
    rate: Float64Array.of(12, NaN),
    shrunk: Float64Array.of(11, NaN),
    shrunkLocal: Float64Array.of(10, NaN),
    funnel: ["above 95", null] as const,
  };
  const columns = resultFields({ ...areas, rates }, ["damp_rate"]).columns.slice(-4);
  assert.deepEqual(columns.map(({ name }) => name), [
    "damp_rate_2",
    "damp_shrunk",
    "damp_shrunk_local",
    "damp_funnel",
  ]);
  assert.deepEqual(columns.map(({ values }) => values), Object.values(rates));
});
