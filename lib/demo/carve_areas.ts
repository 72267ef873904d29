/**
 * Dividing land into areas: small ones where people live close together, large ones in the country.
 *
 * @module
 */
import type { CellMesh } from "./cell_mesh.ts";
import { pick, type Random } from "./chance.ts";
import { distance2, type Land } from "./land.ts";

/** Options of {@link carveAreas}. */
export interface CarveOptions {
  /** Areas on the mainland. */
  readonly mainlandAreas: number;
  /** -1 (empty country) … 1 (towns) for a cell. */
  readonly density: (cell: number) => number;
  readonly random: Random;
}

/** Candidates tried for each new seat; more make areas more even. */
const CANDIDATES = 12;

/**
 * Divides the land into areas of whole cells and returns the area of each cell, -1 for sea. The first
 * `mainlandAreas` numbers are on the mainland; those of the islands follow. An area is connected, but for
 * the islets that some coastal areas own. Cost: candidates × areas², then one pass over the cells.
 */
export function carveAreas(mesh: CellMesh, land: Land, options: CarveOptions): Int32Array {
  const areaOf = new Int32Array(mesh.count).fill(-1);
  let areas = 0;
  const settle = (cells: readonly number[], wanted: number) => {
    const seats = chooseSeats(mesh, cells, wanted, options);
    for (const [cell, seat] of growFromSeats(mesh, cells, seats)) areaOf[cell] = areas + seat;
    areas += wanted;
  };

  settle(land.mainland, options.mainlandAreas);
  for (const island of land.islands) {
    if (island.areas > 0) settle(island.cells, island.areas);
    else {
      const owner = areaOf[nearestCell(mesh, land.mainland, island.cells[0])];
      for (const cell of island.cells) areaOf[cell] = owner;
    }
  }
  return areaOf;
}

/**
 * Seats spread over the cells: each new one is, of a few random candidates, the one with most room. Room is
 * the squared distance to the nearest seat, stretched where the country is dense.
 */
function chooseSeats(
  mesh: CellMesh,
  cells: readonly number[],
  count: number,
  { density, random }: CarveOptions,
): number[] {
  const seats = [cells[pick(random, cells.length)]];
  while (seats.length < count) {
    let best = seats[0], bestRoom = 0;
    for (let c = 0; c < CANDIDATES || bestRoom === 0; c++) {
      const cell = cells[pick(random, cells.length)];
      const nearest = nearestCell(mesh, seats, cell);
      const room = distance2(mesh, cell, nearest) * (1 + 0.9 * density(cell));
      if (room > bestRoom) best = cell, bestRoom = room;
    }
    seats.push(best);
  }
  return seats;
}

/** The one of `cells` whose point is nearest to that of `cell`. */
function nearestCell(mesh: CellMesh, cells: readonly number[], cell: number): number {
  let nearest = cells[0];
  for (const other of cells) {
    if (distance2(mesh, other, cell) < distance2(mesh, nearest, cell)) nearest = other;
  }
  return nearest;
}

/** Every cell with the position of the seat that reaches it first, all growing one step at a time. */
function growFromSeats(
  mesh: CellMesh,
  cells: readonly number[],
  seats: readonly number[],
): Map<number, number> {
  const within = new Set(cells);
  const reached = new Map(seats.map((cell, seat) => [cell, seat]));
  for (const [cell, seat] of reached) {
    for (let s = mesh.offsets[cell]; s < mesh.offsets[cell + 1]; s++) {
      const next = mesh.neighbors[s];
      if (within.has(next) && !reached.has(next)) reached.set(next, seat);
    }
  }
  return reached;
}
