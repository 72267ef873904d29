/**
 * `nearkin demo`: the main job on an invented region.
 *
 * @module
 */
import { join } from "node:path";
import { inventedRegion } from "../../lib/demo/region.ts";
import { readVectorBytes } from "../../lib/read/vector.ts";
import { writeFiles } from "../../lib/write/outcome_folder.ts";
import { convertFgb } from "../../lib/write/vector.ts";
import type { OptionValues } from "../option_values.ts";
import { processTerminal } from "../terminal.ts";
import { run as assessRun } from "./assess.ts";

/** Writes the region and its table, runs the main job on them and says where to look. */
export async function run(_: string, values: OptionValues, signal: AbortSignal): Promise<void> {
  const folder = (values.out as string | undefined) ?? "nearkin-demo";
  const force = values.force === true;
  const terminal = processTerminal({ quiet: values.quiet === true });
  const layer = join(folder, "region.gpkg"), table = join(folder, "damp.csv");
  await writeFiles(await demoFiles(layer, table), { force });
  terminal.print(`${terminal.bold("An invented region")}: ${layer}, with a table ${table}`);
  terminal.print(`> nearkin ${commandLine(layer, table, join(folder, "outcome"))}\n`);
  await assessRun(layer, {
    value: "damp_rate",
    join: table,
    on: "code",
    id: "name",
    missingValues: "*,..",
    also: "gpkg",
    out: join(folder, "outcome"),
    force,
    quiet: values.quiet,
  }, signal);
}

async function demoFiles(layer: string, table: string): Promise<Map<string, Uint8Array | string>> {
  const region = inventedRegion();
  const bytes = new TextEncoder().encode(JSON.stringify(region.geojson));
  const { fgb } = await readVectorBytes("region.geojson", bytes);
  const { files: [geopackage] } = await convertFgb(fgb, "region", "gpkg");
  return new Map<string, Uint8Array | string>([
    [layer, geopackage.bytes],
    [table, region.table],
  ]);
}

function commandLine(layer: string, table: string, out: string): string {
  return `assess ${layer} --value damp_rate --join ${table} --on code --id name ` +
    `--missing-values '*,..' --also gpkg --out ${out}`;
}
