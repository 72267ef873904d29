/**
 * A layer that GDAL opened, as FlatGeobuf bytes in the order of its rows.
 *
 * @module
 */
import type { Layer } from "../layer/layer.ts";
import type { GdalFolder } from "./gdal_folder.ts";
import type { OpenedLayer } from "./opened_layers.ts";

/** Converts a layer. Throws `GdalCrash` where a polygon is empty, a fault of GDAL's writer. */
export function layerToFgb(folder: GdalFolder, layer: OpenedLayer): Uint8Array {
  const args = [...writerArgs(layer.name), ...typeArgs(folder, layer), layer.ownName];
  folder.translate(layer.dataset, "layer.fgb", { args });
  return folder.take("layer.fgb");
}

/**
 * Converts a layer and makes its empty geometries null on the way, by a GeoPackage in memory, where GDAL
 * offers SQL for it. About three times the cost of {@link layerToFgb}.
 */
export function cleanedLayerToFgb(folder: GdalFolder, layer: OpenedLayer): Uint8Array {
  const types = typeArgs(folder, layer);
  // Names that no field of a user has, as a GeoPackage keeps both among the fields.
  const columns = ["-lco", "FID=nearkin_fid", "-lco", "GEOMETRY_NAME=nearkin_geometry"];
  folder.translate(layer.dataset, "cleaned.gpkg", {
    args: ["-f", "GPKG", "-nln", "cleaned", ...columns, ...types, layer.ownName],
  });
  const dataset = folder.open("cleaned.gpkg", { update: true });
  const empty = "UPDATE cleaned SET nearkin_geometry = NULL WHERE ST_IsEmpty(nearkin_geometry)";
  folder.info(dataset, ["-sql", empty]);
  folder.translate(dataset, "cleaned.fgb", {
    args: [...writerArgs(layer.name), ...types, "cleaned"],
  });
  return folder.take("cleaned.fgb");
}

/**
 * Whether a layer has a point at exactly (0, 0), which GDAL's writer makes of an empty point, too.
 * Cost: one pass over the points.
 */
export function mayHideEmptyPoint({ geometry }: Layer): boolean {
  const { kinds, partStarts, ringStarts, vertexStarts, xy } = geometry;
  for (let row = 0; row < kinds.length; row++) {
    if (kinds[row] !== 1) continue;
    for (let part = partStarts[row]; part < partStarts[row + 1]; part++) {
      const vertex = vertexStarts[ringStarts[part]];
      if (xy[2 * vertex] === 0 && xy[2 * vertex + 1] === 0) return true;
    }
  }
  return false;
}

function writerArgs(name: string): string[] {
  return ["-f", "FlatGeobuf", "-lco", "SPATIAL_INDEX=NO", "-nln", name];
}

/** FlatGeobuf has no list fields, and takes several geometry types only where none is declared. */
function typeArgs(folder: GdalFolder, layer: OpenedLayer): string[] {
  const lists = ["IntegerList", "Integer64List", "RealList", "StringList"];
  return [
    ...["-nlt", `GEOMETRY${dimensionsOf(folder, layer)}`, "-nlt", "CONVERT_TO_LINEAR"],
    ...["-mapFieldType", lists.map((type) => `${type}=String`).join(",")],
  ];
}

/** `Z`, `M` or `ZM`: what is not declared would be dropped. */
function dimensionsOf(folder: GdalFolder, { dataset, ownName, geometry }: OpenedLayer): string {
  const declared = /(ZM|Z|M)$/.exec(geometry ?? "")?.[1];
  if (declared !== undefined) return declared;
  const mixed = geometry === "Geometry" || geometry === "GeometryCollection";
  return mixed && startsWithHeights(folder, dataset, ownName) ? "Z" : "";
}

/** Where types are mixed, GDAL often does not declare heights: look whether an early feature has one. */
function startsWithHeights(folder: GdalFolder, dataset: number, layer: string): boolean {
  const sql = `SELECT * FROM "${layer.replaceAll('"', '""')}" LIMIT 10`;
  const info = folder.info(dataset, ["-features", "-nomd", "-sql", sql]) as {
    layers: { features?: { geometry: unknown }[] }[];
  };
  const features = info.layers.at(0)?.features ?? [];
  return features.some((feature) => hasHeight(feature.geometry));
}

function hasHeight(geometry: unknown): boolean {
  if (Array.isArray(geometry)) {
    return typeof geometry[0] === "number" ? geometry.length > 2 : geometry.some(hasHeight);
  }
  if (geometry === null || typeof geometry !== "object") return false;
  return Object.entries(geometry).some(([key, value]) => key !== "type" && hasHeight(value));
}
