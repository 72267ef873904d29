/**
 * What a person sees while and after a command runs: results on stdout, all else on stderr.
 *
 * @module
 */
import process from "node:process";

/** Progress is shown only for work that takes longer than this, in milliseconds. */
const QUIET_START = 1000;
/** How often the line is redrawn at most, in milliseconds. */
const REDRAW = 100;
/** Back to the start of the line, which is emptied. */
const WIPE = "\r\x1b[2K";

/** Where a command prints. */
export interface Terminal {
  /** Writes a line to stdout. */
  print(text: string): void;
  /** Writes a line to stderr that is no error; nothing where quiet. */
  say(text: string): void;
  /** Shows how far a stage is, on a terminal and after a second only; `share` from 0 to 1. */
  progress(stage: string, share?: number): void;
  /** Wipes the progress line. */
  clear(): void;
  /** Wraps text in bold where the terminal shows it. */
  bold(text: string): string;
}

/** The process's own terminal. `quiet` silences everything but errors. */
export function processTerminal(options: { quiet?: boolean } = {}): Terminal {
  const started = performance.now();
  const live = Boolean(process.stderr.isTTY) && !options.quiet;
  const color = Boolean(process.stdout.isTTY) && !process.env.NO_COLOR;
  let drawn = 0, shown = false;
  const clear = () => {
    if (shown) process.stderr.write(WIPE);
    shown = false;
  };
  return {
    print: (text) => {
      clear();
      if (!options.quiet) process.stdout.write(text + "\n");
    },
    say: (text) => {
      clear();
      if (!options.quiet) process.stderr.write(text + "\n");
    },
    progress: (stage, share) => {
      const now = performance.now();
      if (!live || now - started < QUIET_START || now - drawn < REDRAW) return;
      drawn = now;
      shown = true;
      process.stderr.write(`${WIPE}${stage}${share === undefined ? "" : ` ${percent(share)}`}`);
    },
    clear,
    bold: (text) => color ? `\x1b[1m${text}\x1b[22m` : text,
  };
}

/** Writes an error to stderr, over the progress that may stand there. */
export function complain(text: string): void {
  process.stderr.write(`${process.stderr.isTTY ? WIPE : ""}nearkin: ${text}\n`);
}

function percent(share: number): string {
  return `${Math.floor(100 * share)} %`;
}
