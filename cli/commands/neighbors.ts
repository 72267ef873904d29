/**
 * `nearkin neighbors`: build links, describe them, write them.
 *
 * @module
 */
import { buildLinks, type BuiltLinks } from "../../lib/assess/build_links.ts";
import { linksFormat, writeLinks } from "../../lib/assess/write_links.ts";
import { prettyJson } from "../../lib/write/record.ts";
import type { OptionValues } from "../option_values.ts";
import { reachText } from "../reach_text.ts";
import { processTerminal } from "../terminal.ts";

/** Prints the description and writes the links where `--out` names a file. */
export async function run(path: string, values: OptionValues): Promise<void> {
  const terminal = processTerminal({ quiet: values.quiet === true });
  const out = typeof values.out === "string" ? values.out : null;
  if (out !== null) linksFormat(out);
  const built = await buildLinks(path, values as Record<string, string>);
  for (const warning of built.warnings) terminal.say(`note: ${warning}`);
  if (out !== null) {
    const written = await writeLinks(built, out, { force: values.force === true });
    if (!written.includes(out)) terminal.say(`note: written as ${written.join(", ")}`);
  }
  const { summary, diagnostics, unit } = built;
  if (values.json) terminal.print(prettyJson({ ...summary, diagnostics, unit }).trimEnd());
  else for (const line of descriptionLines(built)) terminal.print(line);
}

function descriptionLines(built: BuiltLinks): string[] {
  const { summary } = built;
  const { meanNeighbors, density } = summary;
  return [
    `Rule        ${summary.rule}`,
    `Pairs       ${summary.pairs} (${summary.links} directed links, ${summary.oneWayLinks} one-way)`,
    `Neighbors   ${summary.minNeighbors} to ${summary.maxNeighbors}, mean ${
      meanNeighbors?.toFixed(2) ?? "undefined"
    }`,
    `Density     ${density === null ? "undefined" : `${(100 * density).toPrecision(3)} %`}`,
    `Alone       ${summary.islands} areas`,
    `Components  ${summary.components}`,
    ...distanceLines(built),
    ...boundaryLines(built),
    "",
    "Neighbors  Areas",
    ...countLines(summary.neighborCounts),
  ];
}

function distanceLines({ summary, diagnostics, unit }: BuiltLinks): string[] {
  const { noneAlone, oneComponent, sharingPlaces } = diagnostics;
  const lines: string[] = [];
  if (unit !== null && summary.longestLink !== null) {
    lines.push(`Longest     ${summary.longestLink.toFixed(1)} ${unit}`);
  }
  if (unit !== null && noneAlone !== null && oneComponent !== null) {
    lines.push(
      `Reach       ${reachText(noneAlone, unit)} leaves no area alone, ` +
        `${reachText(oneComponent, unit)} joins all`,
    );
  }
  if (sharingPlaces) {
    lines.push(`Places      ${sharingPlaces} areas share their point with another`);
  }
  return lines;
}

function boundaryLines({ diagnostics: { boundaries, selfCrossing } }: BuiltLinks): string[] {
  if (boundaries === null) return [];
  const { nearVertexPairs, junctionPairs, overlapPairs, snappedPairs, nearMisses } = boundaries;
  return [
    `Boundaries  pairs found only within the tolerance ${nearVertexPairs}, at T-junctions ${junctionPairs}, ` +
    `overlapping ${overlapPairs}, by snap ${snappedPairs}; nearly touching ${nearMisses}; ` +
    `areas that cross themselves ${selfCrossing}`,
  ];
}

/** At most 20 lines; the tail is added up. */
function countLines(counts: BuiltLinks["summary"]["neighborCounts"]): string[] {
  const shown = counts.slice(0, 20).map(({ neighbors, areas }) =>
    `${String(neighbors).padStart(9)}  ${areas}`
  );
  const rest = counts.slice(20).reduce((sum, { areas }) => sum + areas, 0);
  return rest > 0 ? [...shown, `${"more".padStart(9)}  ${rest}`] : shown;
}
