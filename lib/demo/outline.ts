/**
 * Outlines of areas that are made of whole cells.
 *
 * @module
 */
import type { CellMesh } from "./cell_mesh.ts";

/** A place. */
export type Position = readonly [x: number, y: number];
/** A closed ring: the last position repeats the first. */
export type Ring = readonly Position[];
/** An outer ring, counterclockwise, and its holes, clockwise. */
export type Part = readonly Ring[];

/**
 * Parts of each area, the largest first. `areaOf` gives the area of each cell, -1 for none. Coordinates are
 * rounded to two decimals, once for each corner of the mesh, so neighbors share their border vertices exactly.
 * Three cells meet at a corner, so an outline never passes through one twice. Cost: one pass over the
 * sides.
 */
export function outlineAreas(mesh: CellMesh, areaOf: Int32Array, areas: number): Part[][] {
  const sides = Array.from({ length: areas }, () => new Map<number, number>());
  for (let cell = 0; cell < mesh.count; cell++) {
    if (areaOf[cell] < 0) continue;
    for (let s = mesh.offsets[cell]; s < mesh.offsets[cell + 1]; s++) {
      if (areaOf[mesh.neighbors[s]] !== areaOf[cell]) {
        sides[areaOf[cell]].set(mesh.from[s], mesh.to[s]);
      }
    }
  }
  return sides.map((next) => toParts(chainRings(next).map((ring) => placeRing(mesh, ring))));
}

/** Rings of corner numbers, each starting at its first corner in the order of the sides. */
function chainRings(next: ReadonlyMap<number, number>): number[][] {
  const left = new Map(next);
  const rings: number[][] = [];
  for (const start of next.keys()) {
    const ring: number[] = [];
    for (let corner = start; left.has(corner);) {
      ring.push(corner);
      const following = left.get(corner)!;
      left.delete(corner);
      corner = following;
    }
    if (ring.length > 0) rings.push(ring);
  }
  return rings;
}

/** Positions of a ring, closed; corners that round to the same place are written once. */
function placeRing({ corners }: CellMesh, ring: readonly number[]): Ring {
  const placed: Position[] = [];
  for (const corner of [...ring, ring[0]]) {
    const x = round2(corners[2 * corner]), y = round2(corners[2 * corner + 1]);
    const last = placed.at(-1);
    if (last === undefined || last[0] !== x || last[1] !== y) placed.push([x, y]);
  }
  return placed;
}

function round2(value: number): number {
  return Math.round(value * 100) / 100;
}

/** Sorts rings into outer ones and holes. All rings run in one sense, so a hole shows by its sign. */
function toParts(rings: readonly Ring[]): Part[] {
  const sized = rings.map((ring) => ({ ring, area: signedArea(ring) }));
  sized.sort((a, b) => Math.abs(b.area) - Math.abs(a.area));
  const outward = Math.sign(sized[0].area);
  const turn = (ring: Ring) => outward > 0 ? ring : [...ring].reverse();
  const parts = sized.filter(({ area }) => area * outward > 0).map(({ ring }) => [turn(ring)]);
  for (const { ring, area } of sized) {
    if (area * outward > 0) continue;
    parts.find(([outer]) => contains(outer, ring[0]))!.push(turn(ring));
  }
  return parts;
}

/** Area of a ring: positive when it runs counterclockwise. */
export function signedArea(ring: Ring): number {
  const [x0, y0] = ring[0];
  let twice = 0;
  for (let i = 1; i < ring.length; i++) {
    const [ax, ay] = ring[i - 1], [bx, by] = ring[i];
    twice += (ax - x0) * (by - y0) - (bx - x0) * (ay - y0);
  }
  return twice / 2;
}

/** Whether a place lies inside a ring, by counting the sides to its right. */
function contains(ring: Ring, [x, y]: Position): boolean {
  let inside = false;
  for (let i = 1; i < ring.length; i++) {
    const [ax, ay] = ring[i - 1], [bx, by] = ring[i];
    if (ay > y !== by > y && x < ax + (y - ay) / (by - ay) * (bx - ax)) inside = !inside;
  }
  return inside;
}
