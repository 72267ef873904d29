/**
 * Invented regions of ragged hexagons with shared borders, any size, made in a moment.
 *
 * @module
 */
import type { FlatGeometry } from "../../lib/layer/geometry.ts";
import type { Topology } from "../../lib/neighbors/topology.ts";

/** A region of `n` areas, each one polygon. */
export interface HexRegion {
  readonly geometry: FlatGeometry;
  /** Areas that share a side. */
  readonly topology: Topology;
  /** Middle of each area as shares of the lattice's sides, u to the east and v to the north. */
  readonly places: readonly (readonly [u: number, v: number])[];
}

/** How a region is made. */
export interface HexOptions {
  readonly columns: number;
  readonly rows: number;
  /** Whether there is land at a place. @default everywhere */
  readonly isLand?: (u: number, v: number) => boolean;
  /** Distance between neighbors in layer units. @default 1000 */
  readonly size?: number;
  /** Halvings of every side, each bent aside. @default 2 */
  readonly bends?: number;
}

type Point = readonly [x: number, y: number];

/** From the middle of a cell to its corners and to its neighbors, in half columns and half rows of the lattice. */
const CORNERS: readonly Point[] = [[0, 2], [-1, 1], [-1, -1], [0, -2], [1, -1], [1, 1]];
const NEIGHBORS: readonly Point[] = [[-2, 0], [-1, -3], [1, -3], [2, 0], [1, 3], [-1, 3]];

/** Makes a region. The same options give the same region. */
export function hexRegion(options: HexOptions): HexRegion {
  const { columns, rows, isLand = () => true, size = 1000, bends = 2 } = options;
  const cells: Point[] = [];
  const numbers = new Map<string, number>();
  const places: [number, number][] = [];
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const place: [number, number] = [(column + 0.5) / columns, (row + 0.5) / rows];
      if (!isLand(...place)) continue;
      const cell: Point = [2 * column + row % 2, 3 * row];
      numbers.set(String(cell), cells.length);
      cells.push(cell);
      places.push(place);
    }
  }
  return {
    geometry: polygons(cells.map((cell) => outline(cell, size, bends))),
    topology: sharedSides(cells, numbers),
    places,
  };
}

function sharedSides(cells: readonly Point[], numbers: ReadonlyMap<string, number>): Topology {
  const offsets = [0], indices: number[] = [];
  for (const [x, y] of cells) {
    const found = NEIGHBORS.map(([dx, dy]) => numbers.get(String([x + dx, y + dy])))
      .filter((number) => number !== undefined);
    indices.push(...found.sort((a, b) => a - b));
    offsets.push(indices.length);
  }
  return { offsets: Uint32Array.from(offsets), indices: Uint32Array.from(indices) };
}

/** Coordinates of a closed ring whose corners and bends are those of the neighbors too. */
function outline([x, y]: Point, size: number, bends: number): number[] {
  const unit = size / 2;
  const corners = CORNERS.map(([dx, dy]): Point => {
    const cx = x + dx, cy = y + dy;
    return [
      unit * (cx + 0.7 * (chance(cx, cy) - 0.5)),
      unit * (cy / Math.sqrt(3) + 0.7 * (chance(cy, cx + 0.5) - 0.5)),
    ];
  });
  const ring: number[] = [];
  corners.forEach((from, i) => addSide(ring, from, corners[(i + 1) % 6], bends));
  ring.push(ring[0], ring[1]);
  return ring;
}

/** Adds a side but for its end: its middle moved aside, and so on for its halves; the same from both ends. */
function addSide(ring: number[], from: Point, to: Point, bends: number): void {
  if (bends === 0) {
    ring.push(from[0], from[1]);
    return;
  }
  const dx = to[0] - from[0], dy = to[1] - from[1];
  const middleX = (from[0] + to[0]) / 2, middleY = (from[1] + to[1]) / 2;
  // Seen from the other end the side runs backward, so the sign of its direction must not matter.
  const side = dx > 0 || (dx === 0 && dy > 0) ? 1 : -1;
  const aside = 0.3 * side * (chance(Math.round(middleX), Math.round(middleY)) - 0.5);
  const middle: Point = [middleX - aside * dy, middleY + aside * dx];
  addSide(ring, from, middle, bends - 1);
  addSide(ring, middle, to, bends - 1);
}

function polygons(rings: readonly (readonly number[])[]): FlatGeometry {
  const steps = Uint32Array.from({ length: rings.length + 1 }, (_, i) => i);
  const vertexStarts = new Uint32Array(rings.length + 1);
  rings.forEach((ring, i) => vertexStarts[i + 1] = vertexStarts[i] + ring.length / 2);
  const xy = new Float64Array(2 * vertexStarts[rings.length]);
  rings.forEach((ring, i) => xy.set(ring, 2 * vertexStarts[i]));
  return {
    kinds: new Uint8Array(rings.length).fill(3),
    partStarts: steps,
    ringStarts: steps,
    vertexStarts,
    xy,
  };
}

/** A number from 0 to 1 that belongs to a place. */
function chance(x: number, y: number): number {
  const mixed = Math.imul(Math.round(2 * x) + 7919 * Math.round(2 * y), 0x9e3779b1);
  return (Math.imul(mixed ^ (mixed >>> 15), 0x85ebca6b) >>> 8) / 2 ** 24;
}
