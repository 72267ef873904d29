/**
 * Small maps and values made up for tests, the same every time.
 *
 * @module
 */
import { seedFromText } from "../../lib/inference/seed.ts";
import { drawUniform, openStream } from "../../lib/inference/stream.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { weightsOfMatrix } from "./reference.ts";

/** How the cells of a grid touch; `torus` joins opposite borders. */
export interface GridOptions {
  readonly corners?: boolean;
  readonly torus?: boolean;
}

/** Weights of 1 between touching cells of a grid, cells row by row. */
export function gridWeights(rows: number, columns: number, options: GridOptions = {}): Weights {
  const steps = [[0, 1], [1, 0], [0, -1], [-1, 0]];
  if (options.corners) steps.push([1, 1], [1, -1], [-1, 1], [-1, -1]);
  const offsets = [0], indices: number[] = [];
  for (let r = 0; r < rows; r++) {
    for (let c = 0; c < columns; c++) {
      const neighbors = steps.map(([down, right]) => {
        const [y, x] = [r + down, c + right];
        if (options.torus) return (y + rows) % rows * columns + (x + columns) % columns;
        return y < 0 || x < 0 || y >= rows || x >= columns ? -1 : y * columns + x;
      });
      indices.push(...neighbors.filter((j) => j >= 0).sort((a, b) => a - b));
      offsets.push(indices.length);
    }
  }
  return {
    offsets: Uint32Array.from(offsets),
    indices: Uint32Array.from(indices),
    values: new Float64Array(indices.length).fill(1),
    equalInRows: true,
  };
}

/** Areas in a row, each touching the next, weights of 1. */
export function chainWeights(n: number): Weights {
  return gridWeights(1, n);
}

/** Everybody is everybody's neighbor, weights of 1. */
export function completeWeights(n: number): Weights {
  return weightsOfMatrix(
    Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => i === j ? 0 : 1)),
  );
}

/** The same links with weights between 0.1 and 1.1 that differ within a row. */
export function unequalWeights(weights: Weights, seed: string): Weights {
  return {
    ...weights,
    values: randomNumbers(weights.values.length, seed).map((u) => 0.1 + u),
    equalInRows: false,
  };
}

/** Uniform numbers in [0, 1). */
export function randomNumbers(count: number, seed: string): Float64Array {
  const stream = openStream(seedFromText(seed), "simulatedMap", 0);
  return Float64Array.from({ length: count }, () => drawUniform(stream));
}

/** Normal numbers by the method of Box and Muller. */
export function normalNumbers(count: number, seed: string): Float64Array {
  const uniform = randomNumbers(2 * count, seed);
  return Float64Array.from(
    { length: count },
    (_, i) =>
      Math.sqrt(-2 * Math.log(1 - uniform[2 * i])) * Math.cos(2 * Math.PI * uniform[2 * i + 1]),
  );
}

/** The four kinds of values on which engines differ: continuous, tied, mostly zero, skewed. */
export function awkwardValues(count: number): Record<string, Float64Array> {
  const normal = normalNumbers(count, "awkward");
  const uniform = randomNumbers(count, "awkward");
  return {
    continuous: normal,
    tied: uniform.map((u) => Math.floor(5 * u)),
    "mostly zero": uniform.map((u, i) => u < 0.8 ? 0 : Math.round(100 * Math.abs(normal[i])) / 100),
    skewed: normal.map((x) => Math.exp(1.5 * x)),
  };
}
