/**
 * Command line of nearkin: parse, hand to one command, map what was thrown to an exit code.
 *
 * @module
 */
import process from "node:process";
import { Command, CommanderError } from "commander";
import { VERSION } from "../lib/layer/version.ts";
import { EXIT, exitCodeOf } from "./exit_codes.ts";
import { type CommandRow, COMMANDS, type OptionRow } from "./option_table.ts";
import type { OptionValues } from "./option_values.ts";
import { complain } from "./terminal.ts";

/** What a file in `commands/` exports. */
export interface CommandModule {
  run(argument: string, options: OptionValues, signal: AbortSignal): Promise<void>;
}

/** Loaded only when called, so that help starts fast. */
const MODULES: Readonly<Record<string, () => Promise<CommandModule>>> = {
  assess: () => import("./commands/assess.ts"),
  inspect: () => import("./commands/inspect.ts"),
  neighbors: () => import("./commands/neighbors.ts"),
  demo: () => import("./commands/demo.ts"),
  formats: () => import("./commands/formats.ts"),
};

/** Runs a command line and gives the exit code. */
export async function main(args: readonly string[]): Promise<number> {
  const interruption = new AbortController();
  const onInterrupt = () => interruption.abort();
  process.once("SIGINT", onInterrupt);
  try {
    await buildParser(interruption.signal).parseAsync([...args], { from: "user" });
    return EXIT.done;
  } catch (error) {
    return report(error);
  } finally {
    process.off("SIGINT", onInterrupt);
  }
}

function buildParser(signal: AbortSignal): Command {
  const parser = new Command("nearkin")
    .description(
      "Is the map clustered, where, and would that still stand under another reasonable definition of neighbor?",
    )
    .version(VERSION)
    .exitOverride()
    .configureOutput({ outputError: () => {} });
  for (const row of COMMANDS) addCommand(parser, row, signal);
  return parser;
}

function addCommand(parser: Command, row: CommandRow, signal: AbortSignal): void {
  const command = parser.command(row.name).description(row.text).exitOverride()
    .configureOutput({ outputError: () => {} });
  if (row.argument) command.argument(`<${row.argument.name}>`, row.argument.text);
  for (const option of row.options) addOption(command, option);
  command.action(async (...given: unknown[]) => {
    const options = given.at(-2) as OptionValues;
    const argument = row.argument ? given[0] as string : "";
    const { run } = await MODULES[row.name]();
    await run(argument, options, signal);
  });
}

function addOption(command: Command, option: OptionRow): void {
  const usage = option.argument ? `--${option.flag} <${option.argument}>` : `--${option.flag}`;
  const text = option.default ? `${option.text} (default: ${option.default})` : option.text;
  const collect = (value: string, earlier: string[] | undefined) => [...(earlier ?? []), value];
  if (option.required) command.requiredOption(usage, text);
  else if (option.repeat) command.option(usage, text, collect as never);
  else command.option(usage, text);
}

function report(error: unknown): number {
  if (error instanceof CommanderError) {
    if (error.exitCode === 0) return EXIT.done;
    complain(usageText(error));
    return EXIT.usage;
  }
  const code = exitCodeOf(error);
  const { message, stack } = error instanceof Error ? error : new Error(String(error));
  if (code === EXIT.interrupted) complain("interrupted, nothing was written");
  else if (code === EXIT.faultOfTheProgram) complain(`a fault of the program\n${stack}`);
  else complain(message);
  return code;
}

function usageText(error: CommanderError): string {
  if (error.code === "commander.help") return "name a command; nearkin --help lists them";
  return error.message.replace(/^error: /, "").replaceAll("\n", " ");
}

if (import.meta.main) {
  const code = await main(process.argv.slice(2));
  // An empty write calls back when all earlier output has reached the pipe.
  process.stdout.write("", () => process.exit(code));
}
