import assert from "node:assert/strict";
import { densityCells } from "../../lib/report/density_cells.ts";
import { normalNumbers } from "../support/maps.ts";

Deno.test("densityCells() puts every point into the hexagon with the nearest middle", () => {
  const x = normalNumbers(400, "across").map((value) => 30 * value);
  const y = normalNumbers(400, "down").map((value) => 30 * value);
  const radius = 7;
  const cells = densityCells(x, y, radius);
  // Slow twin: all middles of the lattice in reach, tried one by one.
  const middles: [number, number][] = [];
  for (let row = -30; row <= 30; row++) {
    for (let column = -30; column <= 30; column++) {
      middles.push([
        (column + (row % 2 === 0 ? 0 : 0.5)) * radius * Math.sqrt(3),
        1.5 * radius * row,
      ]);
    }
  }
  const members = cells.flatMap((cell) => cell.members);
  assert.deepEqual(members.toSorted((a, b) => a - b), [...x.keys()]);
  for (const cell of cells) {
    for (const i of cell.members) {
      const own = Math.hypot(x[i] - cell.x, y[i] - cell.y);
      const nearest = Math.min(...middles.map(([cx, cy]) => Math.hypot(x[i] - cx, y[i] - cy)));
      assert.ok(own <= nearest + 1e-9, `point ${i} lies ${own} from its middle, not ${nearest}`);
    }
  }
});

Deno.test("densityCells() gives nothing for no points", () => {
  assert.deepEqual(densityCells([], [], 5), []);
});
