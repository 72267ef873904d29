/**
 * Runs the command line inside the test's own process and keeps what it prints.
 *
 * @module
 */
import process from "node:process";
import { main } from "../../cli/main.ts";

/** What a command line did. */
export interface CliRun {
  readonly code: number;
  readonly stdout: string;
  readonly stderr: string;
}

/** Runs nearkin with these arguments. */
export async function runCli(...args: string[]): Promise<CliRun> {
  const printed = { stdout: "", stderr: "" };
  const original = { stdout: process.stdout.write, stderr: process.stderr.write };
  const keep = (stream: "stdout" | "stderr") => (text: string | Uint8Array) => {
    printed[stream] += typeof text === "string" ? text : new TextDecoder().decode(text);
    return true;
  };
  process.stdout.write = keep("stdout") as typeof process.stdout.write;
  process.stderr.write = keep("stderr") as typeof process.stderr.write;
  try {
    const code = await main(args);
    return { code, ...printed };
  } finally {
    process.stdout.write = original.stdout;
    process.stderr.write = original.stderr;
  }
}
