import assert from "node:assert/strict";
import { UnwritableError } from "../../lib/layer/errors.ts";
import { writeFolder } from "../../lib/write/outcome_folder.ts";

const outcome = (mark: string) => new Map([["record.json", mark], ["plots/map.svg", "<svg/>"]]);

async function inFolder(test: (folder: string) => Promise<void>): Promise<void> {
  const folder = await Deno.makeTempDir();
  try {
    await test(folder);
  } finally {
    await Deno.remove(folder, { recursive: true });
  }
}

const names = (folder: string) => [...Deno.readDirSync(folder)].map(({ name }) => name).sort();

Deno.test("writeFolder() writes all files and leaves nothing beside them", () =>
  inFolder(async (folder) => {
    await writeFolder(`${folder}/out`, outcome("1"));
    assert.deepEqual(names(folder), ["out"]);
    assert.equal(await Deno.readTextFile(`${folder}/out/plots/map.svg`), "<svg/>");
  }));

Deno.test("writeFolder() refuses an earlier outcome without force and replaces it with force", () =>
  inFolder(async (folder) => {
    await writeFolder(`${folder}/out`, outcome("1"));
    await assert.rejects(writeFolder(`${folder}/out`, outcome("2")), {
      name: "UnwritableError",
      message: /already there; add --force/,
    });
    assert.equal(await Deno.readTextFile(`${folder}/out/record.json`), "1");
    await writeFolder(`${folder}/out`, outcome("2"), { force: true });
    assert.equal(await Deno.readTextFile(`${folder}/out/record.json`), "2");
    assert.deepEqual(names(folder), ["out"]);
  }));

Deno.test("writeFolder() never replaces a folder that is no outcome, force or not", () =>
  inFolder(async (folder) => {
    await Deno.mkdir(`${folder}/photos`);
    await Deno.writeTextFile(`${folder}/photos/cat.txt`, "meow");
    await assert.rejects(writeFolder(`${folder}/photos`, outcome("1"), { force: true }), {
      message: /holds other files \(cat.txt\)/,
    });
    assert.deepEqual(names(`${folder}/photos`), ["cat.txt"]);
  }));

Deno.test("writeFolder() refuses when a file stands in the way", () =>
  inFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/out`, "a file");
    await assert.rejects(writeFolder(`${folder}/out`, outcome("1")), UnwritableError);
    await assert.rejects(writeFolder(`${folder}/out/deeper`, outcome("1")), UnwritableError);
    assert.deepEqual(names(folder), ["out"]);
  }));

Deno.test("writeFolder() leaves no half-written folder when a file cannot be written", () =>
  inFolder(async (folder) => {
    const clash = new Map([["a", "file"], ["a/b", "needs a to be a folder"]]);
    await assert.rejects(writeFolder(`${folder}/out`, clash), UnwritableError);
    assert.deepEqual(names(folder), []);
  }));
