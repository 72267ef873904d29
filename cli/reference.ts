/**
 * The option reference of the README, made from the option table.
 *
 * @module
 */
import { type CommandRow, COMMANDS, type OptionRow, optionUsage } from "./option_table.ts";

/** Markdown: a heading and a table for each command. */
export function referenceText(): string {
  return COMMANDS.map(commandText).join("\n\n");
}

function commandText({ name, argument, text, options }: CommandRow): string {
  const usage = ["nearkin", name, ...(argument ? [argument.name] : [])].join(" ");
  return [
    `### \`${usage}\``,
    "",
    text,
    "",
    "| option | what it does | default |",
    "| --- | --- | --- |",
    ...options.map(optionLine),
  ].join("\n");
}

function optionLine(option: OptionRow): string {
  const notes = [
    option.required ? "required" : option.default ?? "",
    option.repeat ? "repeatable" : "",
  ]
    .filter(Boolean);
  return `| \`${optionUsage(option)}\` | ${cell(option.text)} | ${cell(notes.join("; "))} |`;
}

function cell(text: string): string {
  return text.replaceAll("|", "\\|");
}
