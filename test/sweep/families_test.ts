import assert from "node:assert/strict";
import { familyFindings } from "../../lib/sweep/families.ts";

Deno.test("familyFindings() counts by direction, merged definitions in every family they stand for", () => {
  const tests = [
    { z: 3, p: 0.002 },
    { z: -2.5, p: 0.05 },
    { z: 1, p: 0.3 },
    { z: null, p: null },
  ];
  const standings = [["contiguity", "graph", "graph"], ["band"], ["graph"], ["band"]] as const;
  assert.deepEqual(familyFindings(tests, { standings, level: 0.05 }), [
    { family: "contiguity", definitions: 1, positive: 1, negative: 0 },
    { family: "graph", definitions: 3, positive: 2, negative: 0 },
    { family: "band", definitions: 2, positive: 0, negative: 1 },
  ]);
});
