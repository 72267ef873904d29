/**
 * The layers that benchmarks read, made once and kept in `bench-data/`.
 *
 * @module
 */
import { spawnSync } from "node:child_process";
import { closeSync, existsSync, mkdirSync, openSync, renameSync, rmSync, writeSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { voronoiFeatures } from "../support/make_voronoi.ts";

const FOLDER = fileURLToPath(new URL("../../bench-data/", import.meta.url));

/** Path of a GeoPackage of columns × rows Voronoi polygons, written by the native ogr2ogr where missing. */
export function benchLayer(columns: number, rows: number): string {
  const path = `${FOLDER}voronoi-${columns * rows}.gpkg`;
  if (existsSync(path)) return path;
  mkdirSync(FOLDER, { recursive: true });
  const text = `${FOLDER}voronoi-${columns * rows}.geojsonl`;
  const half = `${FOLDER}half-${columns * rows}.gpkg`;
  writeLines(text, voronoiFeatures(columns, rows));
  const args = ["-overwrite", "-f", "GPKG", "-nln", "zones", half, text];
  const { status, stderr, error } = spawnSync("ogr2ogr", args, { encoding: "utf8" });
  if (status !== 0) {
    throw new Error(
      `Cannot make ${path} with ogr2ogr (Debian gdal-bin): ${error?.message ?? stderr}`,
    );
  }
  renameSync(half, path);
  rmSync(text);
  return path;
}

function writeLines(path: string, lines: Iterable<string>): void {
  const file = openSync(path, "w");
  for (const line of lines) writeSync(file, line);
  closeSync(file);
}
