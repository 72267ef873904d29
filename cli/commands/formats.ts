/**
 * `nearkin formats`: what can be read and written.
 *
 * @module
 */
import { listFormats } from "../../lib/read/formats.ts";
import { prettyJson } from "../../lib/write/record.ts";
import type { OptionValues } from "../option_values.ts";
import { processTerminal } from "../terminal.ts";

/** Prints one line a format, or the list as JSON. */
export async function run(_: string, values: OptionValues): Promise<void> {
  const terminal = processTerminal();
  const formats = await listFormats();
  if (values.json) return terminal.print(prettyJson(formats).trimEnd());
  for (const { title, extensions, read, write } of formats) {
    const can = [read ? "reads" : "", write ? "writes" : ""].filter(Boolean).join(" and ");
    terminal.print(`${title.padEnd(48)} ${can.padEnd(16)} ${extensions.join(" ")}`.trimEnd());
  }
}
