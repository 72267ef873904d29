/** What goes to which stream, what a run says when it ends, and what it leaves behind when it is stopped. */
import assert from "node:assert/strict";
import process from "node:process";
import { gridLayer } from "../support/grid_layer.ts";
import { runCli } from "../support/run_cli.ts";
import { withFolder } from "../support/temp_folder.ts";

/** A 5 × 5 grid; the fields are too long for a Shapefile, which gives a note on renaming. */
const grid = gridLayer({ columns: 5, rows: 5 }, (at) => ({ rate_per_1000: at % 7 + at / 100 }));

async function onGrid(test: (args: string[], folder: string) => Promise<void>): Promise<void> {
  await withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/grid.geojson`, grid);
    const few = ["--no-sweep", "--local-permutations", "999"];
    const places = [`${folder}/grid.geojson`, "--out", `${folder}/out`];
    await test(["assess", ...places, "--value", "rate_per_1000", ...few], folder);
  });
}

Deno.test("assess prints the summary to stdout, notes to stderr, and no progress where there is no terminal", () =>
  onGrid(async (args) => {
    const { code, stdout, stderr } = await runCli(...args, "--also", "shp");
    assert.equal(code, 0, stderr);
    assert.match(stdout, /^Moran's I /m);
    assert.ok(stdout.split("\n").length <= 40, "the summary fits a screen");
    assert.ok(!(stdout + stderr).includes("\x1b"), "no control characters");
    assert.match(stderr, /^note: areas\.zip: field rate_per_1000\w* is written as /m);
    for (const line of stderr.trimEnd().split("\n")) assert.match(line, /^note: /);
  }));

Deno.test("assess --quiet prints nothing at all when all goes well", () =>
  onGrid(async (args) => {
    const run = await runCli(...args, "--also", "shp", "--quiet");
    assert.deepEqual(run, { code: 0, stdout: "", stderr: "" });
  }));

Deno.test("assess --json prints results.json and nothing else", () =>
  onGrid(async (args, folder) => {
    const { code, stdout, stderr } = await runCli(...args, "--json");
    assert.deepEqual([code, stderr], [0, ""]);
    assert.equal(stdout, await Deno.readTextFile(`${folder}/out/results.json`));
  }));

Deno.test("inspect, neighbors and formats --json print JSON and nothing else", () =>
  onGrid(async ([, path]) => {
    for (const args of [["inspect", path], ["neighbors", path], ["formats"]]) {
      const { code, stdout, stderr } = await runCli(...args, "--json");
      assert.deepEqual([code, stderr], [0, ""], args[0]);
      assert.equal(typeof JSON.parse(stdout), "object");
    }
  }));

Deno.test("nearkin exits with 2 and says what is missing when there is no or an unknown command", async () => {
  const none = await runCli(), unknown = await runCli("asess");
  assert.deepEqual([none.code, none.stdout], [2, ""]);
  assert.match(none.stderr, /nearkin --help/);
  assert.deepEqual([unknown.code, unknown.stdout], [2, ""]);
  assert.match(unknown.stderr, /asess.*assess/);
});

Deno.test("assess ends with 130 and leaves nothing behind when it is interrupted", () =>
  withFolder(async (folder) => {
    const large = gridLayer({ columns: 60, rows: 60 }, (at) => ({ rate: at % 7 + at / 100 }));
    await Deno.writeTextFile(`${folder}/grid.geojson`, large);
    const places = [`${folder}/grid.geojson`, "--out", `${folder}/out`];
    const run = runCli("assess", ...places, "--value", "rate", "--local-permutations", "9999999");
    setTimeout(() => process.emit("SIGINT"), 1000);
    const { code, stdout, stderr } = await run;
    assert.deepEqual([code, stdout], [130, ""]);
    assert.equal(stderr, "nearkin: interrupted, nothing was written\n");
    assert.deepEqual(Array.from(Deno.readDirSync(folder), ({ name }) => name), ["grid.geojson"]);
  }));

Deno.test("assess counts in the summary every definition tried, also those that turned out the same", () =>
  onGrid(async (args) => {
    const swept = [...args.filter((arg) => arg !== "--no-sweep"), "--vary", "nearest:4, touching"];
    const { stdout } = await runCli(...swept, "--neighbors", "touching upto=1 + edge");
    assert.match(stdout, /^Over the 3 definitions tried/m);
    assert.match(stdout, /^Sweep +3 definitions/m);
  }));
