/**
 * Any vector format in, a layer record out.
 *
 * GDAL converts whatever it is to FlatGeobuf in memory, rows in input order; everything after reads that
 * one format.
 *
 * @module
 */
import { decodeLayer } from "../layer/decode_layer.ts";
import { UnfitDataError, UnreadableError } from "../layer/errors.ts";
import type { Layer } from "../layer/layer.ts";
import { decodeFgbFile } from "./fgb_file.ts";
import { GdalCrash, loadGdal } from "./gdal.ts";
import { GdalError, GdalFolder } from "./gdal_folder.ts";
import { chooseLayer, type OpenedLayer, openLayers } from "./opened_layers.ts";
import { readSourceFiles, type SourceFiles, sourceFilesOf } from "./source_files.ts";
import { cleanedLayerToFgb, layerToFgb, mayHideEmptyPoint } from "./to_fgb.ts";

/** Choices of {@link readLayer}. */
export interface ReadLayerOptions {
  /** Which layer, where the file holds several. @default the only one with geometry */
  readonly layer?: string;
  /** Text encoding of a Shapefile whose own mark is missing or wrong. @default the file's */
  readonly encoding?: string;
  /** Further GDAL open options of the format, `KEY=VALUE`. @default none */
  readonly openOptions?: readonly string[];
}

/** A layer of a file, before it is read. */
export interface LayerInfo {
  readonly name: string;
  /** Number of features; null where the format cannot tell. */
  readonly count: number | null;
  /** GDAL's word, such as `MultiPolygon`; null for a table without geometry. */
  readonly geometry: string | null;
}

/**
 * Reads one layer of a vector file, rows in the order of the file.
 *
 * Takes whatever GDAL opens: GeoPackage, GeoJSON and its newline-delimited kind, FlatGeobuf, Shapefile and MapInfo
 * with the files beside them, KML, GML, TopoJSON, file geodatabase folders, and zip archives of these.
 * Rows without geometry stay rows; list fields become text; curves become lines; a reference system
 * called undefined or unknown counts as none.
 *
 * @throws UnreadableError no such file, no vector data, broken data, or several layers and none chosen.
 * @throws UsageError no layer of the name asked for.
 * @throws UnfitDataError a layer without features.
 *
 * Cost: about 1.2 s for 100,000 polygons, plus 0.4 s to start GDAL the first time.
 */
export async function readLayer(path: string, options: ReadLayerOptions = {}): Promise<Layer> {
  return await readSource(await readSourceFiles(path), options);
}

/** Like {@link readLayer} for a file that is in memory; `name` tells the format by its ending. */
export async function readVectorBytes(
  name: string,
  bytes: Uint8Array,
  options: ReadLayerOptions = {},
): Promise<Layer> {
  return await readSource(sourceFilesOf(name, bytes), options);
}

/** The layers of a vector file, in its own order. Throws as {@link readLayer} does. */
export async function listLayers(path: string): Promise<LayerInfo[]> {
  const source = await readSourceFiles(path);
  using folder = new GdalFolder(await loadGdal());
  return openLayers(folder, source, {}, ["-noextent", "-nomd"])
    .map(({ name, count, geometry }) => ({ name, count, geometry }));
}

async function readSource(source: SourceFiles, options: ReadLayerOptions): Promise<Layer> {
  const layer = decodeFgbFile(source, options.layer) ?? await readThroughGdal(source, options);
  if (layer.count === 0) throw withoutFeatures(layer.name, source);
  return layer;
}

function withoutFeatures(layer: string, source: SourceFiles): UnfitDataError {
  return new UnfitDataError(`Layer "${layer}" of ${source.name} has no features`);
}

/** The plain conversion first; it fails only on rare geometries, which cost a detour to clean away. */
async function readThroughGdal(source: SourceFiles, options: ReadLayerOptions): Promise<Layer> {
  try {
    const layer = await convert(source, options, layerToFgb);
    if (!mayHideEmptyPoint(layer)) return layer;
  } catch (cause) {
    if (!(cause instanceof GdalCrash) || cause.outOfMemory) throw cause;
  }
  return await convert(source, options, cleanedLayerToFgb);
}

async function convert(
  source: SourceFiles,
  options: ReadLayerOptions,
  toFgb: (folder: GdalFolder, layer: OpenedLayer) => Uint8Array,
): Promise<Layer> {
  using folder = new GdalFolder(await loadGdal());
  const layers = openLayers(folder, source, options, ["-nocount", "-noextent", "-nomd"]);
  const chosen = chooseLayer(layers, options.layer, source.name);
  try {
    const fgb = toFgb(folder, chosen);
    // GDAL writes not even a header for a layer without features.
    if (fgb.length === 0) throw withoutFeatures(chosen.name, source);
    return decodeLayer(fgb, source.name);
  } catch (cause) {
    if (!(cause instanceof GdalError)) throw cause;
    throw new UnreadableError(
      `Cannot read layer "${chosen.name}" of ${source.name} (${cause.message})`,
      { cause },
    );
  }
}
