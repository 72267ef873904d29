/**
 * How each class of area is drawn, wherever it is drawn: in the report, in the figures, in other viewers.
 *
 * @module
 */
import type { AreaClass, Steadiness } from "./results.ts";

/** Lines laid over a fill, so that a class can be told without color. */
export type Hatch = "none" | "rising" | "falling" | "dots" | "cross";

/** Colors and hatch of a class. */
export interface ClassLook {
  readonly fill: string;
  readonly hatch: Hatch;
  /** Color of the hatch and of outlines. */
  readonly ink: string;
}

/** Looks of all classes, told apart in print and by color-blind readers. */
export const CLASS_LOOKS: Readonly<Record<AreaClass, ClassLook>> = {
  "high among high": { fill: "#7A1F5C", hatch: "none", ink: "#7A1F5C" },
  "low among low": { fill: "#0F6E6E", hatch: "none", ink: "#0F6E6E" },
  "high among low": { fill: "#E3B7D0", hatch: "rising", ink: "#7A1F5C" },
  "low among high": { fill: "#A9D5D1", hatch: "falling", ink: "#0F6E6E" },
  "no evidence": { fill: "#E9E6E0", hatch: "none", ink: "#857D70" },
  "alone": { fill: "#FFFFFF", hatch: "dots", ink: "#6E685E" },
  "no value": { fill: "#FFFFFF", hatch: "cross", ink: "#A39C8F" },
};

/** Opacity of the fill of a fragile area, whose outline is dashed. */
export const FRAGILE_STRENGTH = 0.5;

/** Whether an area is one the main definition flags. */
export function isFlagged(name: AreaClass): boolean {
  return name.includes(" among ");
}

/** Whether an area is drawn at half strength: fewer than half of the definitions agree with its class. */
export function isFragile(steady: Steadiness | null | undefined): boolean {
  return steady === "fragile";
}
