/**
 * The outcome folder of the main job.
 *
 * @module
 */
import { readColumns } from "../layer/column.ts";
import { CAUTIONS } from "../sweep/cautions.ts";
import type { ColumnValues } from "../layer/layer.ts";
import { VERSION } from "../layer/version.ts";
import { plotFigures } from "../report/plots.ts";
import { reportPage } from "../report/page.ts";
import type { ReportInput } from "../report/report_input.ts";
import { appendColumns } from "../write/append_columns.ts";
import { csvText } from "../write/csv_text.ts";
import { linksFgb } from "../write/links_layer.ts";
import { checkFolder, type FolderOptions, writeFolder } from "../write/outcome_folder.ts";
import { engineName, prettyJson, type RunRecord } from "../write/record.ts";
import { type ResultFields, resultFields } from "../write/result_fields.ts";
import { type StyleOptions, styleSld } from "../write/style_sld.ts";
import { convertFgb } from "../write/vector.ts";
import type { Assessment } from "./assess.ts";
import type { WorkOptions } from "./options.ts";

/** Options of {@link writeAssessment}. */
export interface WriteOptions extends FolderOptions, WorkOptions {
  /** Further formats of the areas, such as `gpkg`. @default none */
  readonly also?: readonly string[];
}

/** A field that is called otherwise in one of the files. */
export interface RenamedField {
  readonly file: string;
  readonly from: string;
  readonly to: string;
}

/**
 * Writes the outcome folder, all of it or nothing.
 *
 * @returns Fields that had to take another name in some file.
 * @throws {UnwritableError} when the folder is there already, cannot be written, or a format is unknown.
 */
export async function writeAssessment(
  assessment: Assessment,
  folder: string,
  options: WriteOptions = {},
): Promise<{ renamed: readonly RenamedField[] }> {
  await checkFolder(folder, options);
  const { layer, results, areas } = assessment;
  const fields = resultFields(areas, [...layer.columns, ...layer.added].map(({ name }) => name));
  const added = [...layer.added, ...fields.columns];
  options.onProgress?.("Writing layers");
  const layers = await areaLayers(appendColumns(layer, added), options.also ?? []);
  options.signal?.throwIfAborted();
  options.onProgress?.("Drawing the report");
  const input = reportInput(assessment);
  const figures = plotFigures(input);
  const renamed = [
    ...fields.renamed.map((names) => ({ file: "areas.fgb", ...names })),
    ...layers.renamed,
  ];
  const files: [string, Uint8Array | string][] = [
    ...layers.files,
    ["areas.csv", csvText([...originalColumns(assessment), ...added])],
    ["links.fgb", linksLayer(assessment)],
    ["results.json", prettyJson(results)],
    ["report.html", reportPage(input, figures)],
    ["style.sld", styleSld(areas, styleOptions(assessment, fields))],
    ...Array.from(figures, ([name, svg]): [string, string] => [`plots/${name}.svg`, svg]),
    ["record.json", prettyJson(recordOf(assessment, renamed))],
  ];
  options.signal?.throwIfAborted();
  await writeFolder(folder, new Map(files), options);
  return { renamed };
}

/** `areas.fgb` with its spatial index, and the areas in every further format. */
async function areaLayers(
  fgb: Uint8Array,
  also: readonly string[],
): Promise<{ files: [string, Uint8Array][]; renamed: RenamedField[] }> {
  const files: [string, Uint8Array][] = [];
  const renamed: RenamedField[] = [];
  for (const format of new Set(["fgb", ...also])) {
    const written = await convertFgb(fgb, "areas", format);
    for (const { name, bytes } of written.files) files.push([name, bytes]);
    for (const names of written.renamed) renamed.push({ file: written.files[0].name, ...names });
  }
  return { files, renamed };
}

/** The fields the style looks at, under the names they got. */
function styleOptions({ layer, areas }: Assessment, { renamed }: ResultFields): StyleOptions {
  const nameOf = (field: string) => renamed.find(({ from }) => from === field)?.to ?? field;
  return {
    shape: layer.shape,
    classField: nameOf(`${areas.prefix}_class`),
    steadyField: nameOf(`${areas.prefix}_steady`),
  };
}

function originalColumns({ layer }: Assessment): ColumnValues[] {
  return readColumns(layer, layer.columns.map(({ name }) => name));
}

function linksLayer({ layer, links, places, names, plan }: Assessment): Uint8Array {
  return linksFgb({
    crs: layer.crs,
    points: places,
    links,
    ids: plan.source.id === undefined ? undefined : names,
  });
}

function reportInput(
  { results, areas, layer, links, places, names, plan }: Assessment,
): ReportInput {
  return {
    results,
    areas,
    geometry: layer.geometry,
    crs: layer.crs,
    links: { from: links.from, to: links.to, places },
    s0: links.weight.reduce((sum, weight) => sum + weight, 0),
    labels: plan.source.id === undefined ? null : names,
    cautions: CAUTIONS,
  };
}

function recordOf(
  { inputs, plan }: Assessment,
  renamed: readonly RenamedField[],
): RunRecord {
  const renamedFields: Record<string, { from: string; to: string }[]> = {};
  for (const { file, from, to } of renamed) (renamedFields[file] ??= []).push({ from, to });
  return {
    tool: { name: "nearkin", version: VERSION },
    engine: engineName(),
    inputs,
    seed: plan.seed,
    plan,
    renamedFields,
  };
}
