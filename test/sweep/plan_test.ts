import assert from "node:assert/strict";
import { UsageError } from "../../lib/layer/errors.ts";
import { parseRule } from "../../lib/neighbors/rule.ts";
import { planSweep, type SweepPlan } from "../../lib/sweep/plan.ts";

const equal = (rule: string) => ({ rule: parseRule(rule), weights: "equal" });

/** Each definition as `rule [weights] family`, the main one with a star. */
function lines({ definitions }: SweepPlan): string[] {
  return definitions.map(({ ruleText, weights, family, main }) =>
    `${main ? "*" : ""}${ruleText} [${weights}] ${family}`
  );
}

Deno.test("planSweep() puts the main definition first and takes every definition once", () => {
  const plan = planSweep({
    main: equal("touching"),
    vary: ["edge", "nearest:4", "touching", "(nearest:4)", "within:5km"].map(parseRule),
  });
  assert.deepEqual(lines(plan), [
    "*touching [equal] contiguity",
    "edge [equal] contiguity",
    "nearest:4 [equal] nearest",
    "within:5km [equal] band",
  ]);
  assert.deepEqual(plan.repeated, ["touching", "nearest:4"]);
  assert.deepEqual(plan.families, [
    { family: "contiguity", definitions: 2 },
    { family: "nearest", definitions: 1 },
    { family: "band", definitions: 1 },
  ]);
});

Deno.test("planSweep() takes the standard sweep where no rules are given", () => {
  const standard = [equal("touching"), { rule: parseRule("nearest:12"), weights: "inverse:1" }];
  const plan = planSweep({ main: equal("nearest:6"), vary: null, standard });
  assert.deepEqual(lines(plan), [
    "*nearest:6 [equal] nearest",
    "touching [equal] contiguity",
    "nearest:12 [inverse:1] weighted",
  ]);
});

Deno.test("planSweep() crosses rules with weights, the main definition's where none are given", () => {
  const vary = ["nearest:4", "nearest:8"].map(parseRule);
  const main = { rule: parseRule("nearest:6"), weights: "inverse:1" };
  assert.deepEqual(lines(planSweep({ main, vary })).slice(1), [
    "nearest:4 [inverse:1] weighted",
    "nearest:8 [inverse:1] weighted",
  ]);
  const crossed = planSweep({ main, vary, varyWeights: ["equal", "gaussian:k6"] });
  assert.equal(crossed.definitions.length, 1 + 2 * 2);
});

Deno.test("planSweep() does not ask a rule for weights it cannot have", () => {
  const flows = { rule: parseRule("links:flows.csv"), weights: "given" };
  assert.deepEqual(lines(planSweep({ main: flows, vary: [parseRule("touching")] })), [
    "*links:flows.csv [given] links",
    "touching [equal] contiguity",
  ]);
  const shared = { rule: parseRule("edge"), weights: "boundary" };
  const vary = ["touching", "nearest:4"].map(parseRule);
  assert.deepEqual(lines(planSweep({ main: shared, vary })), [
    "*edge [boundary] weighted",
    "touching [boundary] weighted",
    "nearest:4 [equal] nearest",
  ]);
});

Deno.test("planSweep() refuses more definitions than the most, after repeats are gone", () => {
  const vary = Array.from({ length: 200 }, (_, k) => parseRule(`nearest:${k + 1}`));
  assert.equal(planSweep({ main: equal("nearest:7"), vary }).definitions.length, 200);
  assert.throws(
    () => planSweep({ main: equal("touching"), vary }),
    (error) =>
      error instanceof UsageError && /try 201 definitions .* 200 are the most/.test(error.message),
  );
});
