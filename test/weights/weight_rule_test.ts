import assert from "node:assert/strict";
import { UsageError } from "../../lib/layer/errors.ts";
import { parseWeightRule, weightRuleText } from "../../lib/weights/weight_rule.ts";
import { fault } from "../support/fault.ts";

Deno.test("parseWeightRule() reads every rule", () => {
  assert.deepEqual(parseWeightRule("equal"), { kind: "equal" });
  assert.deepEqual(parseWeightRule(" given "), { kind: "given" });
  assert.deepEqual(parseWeightRule("boundary"), { kind: "boundary" });
  assert.deepEqual(parseWeightRule("inverse:1.5"), { kind: "inverse", power: 1.5 });
  assert.deepEqual(parseWeightRule("bisquare:k12"), {
    kind: "bisquare",
    bandwidth: { kind: "adaptive", nearest: 12 },
  });
  assert.deepEqual(parseWeightRule("gaussian: 2 km"), {
    kind: "gaussian",
    bandwidth: { kind: "fixed", length: { meters: 2000, text: "2km" } },
  });
});

Deno.test("weightRuleText() is read back to the same rule", () => {
  const texts = [
    "equal",
    "boundary",
    "given",
    "inverse:2",
    "inverse:0.5",
    "exponential:30mi",
    "gaussian:k6",
    "bisquare:0.5km",
    "triangular:250ft",
    "epanechnikov:k1",
  ];
  for (const text of texts) assert.equal(weightRuleText(parseWeightRule(text)), text);
});

Deno.test("parseWeightRule() says what is wrong and what may be written", () => {
  const faults: [string, RegExp][] = [
    [
      "gausian:5km",
      /Unknown weights "gausian:5km" \(did you mean gaussian\?\); choose one of equal/,
    ],
    ["", /Unknown weights ""/],
    ["equal:2", /write equal without anything after it/],
    ["inverse", /needs a power above 0/],
    ["inverse:0", /needs a power above 0/],
    ["inverse:-1", /needs a power above 0/],
    ["inverse:two", /needs a power above 0/],
    ["gaussian", /needs a bandwidth: a length such as gaussian:5km/],
    ["bisquare:k0", /or bisquare:k8 for each area's distance/],
    ["bisquare:k2.5", /needs a bandwidth/],
    ["triangular:5", /has no unit/],
    ["triangular:0km", /more than 0/],
  ];
  for (const [text, message] of faults) {
    assert.throws(() => parseWeightRule(text), fault(UsageError, message));
  }
});
