/** What a program can import: adding or losing a name is a decision, so it shows here. */
import assert from "node:assert/strict";
import * as library from "../mod.ts";

const VALUES = [
  "UnfitDataError",
  "UnreadableError",
  "UnwritableError",
  "UsageError",
  "adjustP",
  "assess",
  "bivariateMoranI",
  "buildLinks",
  "chooseMetric",
  "clopperPearson",
  "compileFilter",
  "correlogram",
  "describeTopology",
  "gearyC",
  "getisOrdG",
  "gi",
  "giCritical",
  "giStar",
  "inspect",
  "joinCounts",
  "joinTable",
  "leastSquares",
  "leeL",
  "listFormats",
  "listLayers",
  "localBivariateMoran",
  "localGeary",
  "localJoinCount",
  "localMoran",
  "moranI",
  "neighborBuilder",
  "numbersOf",
  "parseRule",
  "permuteLocalMoran",
  "permuteMoran",
  "planAssessment",
  "readColumn",
  "readLayer",
  "readTable",
  "representativePoints",
  "residualMoranI",
  "resultsSchema",
  "ruleText",
  "runSweep",
  "spatialLag",
  "testLocalMoran",
  "twoSidedP",
  "usableAreas",
  "verdictOf",
  "weigh",
  "weightSums",
  "writeAssessment",
];

Deno.test("mod.ts exports these functions, errors and schemas, and no others", () => {
  assert.deepEqual(Object.keys(library).sort(), VALUES);
});

Deno.test("mod.ts names every type that an exported function takes or gives", async () => {
  const command = new Deno.Command(Deno.execPath(), {
    args: ["doc", "--lint", new URL("../mod.ts", import.meta.url).pathname],
    env: { NO_COLOR: "1" },
  });
  const complaints = new TextDecoder().decode((await command.output()).stderr);
  const unnamed = Array.from(
    complaints.matchAll(/public type '([a-z]\w*)' references private type '(.+?)'/g),
    ([, user, name]) => `${name} of ${user}()`,
  );
  assert.deepEqual(unnamed, []);
});
