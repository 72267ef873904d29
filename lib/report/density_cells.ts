/**
 * Points gathered into hexagons, where they are too many to be drawn one by one.
 *
 * @module
 */

/** A hexagon that holds points. */
export interface DensityCell {
  /** Middle of the hexagon. */
  readonly x: number;
  readonly y: number;
  /** Positions of its points in the lists given. */
  readonly members: readonly number[];
}

/**
 * Gathers points into hexagons that stand on a corner, each point into the one with the nearest middle.
 * Cells come in the order of their first point. Cost: one pass.
 *
 * @param radius From the middle of a hexagon to its corners, in the unit of the points.
 */
export function densityCells(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  radius: number,
): DensityCell[] {
  const across = radius * Math.sqrt(3), down = radius * 1.5;
  const cells = new Map<string, { x: number; y: number; members: number[] }>();
  for (let i = 0; i < x.length; i++) {
    const upper = Math.floor(y[i] / down);
    const [a, b] = [upper, upper + 1].map((row) => {
      const shift = row % 2 === 0 ? 0 : 0.5;
      const column = Math.round(x[i] / across - shift);
      return { row, column, x: (column + shift) * across, y: row * down };
    });
    const isNearer = (x[i] - a.x) ** 2 + (y[i] - a.y) ** 2 <= (x[i] - b.x) ** 2 + (y[i] - b.y) ** 2;
    const best = isNearer ? a : b;
    const key = `${best.row} ${best.column}`;
    const cell = cells.get(key);
    if (cell) cell.members.push(i);
    else cells.set(key, { x: best.x, y: best.y, members: [i] });
  }
  return [...cells.values()];
}
