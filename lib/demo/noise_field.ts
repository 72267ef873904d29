/**
 * Smooth random ground: hills and hollows for coasts and for regional differences.
 *
 * @module
 */
import type { Random } from "./chance.ts";

/** Height at a place of the unit square, between -1 and 1. */
export type Field = (u: number, v: number) => number;

/**
 * Sum of `octaves` lattices of random heights, each twice as fine and half as high as the one before, joined by
 * smooth interpolation. `cells` is the number of lattice cells along a side of the first one. Scaled so that
 * the result stays within -1 … 1.
 */
export function noiseField(random: Random, cells: number, octaves: number): Field {
  const lattices: Field[] = [];
  for (let o = 0; o < octaves; o++) lattices.push(lattice(random, cells * 2 ** o));
  const total = 2 - 2 ** (1 - octaves);
  return (u, v) => {
    let sum = 0;
    for (let o = 0; o < octaves; o++) sum += lattices[o](u, v) / 2 ** o;
    return sum / total;
  };
}

/** One lattice of heights in -1 … 1 over the unit square. */
function lattice(random: Random, cells: number): Field {
  const width = cells + 1;
  const heights = Float64Array.from({ length: width * width }, () => 2 * random() - 1);
  return (u, v) => {
    const x = Math.min(Math.max(u, 0), 1) * cells, y = Math.min(Math.max(v, 0), 1) * cells;
    const column = Math.min(Math.floor(x), cells - 1), row = Math.min(Math.floor(y), cells - 1);
    const across = ease(x - column), up = ease(y - row);
    const low = row * width + column, high = low + width;
    const south = heights[low] + (heights[low + 1] - heights[low]) * across;
    const north = heights[high] + (heights[high + 1] - heights[high]) * across;
    return south + (north - south) * up;
  };
}

/** 0 to 1 with level ends (3t² - 2t³), so that lattice lines do not show. */
function ease(t: number): number {
  return t * t * (3 - 2 * t);
}
