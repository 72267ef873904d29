/** Links on their own: written as a table, read back, and the map gives the same answer. */
import assert from "node:assert/strict";
import { assess } from "../../lib/assess/assess.ts";
import { runCli } from "../support/run_cli.ts";
import { withFolder } from "../support/temp_folder.ts";

const NC = new URL("../../testdata/data/nc.gpkg", import.meta.url).pathname;

for (
  const [rule, id] of [["touching", "NAME"], ["nearest:4", undefined]] as const
) {
  Deno.test(`neighbors writes the links of ${rule} as a table that gives the same test again`, () =>
    withFolder(async (folder) => {
      const table = `${folder}/links.csv`;
      const named = id === undefined ? [] : ["--id", id];
      const { code, stdout, stderr } = await runCli(
        ...["neighbors", NC, "--neighbors", rule, ...named, "--out", table],
      );
      assert.equal(code, 0, stderr);
      assert.match(stdout, /^Components +\d+$/m);
      const [head, ...rows] = (await Deno.readTextFile(table)).trim().split(/\r?\n/);
      assert.equal(head.replace("\ufeff", ""), "from,to,weight,distance");
      const few = { value: "SID79", id, sweep: false, localPermutations: 999 } as const;
      const direct = (await assess(NC, { ...few, neighbors: rule })).results.runs[0];
      assert.equal(rows.length, direct.neighbors.links);
      const neighbors = `links:${table}`;
      const read = [
        await assess(NC, { ...few, neighbors }),
        // The table holds weights whose rows sum to 1 already.
        await assess(NC, { ...few, neighbors, weights: "given", standardize: "none" }),
      ];
      for (const { results } of read) {
        const [{ global, local }] = results.runs;
        assert.deepEqual(global.moranI, direct.global.moranI);
        assert.deepEqual(local.counts, direct.local.counts);
      }
    }));
}

Deno.test("neighbors refuses to write over a file without --force", () =>
  withFolder(async (folder) => {
    const table = `${folder}/links.csv`;
    await Deno.writeTextFile(table, "mine");
    const { code, stderr } = await runCli("neighbors", NC, "--out", table);
    assert.equal(code, 5);
    assert.match(stderr, /links\.csv.*--force/);
    assert.equal(await Deno.readTextFile(table), "mine");
    const forced = await runCli("neighbors", NC, "--out", table, "--force", "--quiet");
    assert.deepEqual([forced.code, forced.stdout], [0, ""]);
  }));
