/**
 * `nearkin assess`: the main job.
 *
 * @module
 */
import { UsageError } from "../../lib/layer/errors.ts";
import { assess } from "../../lib/assess/assess.ts";
import type { AssessOptions } from "../../lib/assess/options.ts";
import { planAssessment } from "../../lib/assess/plan.ts";
import { writeAssessment } from "../../lib/assess/write_assessment.ts";
import { checkFolder } from "../../lib/write/outcome_folder.ts";
import { prettyJson } from "../../lib/write/record.ts";
import { knownFormat } from "../../lib/write/vector.ts";
import type { OptionValues } from "../option_values.ts";
import { summaryText } from "../summary.ts";
import { processTerminal } from "../terminal.ts";

/** Runs the main job and writes its outcome folder. */
export async function run(
  path: string,
  values: OptionValues,
  signal: AbortSignal,
): Promise<void> {
  const terminal = processTerminal({ quiet: values.quiet === true });
  const folder = values.out as string;
  const force = values.force === true;
  const options = { ...assessOptions(values), signal, onProgress: terminal.progress };
  const also = listOf(values.also as string | undefined).map(knownFormat);
  planAssessment(path, options);
  await checkFolder(folder, { force });
  const assessment = await assess(path, options);
  const { renamed } = await writeAssessment(assessment, folder, {
    force,
    also,
    onProgress: terminal.progress,
  });
  terminal.clear();
  for (const { file, from, to } of renamed) {
    terminal.say(`note: ${file}: field ${from} is written as ${to}`);
  }
  if (values.json) terminal.print(prettyJson(assessment.results).trimEnd());
  else terminal.print(summaryText(assessment.results, folder, terminal.bold));
}

/** Options of the library from the values of the command line. */
export function assessOptions(values: OptionValues): AssessOptions {
  const text = values as Readonly<Record<string, string | undefined>>;
  return {
    ...text,
    per: numberOf("--per", text.per),
    permutations: numberOf("--permutations", text.permutations),
    localPermutations: numberOf("--local-permutations", text.localPermutations),
    level: numberOf("--level", text.level),
    vary: values.vary as string[] | undefined,
    sweep: values.sweep !== false,
  } as AssessOptions;
}

function numberOf(option: string, text: string | undefined): number | undefined {
  if (text === undefined) return undefined;
  const value = Number(text);
  if (text.trim() !== "" && Number.isFinite(value)) return value;
  throw new UsageError(`Cannot use ${option} ${text} as it is not a number`);
}

function listOf(text: string | undefined): string[] {
  return (text ?? "").split(",").map((item) => item.trim()).filter((item) => item !== "");
}
