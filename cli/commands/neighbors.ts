/**
 * `nearkin neighbors`: build links, describe them, write them.
 *
 * @module
 */
import { buildLinks, type BuiltLinks } from "../../lib/assess/build_links.ts";
import { linksCsv } from "../../lib/write/links_csv.ts";
import { writeFiles } from "../../lib/write/outcome_folder.ts";
import { prettyJson } from "../../lib/write/record.ts";
import type { OptionValues } from "../option_values.ts";
import { processTerminal } from "../terminal.ts";

/** Prints the description and writes the table where `--out` names one. */
export async function run(path: string, values: OptionValues): Promise<void> {
  const terminal = processTerminal({ quiet: values.quiet === true });
  const built = await buildLinks(path, values as Record<string, string>);
  if (typeof values.out === "string") {
    const table = linksCsv(built.links, built.names);
    await writeFiles(new Map([[values.out, table]]), { force: values.force === true });
  }
  const { summary, connecting, unit } = built;
  if (values.json) terminal.print(prettyJson({ ...summary, connecting, unit }).trimEnd());
  else for (const line of descriptionLines(built)) terminal.print(line);
}

function descriptionLines({ summary, connecting, unit }: BuiltLinks): string[] {
  const lines = [
    `Rule        ${summary.rule}`,
    `Pairs       ${summary.pairs} (${summary.links} directed links, ${summary.oneWayLinks} one-way)`,
    `Neighbors   ${summary.minNeighbors} to ${summary.maxNeighbors}, mean ${
      summary.meanNeighbors?.toFixed(2) ?? "undefined"
    }`,
    `Alone       ${summary.islands} areas`,
    `Components  ${summary.components}`,
  ];
  if (summary.longestLink !== null) {
    lines.push(`Longest     ${summary.longestLink.toFixed(1)} ${unit}`);
  }
  if (connecting) {
    lines.push(
      `Reach       ${connecting.noneAlone.toFixed(1)} ${unit} leaves no area alone, ` +
        `${connecting.oneComponent.toFixed(1)} ${unit} joins all`,
    );
  }
  return [...lines, "", "Neighbors  Areas", ...countLines(summary.neighborCounts)];
}

/** At most 20 lines; the tail is added up. */
function countLines(counts: BuiltLinks["summary"]["neighborCounts"]): string[] {
  const shown = counts.slice(0, 20).map(({ neighbors, areas }) =>
    `${String(neighbors).padStart(9)}  ${areas}`
  );
  const rest = counts.slice(20).reduce((sum, { areas }) => sum + areas, 0);
  return rest > 0 ? [...shown, `${"more".padStart(9)}  ${rest}`] : shown;
}
