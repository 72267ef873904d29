/** The invented region: what was planted is found, and a shuffled twin shows nothing. */
import assert from "node:assert/strict";
import { assess } from "../../lib/assess/assess.ts";
import { type InventedRegion, inventedRegion, shuffledTwin } from "../../lib/demo/region.ts";
import { withFolder } from "../support/temp_folder.ts";

async function assessRegion(region: InventedRegion) {
  let found: Awaited<ReturnType<typeof assess>>;
  await withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/region.geojson`, JSON.stringify(region.geojson));
    await Deno.writeTextFile(`${folder}/damp.csv`, region.table);
    found = await assess(`${folder}/region.geojson`, {
      value: "damp_rate",
      join: `${folder}/damp.csv`,
      on: "code",
      id: "code",
      missingValues: "*,..",
    });
  });
  return found!;
}

const region = inventedRegion();

Deno.test("the main job finds what was planted in the invented region", async () => {
  const { results, areas, names } = await assessRegion(region);
  assert.equal(results.verdict.clustered, "clustered");
  const classOf = (code: string) => areas.class[names.indexOf(code)];
  const share = (codes: readonly string[], name: string) =>
    codes.filter((code) => classOf(code) === name).length / codes.length;
  const { high, low, highAmongLow, lowAmongHigh } = region.planted;
  assert.ok(share(high, "high among high") >= 0.8, `high: ${share(high, "high among high")}`);
  assert.ok(share(low, "low among low") >= 0.8, `low: ${share(low, "low among low")}`);
  assert.deepEqual(highAmongLow.map(classOf), highAmongLow.map(() => "high among low"));
  assert.deepEqual(lowAmongHigh.map(classOf), lowAmongHigh.map(() => "low among high"));
  const kinds = results.missingValues.map(({ kind }) => kind);
  assert.deepEqual(kinds, ["*", ".."], "suppressed and missing values are told apart");
  assert.ok(results.runs[0].neighbors.islands >= 1);
});

Deno.test("the main job finds no cluster in the shuffled twin of the invented region", async () => {
  const { results } = await assessRegion(shuffledTwin(region));
  assert.equal(results.verdict.clustered, "not shown");
  assert.ok(results.sweep!.joint.p! > 0.05);
  assert.equal(results.runs[0].local.significant, 0);
});
