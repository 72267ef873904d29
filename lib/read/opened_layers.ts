/**
 * The layers that a source holds, and which of them is meant.
 *
 * @module
 */
import { UnfitDataError, UnreadableError, UsageError } from "../layer/errors.ts";
import { suggestion } from "../layer/nearest_name.ts";
import { GdalError, type GdalFolder } from "./gdal_folder.ts";
import { type OpenChoices, openOptionsFor } from "./open_options.ts";
import type { SourceFiles } from "./source_files.ts";

/** A layer within the opened datasets of a source. */
export interface OpenedLayer {
  /** GDAL's handle of the dataset. */
  readonly dataset: number;
  /** Unique within the source. */
  readonly name: string;
  /** Name as the dataset has it; differs from `name` where an archive holds two of the same name. */
  readonly ownName: string;
  /** Number of features; null where it was not asked for or the format cannot tell. */
  readonly count: number | null;
  /** GDAL's word, such as `MultiPolygon`; null for a table without geometry. */
  readonly geometry: string | null;
}

/**
 * Puts the files of a source into a folder of GDAL and lists what its datasets hold.
 * @param infoArgs What to leave out of the description, as for ogrinfo.
 * @throws UnreadableError where a dataset is no vector data.
 */
export function openLayers(
  folder: GdalFolder,
  source: SourceFiles,
  choices: OpenChoices,
  infoArgs: readonly string[],
): OpenedLayer[] {
  for (const { name, bytes } of source.files) folder.put(name, bytes);
  const layers = source.datasets.flatMap((name) => {
    const openOptions = openOptionsFor(name, source.files, choices);
    const dataset = openDataset(folder, name, openOptions, source.name);
    return describe(folder, dataset, infoArgs).map((layer) => ({ ...layer, file: name }));
  });
  return layers.map(({ file, ...layer }) => {
    const namesakes = layers.filter((other) => other.ownName === layer.ownName);
    return namesakes.length > 1 ? { ...layer, name: `${file}/${layer.ownName}` } : layer;
  });
}

function openDataset(
  folder: GdalFolder,
  name: string,
  openOptions: readonly string[],
  source: string,
): number {
  try {
    return folder.open(name, { openOptions });
  } catch (cause) {
    if (!(cause instanceof GdalError)) throw cause;
    const why = cause.message.includes("not recognized")
      ? "as no vector format known here fits it"
      : `(${cause.message})`;
    const file = name === source ? source : `${name} in ${source}`;
    throw new UnreadableError(
      `Cannot read ${file} ${why}; \`nearkin formats\` lists what can be read`,
      { cause },
    );
  }
}

/** The part used of `ogrinfo -json`. */
interface DatasetInfo {
  readonly layers: readonly {
    readonly name: string;
    readonly featureCount?: number;
    readonly geometryFields: readonly { readonly type: string }[];
  }[];
}

function describe(
  folder: GdalFolder,
  dataset: number,
  infoArgs: readonly string[],
): OpenedLayer[] {
  const { layers } = folder.info(dataset, infoArgs) as DatasetInfo;
  return layers.map(({ name, featureCount, geometryFields }) => ({
    dataset,
    name,
    ownName: name,
    count: featureCount ?? null,
    geometry: geometryFields.at(0)?.type ?? null,
  }));
}

/**
 * The layer asked for, else the only one, else the only one that has geometry.
 * @throws UsageError where no layer has the name asked for, suggesting the nearest.
 * @throws UnreadableError where several would do.
 * @throws UnfitDataError where there is none at all.
 */
export function chooseLayer(
  layers: readonly OpenedLayer[],
  wanted: string | undefined,
  source: string,
): OpenedLayer {
  if (layers.length === 0) throw new UnfitDataError(`${source} holds no layer`);
  const names = layers.map((layer) => layer.name);
  if (wanted !== undefined) {
    const found = layers.find((layer) => layer.name === wanted);
    if (found !== undefined) return found;
    throw new UsageError(
      `No layer "${wanted}" in ${source}, which has ${names.join(", ")}${
        suggestion(wanted, names)
      }`,
    );
  }
  if (layers.length === 1) return layers[0];
  const spatial = layers.filter((layer) => layer.geometry !== null);
  if (spatial.length === 1) return spatial[0];
  throw new UnreadableError(
    `${source} holds ${layers.length} layers (${names.join(", ")}); choose one with --layer`,
  );
}
