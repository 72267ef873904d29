/**
 * Marks for areas that are points. Too small for hatches, they tell the class by their form: up for high,
 * down for low, solid among their like and light among the others.
 *
 * @module
 */
import type { AreaClass } from "../write/results.ts";

/**
 * Corners of a class's mark around its middle, x0, y0, x1, y1, … in whole units, y downward.
 *
 * @param radius Half the width of the mark.
 */
export function markCorners(name: AreaClass, radius: number): number[] {
  return formOf(name).map((share) => Math.round(share * radius));
}

function formOf(name: AreaClass): readonly number[] {
  switch (name) {
    case "high among high":
    case "high among low":
      return UP;
    case "low among low":
    case "low among high":
      return UP.map((share) => -share);
    case "no value":
      return CROSS;
    case "no evidence":
      return ROUND.map((share) => 0.55 * share);
    case "alone":
      return ROUND;
  }
}

const UP: readonly number[] = [0, -1.2, 1.2, 0.9, -1.2, 0.9];

const ROUND: readonly number[] = Array.from({ length: 10 }, (_, corner) => {
  const angle = corner * Math.PI / 5;
  return [Math.cos(angle), Math.sin(angle)];
}).flat();

/** An x with arms of a third of its width. */
const CROSS: readonly number[] = [
  [-1, -0.6, -0.6, -1, 0, -0.4, 0.6, -1, 1, -0.6, 0.4, 0],
  [1, 0.6, 0.6, 1, 0, 0.4, -0.6, 1, -1, 0.6, -0.4, 0],
].flat();
