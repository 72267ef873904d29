import assert from "node:assert/strict";
import { definitionText, mergeDefinitions, type SweepDefinition } from "../../lib/sweep/merge.ts";
import { gridWeights } from "./small_maps.ts";

function definition(
  rule: string,
  reach: number,
  more: Partial<SweepDefinition> = {},
): SweepDefinition {
  return {
    rule,
    weightsText: "equal",
    family: "contiguity",
    main: false,
    topologySummary: { pairs: 0, islands: 0, components: 1, meanNeighbors: null },
    weights: gridWeights(3, 3, reach),
    ...more,
  };
}

Deno.test("mergeDefinitions() merges equal weights and keeps the families they stand for", () => {
  const merged = mergeDefinitions([
    definition("edge", 1),
    definition("triangulated", 1, { family: "graph" }),
    definition("touching", 1.5),
    definition("within:1km", 1, { family: "weighted", weightsText: "inverse:2" }),
  ]);
  assert.deepEqual(
    merged.map(({ rule, sameAs, standing }) => ({ rule, sameAs, standing })),
    [
      {
        rule: "edge",
        sameAs: ["triangulated", "within:1km with inverse:2"],
        standing: ["contiguity", "graph", "weighted"],
      },
      { rule: "touching", sameAs: [], standing: ["contiguity"] },
    ],
  );
});

Deno.test("mergeDefinitions() puts the main definition first and merges others into it", () => {
  const merged = mergeDefinitions([
    definition("touching", 1.5),
    definition("edge", 1),
    definition("nearest:4", 1, { family: "nearest", main: true }),
  ]);
  assert.deepEqual(merged.map(({ rule }) => rule), ["nearest:4", "touching"]);
  assert.deepEqual(merged[0].sameAs, ["edge"]);
});

Deno.test("mergeDefinitions() keeps apart what differs in the last bit of one weight", () => {
  const other = definition("within:1km", 1);
  const values = other.weights.values.slice();
  values[3] += Number.EPSILON;
  const nudged = { ...other, weights: { ...other.weights, values } };
  assert.equal(mergeDefinitions([definition("edge", 1), nudged]).length, 2);
});

Deno.test("definitionText() names weights where they are not equal", () => {
  assert.equal(definitionText({ rule: "touching", weightsText: "equal" }), "touching");
  assert.equal(
    definitionText({ rule: "nearest:12", weightsText: "inverse:1" }),
    "nearest:12 with inverse:1",
  );
});
