/** Every file that the tests read says where it comes from and under which license. */
import assert from "node:assert/strict";
import { readdirSync, readFileSync } from "node:fs";

const testdata = new URL("../testdata/", import.meta.url);
const textOf = (path: string) => readFileSync(new URL(path, testdata), "utf8");
const filesOf = (folder: string) => readdirSync(new URL(`${folder}/`, testdata));

/** Names in backticks, `*` standing for anything. */
function namesIn(text: string): RegExp[] {
  return Array.from(
    text.matchAll(/`([^`\n]+)`/g),
    ([, name]) =>
      new RegExp(`^${name.replace(/[.+^$()[\]{}|\\]/g, "\\$&").replaceAll("*", ".*")}$`),
  );
}

Deno.test("testdata/README.md has a section for every folder", () => {
  const readme = textOf("README.md");
  const folders = readdirSync(testdata, { withFileTypes: true }).filter((entry) =>
    entry.isDirectory()
  );
  for (const { name } of folders) assert.ok(readme.includes(`## \`${name}/\``), name);
});

for (
  const [folder, page] of [["data", "README.md"], ["crs", "README.md"], [
    "tables",
    "tables/README.md",
  ]]
) {
  Deno.test(`testdata/${page} names every file of ${folder}/`, () => {
    const names = namesIn(textOf(page));
    for (const file of filesOf(folder)) {
      if (file === "README.md") continue;
      assert.ok(names.some((name) => name.test(file)), `${folder}/${file}`);
    }
  });
}

Deno.test("every reference case states its id, source, license and tolerance", () => {
  for (const file of filesOf("cases")) {
    const { id, source, licence, tolerance } = JSON.parse(textOf(`cases/${file}`));
    assert.equal(`${id}.json`, file);
    for (const [what, text] of Object.entries({ source, licence, tolerance })) {
      assert.ok(text, `${file} states no ${what}`);
    }
  }
});
