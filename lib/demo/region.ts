/**
 * An invented region to try nearkin on: nothing in it exists, and it lies in open sea.
 *
 * About everything that makes real small-area data awkward is in it: islands, parts, a ragged coast, codes with leading
 * zeros, letters beyond ASCII, small and large populations, suppressed and missing values.
 *
 * @module
 */
import { carveAreas } from "./carve_areas.ts";
import { type CellMesh, voronoiMesh } from "./cell_mesh.ts";
import { type Random, shuffled, stream } from "./chance.ts";
import { indicatorTable, type RegionArea } from "./indicator_table.ts";
import { drawLand, ISLAND_AREAS } from "./land.ts";
import { noiseField } from "./noise_field.ts";
import { outlineAreas, type Part } from "./outline.ts";
import { placeNames } from "./place_names.ts";
import { type PlantedAreas, plantFigures } from "./plant.ts";

/** Codes of the areas in which something was planted. */
export interface Planted {
  /** High areas whose neighbors are high as well, but for the outlier among them. */
  readonly high: readonly string[];
  /** Low areas whose neighbors are low as well, but for the outlier among them. */
  readonly low: readonly string[];
  /** High areas amid low ones. */
  readonly highAmongLow: readonly string[];
  /** Low areas amid high ones. */
  readonly lowAmongHigh: readonly string[];
}

/** A GeoJSON feature of the region. */
export interface RegionFeature {
  readonly type: "Feature";
  readonly properties: { readonly code: string; readonly name: string };
  readonly geometry: { readonly type: "MultiPolygon"; readonly coordinates: readonly Part[] };
}

/** A GeoJSON layer with the older `crs` member, which says that its coordinates are meters. */
export interface RegionLayer {
  readonly type: "FeatureCollection";
  readonly name: string;
  readonly crs: { readonly type: "name"; readonly properties: { readonly name: string } };
  readonly features: readonly RegionFeature[];
}

/** An invented region: its layer, its table and what was planted in it. */
export interface InventedRegion {
  /** Areas ascending by code, with the properties `code` and `name`. */
  readonly geojson: RegionLayer;
  /** ETRS89 / UTM zone 29N; the place is open sea in the Atlantic. */
  readonly crs: "EPSG:25829";
  /** CSV with `;` between cells and a decimal comma: code, name, dwellings, damp, damp_rate. */
  readonly table: string;
  /** The rows of the table, parallel to the features. */
  readonly areas: readonly RegionArea[];
  /** What a good tool must find. */
  readonly planted: Planted;
}

/** Columns and rows of cells, the meters between them, and the southwest corner. */
const FRAME = { columns: 104, rows: 128, spacing: 1600, west: 260_000, south: 4_960_000 } as const;
const WIDTH = FRAME.columns * FRAME.spacing;
const HEIGHT = FRAME.rows * FRAME.spacing;
/** Areas of the whole region. */
const AREAS = 400;
/** Middles of the planted clusters, as shares of the frame's sides. */
const CLUSTERS = { high: { u: 0.62, v: 0.7 }, low: { u: 0.56, v: 0.28 } } as const;

/**
 * Makes the region: 400 areas, of them 24 on seven islands, five of which are one area without a neighbor.
 *
 * The indicator is damp dwellings per 1,000. Planted are a cluster of high areas with one low area in its
 * middle, and a cluster of low areas with one high area in its middle. The same seed gives the same
 * text in every engine. Takes about 0.2 s.
 *
 * @example
 * ```ts
 * import { inventedRegion } from "./region.ts";
 * import assert from "node:assert/strict";
 * assert.equal(inventedRegion().geojson.features.length, 400);
 * ```
 */
export function inventedRegion(
  { seed = "nearkin" }: { readonly seed?: string } = {},
): InventedRegion {
  const { mesh, areaOf, middles } = drawMap(seed);
  const neighbors = areaNeighbors(mesh, areaOf);
  const { figures, planted } = plantFigures(neighbors, middles, stream(`${seed} figures`));
  const names = placeNames(AREAS, stream(`${seed} names`));
  const areas = figures.map((known, area) => ({ code: codeOf(area), name: names[area], ...known }));
  const parts = outlineAreas(mesh, areaOf, AREAS);
  return {
    geojson: toLayer(areas.map((area, i) => toFeature(area, parts[i]))),
    crs: "EPSG:25829",
    table: indicatorTable(areas),
    areas,
    planted: toCodes(planted),
  };
}

/**
 * The same areas with their figures, marks included, dealt out anew: nothing is planted in it any
 * more, and a tool that finds a cluster there is wrong.
 */
