import assert from "node:assert/strict";
import { planIndicator } from "../../lib/assess/plan_indicator.ts";
import { UsageError } from "../../lib/layer/errors.ts";

Deno.test("planIndicator() names a value after its field and a rate after its cases", () => {
  assert.deepEqual(planIndicator({ value: "share", transform: "log1p" }), {
    kind: "value",
    name: "share",
    field: "share",
    transform: "log1p",
  });
  assert.deepEqual(planIndicator({ rate: "deaths / births" }), {
    kind: "rate",
    name: "deaths_rate",
    cases: "deaths",
    population: "births",
    per: 1000,
    share: false,
    transform: "standardized",
  });
  const named = planIndicator({ rate: "d/b", name: "mortality", per: 100_000 });
  assert.equal(named.name, "mortality");
});

Deno.test("planIndicator() takes field names with slashes and quotes when they are quoted", () => {
  const plan = planIndicator({ rate: '"m/f ""all"""/"pop 2020"' });
  assert.ok(plan.kind === "rate");
  assert.deepEqual([plan.cases, plan.population], ['m/f "all"', "pop 2020"]);
});

const FAULTS = [
  { when: "nothing is given", options: {}, says: /--value FIELD, or --rate CASES\/POPULATION/ },
  {
    when: "both are given",
    options: { value: "a", rate: "a/b" },
    says: /both --value a and --rate a\/b/,
  },
  {
    when: "the rate is one field",
    options: { rate: "deaths" },
    says: /--rate deaths; write CASES/,
  },
  { when: "the rate is three fields", options: { rate: "a/b/c" }, says: /--rate a\/b\/c/ },
  { when: "a side is empty", options: { rate: "a/ " }, says: /--rate a\// },
  { when: "per is not above 0", options: { rate: "a/b", per: 0 }, says: /--per 0.*above 0/ },
  { when: "per has no rate", options: { value: "a", per: 100 }, says: /--per without --rate/ },
  { when: "the name is empty", options: { rate: "a/b", name: " " }, says: /empty --name/ },
  {
    when: "share has no rate",
    options: { value: "a", share: true },
    says: /--share without --rate/,
  },
  {
    when: "a value is to be renamed",
    options: { value: "a", name: "b" },
    says: /--name b.*--value a/,
  },
  {
    when: "Freeman-Tukey meets a value",
    options: { value: "a", transform: "freeman-tukey" },
    says: /freeman-tukey with --value.*--rate/,
  },
  {
    when: "a value's transform meets a rate",
    options: { rate: "a/b", transform: "log" },
    says: /--transform log with --rate.*freeman-tukey/,
  },
  {
    when: "the transform is unknown",
    options: { value: "a", transform: "cube" as "log" },
    says: /--transform cube.*none, log, log1p, sqrt, rank, normal-scores/,
  },
] as const;
for (const { when, options, says } of FAULTS) {
  Deno.test(`planIndicator() says so when ${when}`, () => {
    assert.throws(
      () => planIndicator(options),
      (error: Error) => error instanceof UsageError && says.test(error.message),
    );
  });
}
