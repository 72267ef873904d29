import assert from "node:assert/strict";
import { rateSentence } from "../../lib/sweep/rate_sentence.ts";
import type { VerdictInput } from "../../lib/sweep/verdict_input.ts";

/** A run on a rate with these p of over-dispersion and of I at one risk for all. */
function inputOf(overdispersion: number | null, constantRisk: number | null): VerdictInput {
  return {
    run: {
      indicator: "rate",
      neighbors: { rule: "touching", islands: 0 },
      weights: "equal",
      global: {
        moranI: { value: 0.3, expected: -0.01, p: 0.002, permutations: 999, enumerated: false },
      },
      local: { level: 0.05, adjust: "bh", tested: 100, significant: 0, counts: {} },
      rate: { overdispersion: { p: overdispersion }, constantRisk: { p: constantRisk } },
    },
    sweep: null,
  };
}

Deno.test("rateSentence() says clustered and more variable than chance", () => {
  assert.equal(
    rateSentence(inputOf(0.001, 0.002), "clustered"),
    "The rates also differ more between areas than by chance at one risk for all (over-dispersion p = 0.001). " +
      "With the cases dealt out at one risk for all, the main definition's I has p = 0.002.",
  );
});

Deno.test("rateSentence() says clustered but not more variable than chance", () => {
  assert.equal(
    rateSentence(inputOf(0.4, 0.2), "clustered"),
    "Yet the rates differ no more between areas than by chance at one risk for all (over-dispersion p = 0.4): " +
      "the differences that are clustered are small. With the cases dealt out at one risk for all, the main " +
      "definition's I has p = 0.2: such a map could come about without any risk differing.",
  );
});

Deno.test("rateSentence() says more variable than chance where no pattern is shown", () => {
  assert.equal(
    rateSentence(inputOf(0.001, 0.3), "not shown"),
    "The rates do differ more between areas than by chance at one risk for all (over-dispersion p = 0.001), but no " +
      "pattern in where they do is shown.",
  );
});

Deno.test("rateSentence() says that nothing beyond chance is shown", () => {
  assert.equal(
    rateSentence(inputOf(0.4, 0.001), "not shown"),
    "The rates differ no more between areas than by chance at one risk for all (over-dispersion p = 0.4): nothing " +
      "beyond chance is shown, neither in their size nor in their place.",
  );
});

Deno.test("rateSentence() asserts no pattern and no cause where nothing is shown", () => {
  for (const p of [0.001, 0.4]) {
    const text = rateSentence(inputOf(p, 0.001), "not shown")!;
    assert.doesNotMatch(text, /cluster|dispersed|alike|caus|because|due to|reason/i);
  }
});

Deno.test("rateSentence() is silent when there is no rate or too few cases", () => {
  assert.equal(rateSentence(inputOf(null, null), "clustered"), null);
  const { run } = inputOf(0.1, 0.1);
  assert.equal(rateSentence({ run: { ...run, rate: null }, sweep: null }, "clustered"), null);
});
