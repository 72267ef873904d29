/**
 * Topologies in forms that are easy to compare, and slow obvious ways to make them.
 *
 * @module
 */
import assert from "node:assert/strict";
import type { Topology } from "../../lib/neighbors/topology.ts";
import { randomNumbers } from "./maps.ts";

/** Rows of neighbors as plain lists. */
export function rowsOf({ offsets, indices }: Topology): number[][] {
  return Array.from(
    { length: offsets.length - 1 },
    (_, i) => [...indices.subarray(offsets[i], offsets[i + 1])],
  );
}

/** A topology from lists of neighbors. */
export function topologyOfRows(rows: readonly (readonly number[])[]): Topology {
  const offsets = [0];
  for (const row of rows) offsets.push(offsets.at(-1)! + row.length);
  const sorted = rows.flatMap((row) => row.toSorted((a, b) => a - b));
  return { offsets: Uint32Array.from(offsets), indices: Uint32Array.from(sorted) };
}

/** The topology in which i chooses j when `links(i, j)`: every pair is asked. */
export function topologyWhere(count: number, links: (i: number, j: number) => boolean): Topology {
  const everybody = Array.from({ length: count }, (_, i) => i);
  return topologyOfRows(everybody.map((i) => everybody.filter((j) => j !== i && links(i, j))));
}

/** Unordered pairs, each as its two names in order, sorted: `A-B`. */
export function pairNames(topology: Topology, names: readonly string[]): string[] {
  const pairs = rowsOf(topology).flatMap((row, i) => row.map((j) => pairName(names[i], names[j])));
  return [...new Set(pairs)].sort();
}

/** One unordered pair as text. */
export function pairName(one: string, other: string): string {
  return [one, other].sort().join("-");
}

/** Pairs of a reference case as text, sorted. */
export function namedPairs(pairs: readonly (readonly (string | number)[])[]): string[] {
  return pairs.map(([one, other]) => pairName(String(one), String(other))).sort();
}

/** The numbers 0 … count - 1 as names. */
export function numberNames(count: number): string[] {
  return Array.from({ length: count }, (_, i) => String(i));
}

/** Checks what every topology promises: rows ascend, no area is its own neighbor, positions exist. */
export function assertSound({ offsets, indices }: Topology): void {
  const n = offsets.length - 1;
  assert.equal(offsets[0], 0);
  assert.equal(offsets[n], indices.length);
  rowsOf({ offsets, indices }).forEach((row, i) => {
    row.forEach((j, at) => {
      assert.ok(j < n && j !== i, `area ${i} has the neighbor ${j}`);
      assert.ok(at === 0 || row[at - 1] < j, `row ${i} does not ascend`);
    });
  });
}

/** A topology in which each directed link is there by chance. */
export function randomTopology(count: number, chance: number, seed: string): Topology {
  const draws = randomNumbers(count * count, seed);
  return topologyWhere(count, (i, j) => draws[i * count + j] < chance);
}

/** Points spread evenly over a square with sides of `side`, rounded to whole units if asked. */
export function randomPoints(
  count: number,
  seed: string,
  { side = 1000, whole = false } = {},
): Float64Array {
  return randomNumbers(2 * count, seed).map((u) => whole ? Math.floor(u * side) : u * side);
}

/** Mask of ones. */
export function everyone(count: number): Uint8Array {
  return new Uint8Array(count).fill(1);
}
