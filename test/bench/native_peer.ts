/**
 * Peers in C, compiled for this machine when they are first needed.
 *
 * @module
 */
import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

const SOURCES = fileURLToPath(new URL("../peers/", import.meta.url));

/** First line of what the C compiler says about itself; null where there is none. */
export function clangVersion(): string | null {
  const { status, stdout } = spawnSync("clang", ["--version"], { encoding: "utf8" });
  return status === 0 ? stdout.split("\n")[0] : null;
}

/** Compiles `test/peers/NAME.c` into a folder and gives the path of the program; null without a compiler. */
export function compilePeer(name: string, folder: string): string | null {
  if (clangVersion() === null) return null;
  const program = join(folder, name);
  const args = ["-O3", "-march=native", join(SOURCES, `${name}.c`), "-o", program, "-lm"];
  const { status, stderr } = spawnSync("clang", args, { encoding: "utf8" });
  if (status !== 0) throw new Error(`clang failed on ${name}.c: ${stderr}`);
  return program;
}

/** Runs a program that prints milliseconds line by line and perhaps one line of words. */
export function runPeer(
  command: string,
  args: readonly string[],
): { milliseconds: number; words: string } {
  const { status, stdout, stderr } = spawnSync(command, args, { encoding: "utf8" });
  if (status !== 0) throw new Error(`${command} ${args.join(" ")} failed: ${stderr}`);
  const [first, words = ""] = stdout.trim().split("\n");
  return { milliseconds: Number(first), words };
}
