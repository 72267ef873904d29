/**
 * Reference cases and data that the numbers are checked against: `testdata/` holds each with source and license.
 *
 * @module
 */
import { readFileSync } from "node:fs";
import type { Weights } from "../../lib/weights/weights.ts";

/** A reference case; `inputs` and `expected` differ from case to case, so they are read as they are. */
export interface ReferenceCase {
  readonly id: string;
  // deno-lint-ignore no-explicit-any
  readonly inputs: any;
  // deno-lint-ignore no-explicit-any
  readonly expected: any;
  readonly source: string;
}

/** The case `testdata/cases/ID.json`. */
export function referenceCase(id: string): ReferenceCase {
  return JSON.parse(
    readFileSync(new URL(`../../testdata/cases/${id}.json`, import.meta.url), "utf8"),
  );
}

/** Text of `testdata/data/FILE`. */
export function referenceText(file: string): string {
  return readFileSync(new URL(`../../testdata/data/${file}`, import.meta.url), "utf8");
}

/** A comma-separated file without quotes: the column `name` as text. */
export function textColumn(file: string, name: string): string[] {
  const [head, ...rows] = referenceText(file).trim().split(/\r?\n/).map((line) => line.split(","));
  const at = head.indexOf(name);
  if (at < 0) throw new Error(`${file} has no column ${name}`);
  return rows.map((row) => row[at]);
}

/** The column `name` as numbers. */
export function numberColumn(file: string, name: string): Float64Array {
  return Float64Array.from(textColumn(file, name), Number);
}

/** Weights from a full matrix; zeros are no links. */
export function weightsOfMatrix(matrix: readonly (readonly number[])[]): Weights {
  const offsets = [0], indices: number[] = [], values: number[] = [];
  for (const row of matrix) {
    row.forEach((weight, j) => {
      if (weight !== 0) {
        indices.push(j);
        values.push(weight);
      }
    });
    offsets.push(indices.length);
  }
  return {
    offsets: Uint32Array.from(offsets),
    indices: Uint32Array.from(indices),
    values: Float64Array.from(values),
    equalInRows: matrix.every((row) => new Set(row.filter((weight) => weight !== 0)).size <= 1),
  };
}

/** The same weights divided by their row's sum. */
export function rowStandardized(weights: Weights): Weights {
  const values = weights.values.slice();
  for (let i = 0; i + 1 < weights.offsets.length; i++) {
    const row = values.subarray(weights.offsets[i], weights.offsets[i + 1]);
    const sum = row.reduce((total, weight) => total + weight, 0);
    row.forEach((weight, e) => row[e] = weight / sum);
  }
  return { ...weights, values };
}

/** A neighbor list as weights of 1, areas in the order of `ids`. */
export function weightsOfLists(ids: readonly string[], lists: Record<string, string[]>): Weights {
  const place = new Map(ids.map((id, i) => [id, i]));
  const matrix = ids.map((id) => {
    const row = new Array<number>(ids.length).fill(0);
    for (const other of lists[id] ?? []) row[place.get(other)!] = 1;
    return row;
  });
  return weightsOfMatrix(matrix);
}

/** A neighbor-list file of `testdata/data` as weights of 1, areas in the order of `ids` (the file's by default). */
export function weightsOfListFile(file: string, ids?: readonly string[]): Weights {
  const { ids: order, neighbours } = JSON.parse(referenceText(file));
  return weightsOfLists(ids ?? order, neighbours);
}