export function shuffledTwin(
  region: InventedRegion,
  { seed = "twin" }: { readonly seed?: string } = {},
): InventedRegion {
  const dealt = shuffled(region.areas, stream(seed));
  const areas = region.areas.map(({ code, name }, area) => ({ ...dealt[area], code, name }));
  const planted = { high: [], low: [], highAmongLow: [], lowAmongHigh: [] };
  return { ...region, areas, table: indicatorTable(areas), planted };
}

/** Cells, the area of each, and the areas in the middle of the clusters to plant. */
function drawMap(seed: string): {
  mesh: CellMesh;
  areaOf: Int32Array;
  middles: { high: number; low: number };
} {
  const mesh = voronoiMesh(cellPoints(stream(`${seed} cells`)));
  const land = drawLand(mesh, stream(`${seed} land`), { width: WIDTH, height: HEIGHT });
  const towns = noiseField(stream(`${seed} towns`), 4, 2);
  const areaOf = carveAreas(mesh, land, {
    mainlandAreas: AREAS - ISLAND_AREAS,
    density: (cell) => {
      const crowd = towns(mesh.points[2 * cell] / WIDTH, mesh.points[2 * cell + 1] / HEIGHT);
      return Math.max(-1, Math.min(1, 2 * crowd));
    },
    random: stream(`${seed} seats`),
  });
  const areaAt = ({ u, v }: { u: number; v: number }) =>
    areaOf[nearestOn(mesh, land.mainland, u * WIDTH, v * HEIGHT)];
  return { mesh, areaOf, middles: { high: areaAt(CLUSTERS.high), low: areaAt(CLUSTERS.low) } };
}

/** Points of the cells: a square lattice, each point moved at random by up to 0.45 of the spacing. */
function cellPoints(random: Random): Float64Array {
  const points = new Float64Array(2 * FRAME.columns * FRAME.rows);
  let next = 0;
  for (let row = 0; row < FRAME.rows; row++) {
    for (let column = 0; column < FRAME.columns; column++) {
      points[next++] = (column + 0.05 + 0.9 * random()) * FRAME.spacing;
      points[next++] = (row + 0.05 + 0.9 * random()) * FRAME.spacing;
    }
  }
  return points;
}

/** The cell of `cells` nearest to a place. */
function nearestOn(mesh: CellMesh, cells: readonly number[], x: number, y: number): number {
  const distance2 = (cell: number) =>
    (mesh.points[2 * cell] - x) ** 2 + (mesh.points[2 * cell + 1] - y) ** 2;
  return cells.reduce((best, cell) => distance2(cell) < distance2(best) ? cell : best);
}

/** Areas that share a side with each area, ascending. */
function areaNeighbors(mesh: CellMesh, areaOf: Int32Array): number[][] {
  const sets = Array.from({ length: AREAS }, () => new Set<number>());
  for (let cell = 0; cell < mesh.count; cell++) {
    for (let s = mesh.offsets[cell]; s < mesh.offsets[cell + 1]; s++) {
      const here = areaOf[cell], there = areaOf[mesh.neighbors[s]];
      if (here >= 0 && there >= 0 && here !== there) sets[here].add(there);
    }
  }
  return sets.map((set) => [...set].sort((a, b) => a - b));
}

/** Code of an area by its number: 0017, 0020, …, 1214. */
function codeOf(area: number): string {
  return String(17 + 3 * area).padStart(4, "0");
}

function toCodes({ high, low, highAmongLow, lowAmongHigh }: PlantedAreas): Planted {
  return {
    high: high.map(codeOf),
    low: low.map(codeOf),
    highAmongLow: [codeOf(highAmongLow)],
    lowAmongHigh: [codeOf(lowAmongHigh)],
  };
}

function toLayer(features: readonly RegionFeature[]): RegionLayer {
  const crs = { type: "name", properties: { name: "urn:ogc:def:crs:EPSG::25829" } } as const;
  return { type: "FeatureCollection", name: "region", crs, features };
}

/** The area as a feature, moved from the frame to its place in open sea. */
function toFeature({ code, name }: RegionArea, parts: readonly Part[]): RegionFeature {
  const place = (value: number, origin: number) => Math.round((value + origin) * 100) / 100;
  const coordinates = parts.map((part) =>
    part.map((ring) => ring.map(([x, y]) => [place(x, FRAME.west), place(y, FRAME.south)] as const))
  );
  const geometry = { type: "MultiPolygon", coordinates } as const;
  return { type: "Feature", properties: { code, name }, geometry };
}
