/**
 * Which cells of the mesh are land: one mainland with bays and lakes, islands off its coast, islets.
 *
 * @module
 */
import { type CellMesh, stepsFrom } from "./cell_mesh.ts";
import { pick, type Random } from "./chance.ts";
import { noiseField } from "./noise_field.ts";

/** A piece of land apart from the mainland. */
export interface Island {
  /** Its cells, the first one in the middle. */
  readonly cells: readonly number[];
  /** Areas it is divided into; 0 for an islet that belongs to an area of the mainland. */
  readonly areas: number;
}

/** The land of the region. */
export interface Land {
  readonly mainland: readonly number[];
  readonly islands: readonly Island[];
}

/** The islands to make: cells, and the areas they are divided into. */
const ISLANDS: readonly { readonly cells: number; readonly areas: number }[] = [
  { cells: 260, areas: 14 },
  { cells: 90, areas: 5 },
  { cells: 24, areas: 1 },
  { cells: 15, areas: 1 },
  { cells: 12, areas: 1 },
  { cells: 10, areas: 1 },
  { cells: 7, areas: 1 },
  { cells: 5, areas: 0 },
  { cells: 4, areas: 0 },
  { cells: 4, areas: 0 },
  { cells: 3, areas: 0 },
];

/** A lake in open country, as shares of the frame's sides. */
const LAKE = { u: 0.8, v: 0.46, radius: 0.018 } as const;

/** Number of areas that lie on islands. */
export const ISLAND_AREAS: number = ISLANDS.reduce((sum, island) => sum + island.areas, 0);

/**
 * Land on the mesh, whose points lie in the box [0, width] × [0, height]. The mainland is the largest
 * connected piece of raised ground; between any two pieces lies at least one cell of sea.
 */
export function drawLand(
  mesh: CellMesh,
  random: Random,
  box: { readonly width: number; readonly height: number },
): Land {
  const mainland = largestPiece(mesh, raisedGround(mesh, random, box));
  const isLand = new Uint8Array(mesh.count);
  for (const cell of mainland) isLand[cell] = 1;
  const islands = ISLANDS.map(({ cells, areas }) => {
    const island = raiseIsland(mesh, isLand, cells, random);
    for (const cell of island) isLand[cell] = 1;
    return { cells: island, areas };
  });
  return { mainland, islands };
}

/** 1 for cells above the sea: a rounded block east of the middle, its coast shaped by noise. */
function raisedGround(
  mesh: CellMesh,
  random: Random,
  { width, height }: { readonly width: number; readonly height: number },
): Uint8Array {
  const noise = noiseField(random, 6, 4);
  const inFrame = stepsFrom(mesh, mesh.open);
  const raised = new Uint8Array(mesh.count);
  for (let cell = 0; cell < mesh.count; cell++) {
    const u = mesh.points[2 * cell] / width, v = mesh.points[2 * cell + 1] / height;
    const across = (u - 0.58) / 0.34, up = (v - 0.5) / 0.42;
    const block = 1 - across * across * across * across - up * up * up * up;
    const inLake = (u - LAKE.u) ** 2 + (v - LAKE.v) ** 2 < LAKE.radius ** 2;
    const mayRise = inFrame[cell] >= 2 && block > -0.9 && !inLake;
    raised[cell] = mayRise && block + 1.9 * noise(u, v) > 0 ? 1 : 0;
  }
  return raised;
}

/** Cells of the largest connected piece of the cells with a 1. */
function largestPiece(mesh: CellMesh, within: Uint8Array): number[] {
  const left = within.slice();
  let largest: number[] = [];
  for (let cell = 0; cell < mesh.count; cell++) {
    if (left[cell] === 0) continue;
    const piece = takePiece(mesh, left, cell);
    if (piece.length > largest.length) largest = piece;
  }
  return largest;
}

/** Cells connected to `start`, which are struck out of `left`. */
function takePiece(mesh: CellMesh, left: Uint8Array, start: number): number[] {
  const piece = [start];
  left[start] = 0;
  for (let head = 0; head < piece.length; head++) {
    for (let s = mesh.offsets[piece[head]]; s < mesh.offsets[piece[head] + 1]; s++) {
      const next = mesh.neighbors[s];
      if (left[next] === 1) left[next] = 0, piece.push(next);
    }
  }
  return piece;
}

/** A new island of `size` cells off the land there is, the nearer to its middle the better. */
function raiseIsland(
  mesh: CellMesh,
  isLand: Uint8Array,
  size: number,
  random: Random,
): number[] {
  const offshore = stepsFrom(mesh, isLand);
  const inFrame = stepsFrom(mesh, mesh.open);
  const radius = Math.ceil(Math.sqrt(size / 3));
  const sites: number[] = [];
  for (let cell = 0; cell < mesh.count; cell++) {
    const off = offshore[cell] - radius;
    if (off >= 2 && off <= 6 && inFrame[cell] > radius + 1) sites.push(cell);
  }
  const start = sites[pick(random, sites.length)];
  const reach = Float64Array.from({ length: mesh.count }, (_, cell) => {
    if (offshore[cell] < 2 || inFrame[cell] < 2) return Infinity;
    return distance2(mesh, cell, start) * (0.7 + 0.6 * random());
  });
  return growIsland(mesh, start, size, reach);
}

/** The `size` connected cells around `start` that are reached first; those at Infinity never are. */
function growIsland(
  mesh: CellMesh,
  start: number,
  size: number,
  reach: Float64Array,
): number[] {
  const island: number[] = [];
  const seen = new Set([start]);
  const shore = [start];
  while (island.length < size && shore.length > 0) {
    let nearest = 0;
    for (let i = 1; i < shore.length; i++) if (reach[shore[i]] < reach[shore[nearest]]) nearest = i;
    const [cell] = shore.splice(nearest, 1);
    island.push(cell);
    for (let s = mesh.offsets[cell]; s < mesh.offsets[cell + 1]; s++) {
      const next = mesh.neighbors[s];
      if (!seen.has(next) && reach[next] < Infinity) seen.add(next), shore.push(next);
    }
  }
  return island;
}

/** Squared distance between the points of two cells. */
export function distance2({ points }: CellMesh, a: number, b: number): number {
  const dx = points[2 * a] - points[2 * b], dy = points[2 * a + 1] - points[2 * b + 1];
  return dx * dx + dy * dy;
}
