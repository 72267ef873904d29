import assert from "node:assert/strict";
import { familyWeights } from "../../lib/sweep/family_weights.ts";

Deno.test("familyWeights() gives every family the same and splits it among its members", () => {
  // Two families, so each has 1/2: four bands share theirs, the lone contiguity keeps its own.
  assert.deepEqual(
    familyWeights([["contiguity"], ["band"], ["band"], ["band"], ["band"]]),
    Float64Array.of(1 / 2, 1 / 8, 1 / 8, 1 / 8, 1 / 8),
  );
});

Deno.test("familyWeights() gives a merged definition the sum of what it stands for", () => {
  // Unmerged: contiguity, contiguity, graph, graph -> 1/4 each; the first three are one definition.
  assert.deepEqual(
    familyWeights([["contiguity", "contiguity", "graph"], ["graph"]]),
    Float64Array.of(3 / 4, 1 / 4),
  );
});

Deno.test("familyWeights() gives 0 to a definition that stands for nothing", () => {
  assert.deepEqual(familyWeights([[], ["nearest"]]), Float64Array.of(0, 1));
  assert.deepEqual(familyWeights([]), new Float64Array(0));
});
