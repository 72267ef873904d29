/**
 * `nearkin inspect`: what is in a file, and what would fit.
 *
 * @module
 */
import { nearMissText } from "../../lib/assess/diagnose_ground.ts";
import { type FieldSummary, inspect, type Inspection } from "../../lib/assess/inspect.ts";
import { prettyJson } from "../../lib/write/record.ts";
import { reachText } from "../reach_text.ts";
import type { OptionValues } from "../option_values.ts";
import { processTerminal, type Terminal } from "../terminal.ts";

/** Prints the findings as text or JSON. */
export async function run(path: string, values: OptionValues): Promise<void> {
  const terminal = processTerminal();
  const found = await inspect(path, values as Record<string, string>);
  if (values.json) return terminal.print(prettyJson(found).trimEnd());
  for (const line of inspectionLines(found, terminal)) terminal.print(line);
}

function inspectionLines(found: Inspection, { bold }: Terminal): string[] {
  return [
    bold(`${found.source}: layer ${found.layer}, ${found.features} features (${found.shape})`),
    ...otherLayers(found),
    `CRS        ${found.crs ?? "none declared"}`,
    `Geometry   ${healthText(found.geometry)}`,
    ...boundaryLines(found),
    ...distanceLines(found),
    "",
    ...fieldLines(found.fields),
    "",
    ...suggestionLines(found),
  ];
}

function healthText(health: Inspection["geometry"]): string {
  const faults: [string, readonly number[]][] = [
    ["empty", health.none],
    ["short ring", health.shortRings],
    ["open ring", health.openRings],
    ["ring without area", health.flatRings],
    ["crosses itself", health.selfCrossing],
    ["duplicate", health.duplicates],
    ["multipart", health.multipart],
  ];
  const found = faults.filter(([, rows]) => rows.length > 0);
  if (found.length === 0) return "nothing odd: none empty, invalid, duplicate or multipart";
  return found.map(([name, rows]) => `${rows.length} ${name} (row ${rowList(rows)})`).join(", ");
}

function rowList(rows: readonly number[]): string {
  return rows.slice(0, 3).join(", ") + (rows.length > 3 ? ", …" : "");
}

function otherLayers({ layers, layer }: Inspection): string[] {
  const others = layers.filter(({ name }) => name !== layer).map(({ name, count, geometry }) =>
    `${name} (${count ?? "?"} ${geometry ?? "rows without geometry"})`
  );
  return others.length ? [`Also here  ${others.join(", ")}`] : [];
}

function boundaryLines({ boundaries, sharingPlaces }: Inspection): string[] {
  const misses = nearMissText(boundaries);
  return [
    ...(boundaries
      ? [
        `Boundaries ${misses ?? "no pair of areas nearly touches"}${
          boundaries.overlapPairs > 0 ? `; ${boundaries.overlapPairs} pairs overlap` : ""
        }`,
      ]
      : []),
    ...(sharingPlaces ? [`Places     ${sharingPlaces} areas share their point with another`] : []),
  ];
}

function distanceLines({ distances }: Inspection): string[] {
  if (!distances) {
    return ["Distances  none measured (fewer than two areas, or no CRS fits the extent)"];
  }
  const { noneAlone, oneComponent, unit } = distances;
  return [
    `Distances  within ${reachText(noneAlone, unit)} no area is alone; ` +
    `within ${reachText(oneComponent, unit)} the map hangs together`,
  ];
}

function fieldLines(fields: readonly FieldSummary[]): string[] {
  const width = Math.min(32, Math.max(5, ...fields.map(({ name }) => name.length)));
  return [
    `${"Field".padEnd(width)}  ${"Type".padEnd(10)} ${"Missing".padStart(7)}  Range`,
    ...fields.map(({ name, storedAs, missing, distinct, smallest, largest }) => {
      const range = smallest === null
        ? "no value"
        : `${shown(smallest)} to ${shown(largest!)} (${distinct} different)`;
      return `${name.padEnd(width)}  ${storedAs.padEnd(10)} ${
        String(missing).padStart(7)
      }  ${range}`;
    }),
  ];
}

function shown(value: number | string): string {
  const text = String(value);
  return text.length > 24 ? `${text.slice(0, 23)}…` : text;
}

function suggestionLines({ suggestion }: Inspection): string[] {
  if (suggestion !== null) return ["Try:", `  ${suggestion}`];
  return ["These rows have no geometry; join them, as CSV or XLSX, to a layer with assess --join"];
}
