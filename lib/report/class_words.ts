/**
 * What each class means, in words for people who have never seen such a map.
 *
 * @module
 */
import type { AreaClass, AreaResults, Steadiness } from "../write/results.ts";

/** One line on each class. */
export const CLASS_WORDS: Readonly<Record<AreaClass, string>> = {
  "high among high": "high value, high surroundings",
  "low among low": "low value, low surroundings",
  "high among low": "high value, low surroundings",
  "low among high": "low value, high surroundings",
  "no evidence": "no more alike or unlike than by chance",
  "alone": "no neighbor, so it cannot be tested",
  "no value": "left out, or without a usable value",
};

/** One line on each word of steadiness. */
export const STEADY_WORDS: Readonly<Record<Steadiness, string>> = {
  steady: "at least 80\u00A0% of the definitions give this class",
  mostly: "50 to 80\u00A0% of the definitions give this class",
  fragile: "fewer than half of the definitions give this class",
  quiet: "no definition flags the area",
};

/** Areas of each class, 0 included. */
export function countClasses({ class: classes }: AreaResults): Record<AreaClass, number> {
  const counts = {
    "high among high": 0,
    "low among low": 0,
    "high among low": 0,
    "low among high": 0,
    "no evidence": 0,
    "alone": 0,
    "no value": 0,
  };
  for (const name of classes) counts[name]++;
  return counts;
}
