import assert from "node:assert/strict";

const root = new URL("../", import.meta.url);

Deno.test("README's program runs as printed and writes an outcome", async () => {
  const readme = await Deno.readTextFile(new URL("README.md", root));
  const [, program] = /<!-- program.*?-->\s*```ts\n([\s\S]*?)```/.exec(readme) ?? [];
  assert.ok(program, "the program stands below its mark");
  const lines = program.trim().split("\n").filter((line) => line !== "");
  assert.ok(lines.length <= 12, `${lines.length} lines`);
  const folder = await Deno.makeTempDir();
  try {
    const inPlace = program
      .replaceAll('"./mod.ts"', JSON.stringify(new URL("mod.ts", root).href))
      .replaceAll('"outcome"', JSON.stringify(`${folder}/outcome`));
    const command = new Deno.Command(Deno.execPath(), {
      args: ["run", "-A", "--no-check", "--config", new URL("deno.json", root).pathname, "-"],
      cwd: root,
      stdin: "piped",
      stdout: "piped",
      stderr: "piped",
    });
    const process = command.spawn();
    const writer = process.stdin.getWriter();
    await writer.write(new TextEncoder().encode(inPlace));
    await writer.close();
    const { code, stderr } = await process.output();
    assert.equal(code, 0, new TextDecoder().decode(stderr));
    const names = Array.from(Deno.readDirSync(`${folder}/outcome`), ({ name }) => name).sort();
    assert.deepEqual(names, [
      "areas.csv",
      "areas.fgb",
      "areas.gpkg",
      "links.fgb",
      "plots",
      "record.json",
      "report.html",
      "results.json",
      "style.sld",
    ]);
  } finally {
    await Deno.remove(folder, { recursive: true });
  }
});
