/** The walls between the rooms, held by reading every import. */
import assert from "node:assert/strict";

/** The path: a room imports only from rooms before it. */
const ROOMS = [
  "layer",
  "demo",
  "read",
  "prepare",
  "project",
  "neighbors",
  "weights",
  "statistics",
  "inference",
  "sweep",
  "write",
  "report",
  "assess",
];

const root = new URL("../", import.meta.url);

interface Source {
  readonly path: string;
  readonly text: string;
  readonly imports: readonly string[];
}

async function sourcesOf(folder: string): Promise<Source[]> {
  const sources: Source[] = [];
  for await (const entry of Deno.readDir(new URL(folder, root))) {
    const path = `${folder}${entry.name}`;
    // Kernel sources are another language (AssemblyScript) with its own compiler.
    if (path === "lib/inference/kernel") continue;
    if (entry.isDirectory) sources.push(...await sourcesOf(`${path}/`));
    else if (path.endsWith(".ts")) {
      const text = (await Deno.readTextFile(new URL(path, root)))
        .replace(/\/\*\*[\s\S]*?\*\//g, ""); // examples in docs import what they show
      const found = text.matchAll(/(?:from|import\()\s*"([^"]+)"/g);
      sources.push({ path, text, imports: Array.from(found, ([, name]) => name) });
    }
  }
  return sources;
}

const library = await sourcesOf("lib/");
const commandLine = await sourcesOf("cli/");

function roomOf(path: string): string {
  return path.split("/")[1];
}

function target(source: Source, name: string): string {
  return new URL(name, new URL(source.path, root)).href.slice(root.href.length);
}

Deno.test("a room imports only from rooms before it on the path", () => {
  for (const source of library) {
    const own = ROOMS.indexOf(roomOf(source.path));
    assert.notEqual(own, -1, `${source.path} stands in no known room`);
    for (const name of source.imports.filter((name) => name.startsWith("."))) {
      const other = ROOMS.indexOf(roomOf(target(source, name)));
      assert.ok(other <= own, `${source.path} imports ${name} from a later room`);
    }
  }
});

Deno.test("no file imports itself through others", () => {
  const next = new Map(library.map((source) => [
    source.path,
    source.imports.filter((name) => name.startsWith(".")).map((name) => target(source, name)),
  ]));
  const done = new Set<string>();
  const visit = (path: string, trail: readonly string[]) => {
    assert.ok(!trail.includes(path), `circle: ${[...trail, path].join(" > ")}`);
    if (done.has(path)) return;
    for (const other of next.get(path) ?? []) visit(other, [...trail, path]);
    done.add(path);
  };
  for (const path of next.keys()) visit(path, []);
});

const only = (pattern: RegExp, rooms: readonly string[]) => {
  for (const { path, imports } of library) {
    if (rooms.includes(roomOf(path))) continue;
    const found = imports.find((name) => pattern.test(name));
    assert.equal(found, undefined, `${path} imports ${found}`);
  }
};

Deno.test("GDAL appears only where layers come in", () => only(/gdal3/, ["read"]));

Deno.test("the file system appears only where files come in and go out", () =>
  only(/^node:fs/, ["read", "write"]));

Deno.test("the library neither prints, nor ends the process, nor asks for Deno", () => {
  for (const { path, text } of [...library, ...commandLine]) {
    assert.doesNotMatch(text, /\bDeno\.(?!test)/, `${path} is not portable`);
    if (path === "cli/main.ts") continue;
    assert.doesNotMatch(text, /process\.exit\(/, `${path} ends the process`);
    if (path.startsWith("lib/")) assert.doesNotMatch(text, /\bconsole\./, `${path} prints`);
  }
});

Deno.test("only option parsing knows the parser library", () => {
  for (const { path, imports } of [...library, ...commandLine]) {
    if (path !== "cli/main.ts") assert.ok(!imports.includes("commander"), path);
  }
});
