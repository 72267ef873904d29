/**
 * `deno task binary [OUT]`: builds nearkin as one Linux executable, GDAL, workers and demo inside.
 *
 * The sources are copied to a temporary folder, where npm installs the pinned packages and bun's compiler,
 * and one module is swapped: the one that reads GDAL's files from disk gives way to one that embeds them.
 * Network: the npm registry, through npm.
 *
 * @module
 */
import { execFileSync } from "node:child_process";
import {
  cpSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join, posix, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import { EMBEDDED_GDAL_ASSETS } from "./embedded_gdal_assets.ts";
import { pinnedPackages } from "./pinned_packages.ts";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));
/** What is compiled. */
const SOURCES = ["lib", "cli"];
/** Packages that only tests use. */
const TEST_ONLY = ["playwright-core"];
const BUN_VERSION = "1.4.5";
/** One file that takes no settings from the folder in which it is called. */
const BUILD_FLAGS = [
  "--compile",
  "--minify-syntax",
  "--no-compile-autoload-dotenv",
  "--no-compile-autoload-bunfig",
];
/** How a module names the worker it starts. */
const WORKER_URL = /new URL\("([^"]*_worker\.ts)", import\.meta\.url\)/g;

/** Builds the executable and gives its size in bytes. The folder of `out` is made where missing. */
export function buildBinary(out: string): number {
  const folder = mkdtempSync(join(tmpdir(), "nearkin-binary-"));
  try {
    for (const source of SOURCES) {
      cpSync(join(ROOT, source), join(folder, source), { recursive: true });
    }
    writeFileSync(join(folder, "lib/read/gdal_assets.ts"), EMBEDDED_GDAL_ASSETS);
    installPackages(folder);
    mkdirSync(dirname(out), { recursive: true });
    const workers = placeWorkers(folder);
    const entries = ["cli/main.ts", ...workers].map((entry) => `./${entry}`);
    const bun = join(folder, "node_modules/bun/bin/bun.exe");
    run(folder, bun, "build", ...BUILD_FLAGS, `--outfile=${out}`, ...entries);
    return statSync(out).size;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Installs the pinned packages and bun; of install scripts, only bun's runs, which picks its build for this CPU. */
function installPackages(folder: string): void {
  const read = (name: string) => readFileSync(join(ROOT, name), "utf8");
  const { dependencies, overrides } = pinnedPackages(
    read("deno.json"),
    read("deno.lock"),
    TEST_ONLY,
  );
  const manifest = {
    private: true,
    type: "module",
    dependencies: { ...dependencies, bun: BUN_VERSION },
    overrides,
  };
  writeFileSync(join(folder, "package.json"), JSON.stringify(manifest, null, 2));
  const quiet = ["--no-audit", "--no-fund", "--loglevel=error"];
  run(folder, "npm", "install", "--ignore-scripts", ...quiet);
  run(join(folder, "node_modules/bun"), "node", "install.js");
}

/** Runs a command in a folder; its complaints are shown, its chatter is not. */
function run(folder: string, command: string, ...args: string[]): void {
  execFileSync(command, args, { cwd: folder, stdio: ["ignore", "ignore", "inherit"] });
}

/**
 * Modules that start as workers (`*_worker.ts`); each has to be an entry point of its own. In the executable all code
 * stands in one module at the root, so `new URL("./x_worker.ts", import.meta.url)` is made to start there.
 *
 * @throws Error where a worker is started in a form that this cannot see.
 */
function placeWorkers(folder: string): string[] {
  const files = readdirSync(join(folder, "lib"), { recursive: true, encoding: "utf8" })
    .filter((file) => file.endsWith(".ts")).map((file) => `lib/${file}`).sort();
  const placed = new Set<string>();
  for (const file of files) {
    const path = join(folder, file);
    const source = readFileSync(path, "utf8");
    const moved = source.replace(WORKER_URL, (_, relative: string) => {
      const worker = posix.join(posix.dirname(file), relative);
      placed.add(worker);
      return `new URL("./${worker}", import.meta.url)`;
    });
    if (moved !== source) writeFileSync(path, moved);
  }
  const workers = files.filter((file) => file.endsWith("_worker.ts"));
  const lost = workers.find((worker) => !placed.has(worker));
  if (lost !== undefined) {
    throw new Error(`Cannot embed ${lost} as no module starts it by new URL("…", import.meta.url)`);
  }
  return workers;
}

if (import.meta.main) {
  const out = resolve(Deno.args[0] ?? join(ROOT, "build/nearkin"));
  const start = performance.now();
  const bytes = buildBinary(out);
  const seconds = (performance.now() - start) / 1000;
  console.log(`${out}: ${(bytes / 1e6).toFixed(0)} MB, built in ${seconds.toFixed(1)} s`);
}
