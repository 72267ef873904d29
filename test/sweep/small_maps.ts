/**
 * Small grids, their weights, Moran's I the slow way, and reproducible random numbers: what the sweep's
 * tests are made of.
 *
 * @module
 */
import type { Weights } from "../../lib/weights/weights.ts";

/** Weights of 1 between all areas i != j for which `linked(i, j)` holds. */
export function linkWeights(n: number, linked: (i: number, j: number) => boolean): Weights {
  const offsets = new Uint32Array(n + 1), indices: number[] = [];
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) if (i !== j && linked(i, j)) indices.push(j);
    offsets[i + 1] = indices.length;
  }
  return {
    offsets,
    indices: Uint32Array.from(indices),
    values: new Float64Array(indices.length).fill(1),
    equalInRows: true,
  };
}

/** Links of a grid with `columns` columns between cells at most `reach` apart (1 edge, 1.5 touching). */
export function gridWeights(rows: number, columns: number, reach: number): Weights {
  return linkWeights(rows * columns, (i, j) => {
    const down = Math.floor(i / columns) - Math.floor(j / columns);
    return Math.hypot(down, i % columns - j % columns) <= reach;
  });
}

/** Moran's I from its definition, by a double loop over pairs. */
export function slowMoran(values: ArrayLike<number>, weights: Weights): number {
  const x = Array.from(values);
  const mean = x.reduce((sum, value) => sum + value, 0) / x.length;
  const z = x.map((value) => value - mean);
  let products = 0, s0 = 0;
  for (let i = 0; i < x.length; i++) {
    for (let e = weights.offsets[i]; e < weights.offsets[i + 1]; e++) {
      products += weights.values[e] * z[i] * z[weights.indices[e]];
      s0 += weights.values[e];
    }
  }
  return x.length / s0 * products / z.reduce((sum, value) => sum + value * value, 0);
}

/** Uniform numbers in [0, 1) from a seed (a 32-bit mixing generator; good enough for tests). */
export function randomNumbers(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 16), 0x21f0aaad);
    mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
    return ((mixed ^ (mixed >>> 15)) >>> 0) / 2 ** 32;
  };
}

/** A copy in random order. */
export function shuffled(values: Float64Array, random: () => number): Float64Array {
  const copy = values.slice();
  for (let k = copy.length - 1; k > 0; k--) {
    const other = Math.floor(random() * (k + 1));
    [copy[k], copy[other]] = [copy[other], copy[k]];
  }
  return copy;
}

/** Statistics of every definition on the observed map and on `permutations` shared shuffles of it. */
export function sharedStatistics(
  values: Float64Array,
  definitions: readonly Weights[],
  { permutations, random }: { permutations: number; random: () => number },
): Float64Array[] {
  const statistics = definitions.map(() => new Float64Array(permutations + 1));
  for (let map = 0; map <= permutations; map++) {
    const arranged = map === 0 ? values : shuffled(values, random);
    definitions.forEach((weights, s) => statistics[s][map] = slowMoran(arranged, weights));
  }
  return statistics;
}
