/**
 * Names of places that do not exist.
 *
 * @module
 */
import { pick, type Random } from "./chance.ts";

const STARTS = ["Zv", "Yth", "Qu", "Øv", "Xel", "Vrä", "Ghu", "Ksi", "Żor", "Oth", "Éru", "Ulw"];
const MIDDLES = [
  "ako",
  "ëri",
  "uza",
  "ôvi",
  "iðe",
  "aña",
  "ošu",
  "ely",
  "åro",
  "ipha",
  "ūgo",
  "ezi",
];
const ENDS = ["thok", "vrim", "qes", "zund", "ghar", "ksal", "phøt", "lixt", "drož", "wenz"];
const KINDS = ["", "", "", "", "", "", "", " Sound", " Fell", " & Havn", "-under-Vreck"];

/**
 * `count` different names, pronounceable and partly with letters beyond ASCII, in random order. The syllables are
 * chosen not to meet in real places.
 */
export function placeNames(count: number, random: Random): string[] {
  const from = (parts: readonly string[]) => parts[pick(random, parts.length)];
  const names = new Set<string>();
  while (names.size < count) {
    const middle = random() < 0.6 ? "" : from(MIDDLES);
    names.add(from(STARTS) + from(MIDDLES) + middle + from(ENDS) + from(KINDS));
  }
  return [...names];
}
