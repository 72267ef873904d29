/** What the main job points out before anyone quotes a number, in the results, on the terminal and in the report. */
import assert from "node:assert/strict";
import { assess } from "../../lib/assess/assess.ts";
import { gridLayer } from "../support/grid_layer.ts";
import { runCli } from "../support/run_cli.ts";
import { withFolder } from "../support/temp_folder.ts";

const grid = gridLayer({ columns: 6, rows: 6 }, (at) => ({ code: `A${at}`, rate: at * at % 17 }));
const FEW = { value: "rate", sweep: false, localPermutations: 999 } as const;

async function onGrid(
  files: Readonly<Record<string, string>>,
  test: (path: string, folder: string) => Promise<void>,
): Promise<void> {
  await withFolder(async (folder) => {
    for (const [name, text] of Object.entries({ "grid.geojson": grid, ...files })) {
      await Deno.writeTextFile(`${folder}/${name}`, text);
    }
    await test(`${folder}/grid.geojson`, folder);
  });
}

/** All 36 areas but the last, the one before with a space behind its key, and one that is no area. */
const table = [
  "code,v",
  ...Array.from({ length: 34 }, (_, at) => `A${at},${at % 7}`),
  "A34 ,1",
  "B1,2",
].join("\n");

Deno.test("assess shows the keys without partner and the hint on terminal, in results and in the report", () =>
  onGrid({ "t.csv": table }, async (path, folder) => {
    const { code, stdout, stderr } = await runCli(
      ...["assess", path, "--value", "v", "--join", `${folder}/t.csv`, "--on", "code"],
      ...["--no-sweep", "--local-permutations", "999", "--out", `${folder}/out`],
    );
    assert.equal(code, 0, stderr);
    const report = await Deno.readTextFile(`${folder}/out/report.html`);
    const results = JSON.parse(await Deno.readTextFile(`${folder}/out/results.json`));
    const expected = [
      "2 areas have no row in t.csv (A34, A35)",
      '2 rows of t.csv match no area ("A34 ", B1)',
      "1 more key would match after trimming spaces",
    ];
    assert.deepEqual(results.warnings.slice(0, 3), expected);
    assert.deepEqual(results.join.tableOnly, ["A34 ", "B1"]);
    for (const text of expected) {
      assert.ok(stdout.includes(`! ${text}`), text);
      assert.ok(report.includes(text.replaceAll('"', "&quot;")), text);
    }
  }));

Deno.test("assess() speaks of one row and one area in the singular", () =>
  onGrid({ "t.csv": table.replace("A34 ,1", "A34,1") }, async (path, folder) => {
    const options = { ...FEW, value: "v", join: `${folder}/t.csv`, on: "code" };
    const { results } = await assess(path, options);
    assert.deepEqual(results.warnings, [
      "1 area has no row in t.csv (A35)",
      "1 row of t.csv matches no area (B1)",
    ]);
  }));

Deno.test("assess() says so when links come with weights that are not used", () =>
  onGrid({ "links.csv": "from,to,weight\nA0,A1,2\nA1,A0,2\nA2,A3,5\n" }, async (path, folder) => {
    const options = { ...FEW, id: "code", neighbors: `links:${folder}/links.csv` };
    const unused = (await assess(path, options)).results.warnings;
    assert.ok(unused.some((text) => /weights that were not used; --weights given/.test(text)));
    const used = (await assess(path, { ...options, weights: "given" })).results.warnings;
    assert.ok(!used.some((text) => text.includes("not used")));
  }));

Deno.test("assess() says so when a length is counted in map units", () =>
  onGrid({ "p.csv": "x,y,rate\n0,0,1\n1,0,2\n0,1,4\n1,1,8\n2,1,3\n" }, async (_, folder) => {
    const options = { ...FEW, neighbors: "within:1m", metric: "planar" };
    const { warnings } = (await assess(`${folder}/p.csv`, options)).results;
    assert.ok(warnings.some((text) => /within:1m, each meter stands for one map unit/.test(text)));
  }));
