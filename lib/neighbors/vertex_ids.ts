/**
 * Which vertices of a layer are the same place.
 *
 * @module
 */
import { joinSets, rootOf, singleSets } from "./disjoint_sets.ts";

/** Places of vertices. */
export interface VertexIds {
  /** Place of each vertex, 0 … `count` - 1; equal for vertices within the tolerance of each other. */
  readonly ids: Uint32Array;
  readonly count: number;
  /** The same by equality of the numbers alone; the same array when the tolerance joined nothing. */
  readonly exactIds: Uint32Array;
  readonly exactCount: number;
}

/** A cell of the hash holds this many tolerances a side, so that few vertices lie near its border. */
const CELL = 1024;

/**
 * Gives vertices at the same place the same number: first where x and y are equal, then where both
 * differ by at most `tolerance` (one after the other: a chain of near vertices is one place). Near pairs
 * across the border of a cell are found too, so the result does not depend on where cells lie, nor on
 * the order of the vertices.
 *
 * Cost: one hash look-up a vertex.
 *
 * @param xy x and y of each vertex.
 */
export function vertexIds(xy: Float64Array, tolerance: number): VertexIds {
  const n = xy.length / 2;
  const capacity = tableSize(n);
  const heads = new Int32Array(capacity).fill(-1);
  const exactIds = new Uint32Array(n);
  const next = new Int32Array(n), placed = new Float64Array(2 * n);
  const nearPairs: number[] = [];
  const perUnit = tolerance > 0 ? 1 / (CELL * tolerance) : 1;
  let count = 0;
  for (let v = 0; v < n; v++) {
    const x = xy[2 * v], y = xy[2 * v + 1];
    const column = Math.floor(x * perUnit), row = Math.floor(y * perUnit);
    const home = hashPair(column, row) & (capacity - 1);
    let same = heads[home];
    while (same >= 0 && (placed[2 * same] !== x || placed[2 * same + 1] !== y)) same = next[same];
    if (same >= 0) {
      exactIds[v] = same;
      continue;
    }
    joinNear(x, y);
    placed[2 * count] = x;
    placed[2 * count + 1] = y;
    next[count] = heads[home];
    heads[home] = count;
    exactIds[v] = count++;
  }
  return nearPairs.length === 0
    ? { ids: exactIds, count, exactIds, exactCount: count }
    : { ...joined(exactIds, count, nearPairs), exactIds, exactCount: count };

  /** Notes the places within the tolerance of a new one, looking over the borders it is near to. */
  function joinNear(x: number, y: number): void {
    const west = Math.floor((x - tolerance) * perUnit);
    const east = Math.floor((x + tolerance) * perUnit);
    const south = Math.floor((y - tolerance) * perUnit);
    const north = Math.floor((y + tolerance) * perUnit);
    for (let c = west; c <= east; c++) {
      for (let r = south; r <= north; r++) {
        let place = heads[hashPair(c, r) & (capacity - 1)];
        for (; place >= 0; place = next[place]) {
          const dx = Math.abs(placed[2 * place] - x);
          const dy = Math.abs(placed[2 * place + 1] - y);
          if (dx <= tolerance && dy <= tolerance) nearPairs.push(place, count);
        }
      }
    }
  }
}

function joined(
  exactIds: Uint32Array,
  exactCount: number,
  pairs: readonly number[],
): { ids: Uint32Array; count: number } {
  const parents = singleSets(exactCount);
  for (let p = 0; p < pairs.length; p += 2) joinSets(parents, pairs[p], pairs[p + 1]);
  const numbers = new Int32Array(exactCount).fill(-1);
  let count = 0;
  const ids = exactIds.map((id) => {
    const root = rootOf(parents, id);
    if (numbers[root] < 0) numbers[root] = count++;
    return numbers[root];
  });
  return { ids, count };
}

/** The power of two at least twice `n`. */
export function tableSize(n: number): number {
  let size = 16;
  while (size < 2 * n) size *= 2;
  return size;
}

/** Mixes two whole numbers of any size into 32 bits. */
export function hashPair(a: number, b: number): number {
  let hash = Math.imul(a, 0x9e3779b1) ^ Math.imul(b, 0x85ebca77);
  hash = Math.imul(hash ^ (hash >>> 15), 0x2c1b3c6d);
  hash = Math.imul(hash ^ (hash >>> 12), 0x297a2d39);
  return hash ^ (hash >>> 15);
}
