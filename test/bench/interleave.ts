/**
 * Fair timing on a machine that is never quite idle.
 *
 * @module
 */
import { spawnSync } from "node:child_process";

/** A command line to time. */
export interface TimedCommand {
  readonly command: string;
  readonly args: readonly string[];
  /** Environment variables to take away. @default [] */
  readonly without?: readonly string[];
  /** Called before each run, outside the clock. */
  readonly prepare?: () => void;
}

/**
 * Median wall-clock seconds of each command, process start included, run in turns A B A B …: turns spread a
 * slow minute of the machine over all commands, and the median forgets a first run with cold caches.
 *
 * @throws Error with the command's complaint where it fails.
 */
export function interleave(commands: readonly TimedCommand[], rounds: number): number[] {
  const seconds: number[][] = commands.map(() => []);
  for (let round = 0; round < rounds; round++) {
    commands.forEach((command, i) => seconds[i].push(timeOnce(command)));
  }
  return seconds.map(median);
}

/** Middle value; the mean of the two in the middle for an even count. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}

/** Standard output of a command that must succeed. */
export function outputOf({ command, args, without = [], prepare }: TimedCommand): string {
  prepare?.();
  return run(command, args, without);
}

function timeOnce({ command, args, without = [], prepare }: TimedCommand): number {
  prepare?.();
  const start = performance.now();
  run(command, args, without);
  return (performance.now() - start) / 1000;
}

function run(command: string, args: readonly string[], without: readonly string[]): string {
  const kept = Object.entries(Deno.env.toObject()).filter(([name]) => !without.includes(name));
  const { status, stdout, stderr, error } = spawnSync(command, args, {
    encoding: "utf8",
    env: Object.fromEntries(kept),
    maxBuffer: 1e9,
  });
  if (status === 0) return stdout;
  throw new Error(`${command} ${args.join(" ")} failed: ${error?.message ?? stderr}`);
}
