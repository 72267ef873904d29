/**
 * How long one waits for `nearkin --help`.
 *
 * @module
 */
import { fileURLToPath } from "node:url";
import { interleave } from "./interleave.ts";
import type { Section } from "./section.ts";

const MAIN = fileURLToPath(new URL("../../cli/main.ts", import.meta.url));

/** `--help` against the bare start of the runtime. */
export const HELP_SECTION: Section = {
  name: "help",
  title: "nearkin --help against deno eval 0",
  run() {
    const deno = Deno.execPath();
    const [ours, peer] = interleave([
      { command: deno, args: ["run", "-A", MAIN, "--help"] },
      { command: deno, args: ["eval", "0"] },
    ], 9);
    const isMet = (ours: number, peer: number) => ours - peer <= 0.15;
    return [{ what: "--help", ours, peer, target: "at most 0.15 s more", isMet }];
  },
};
