/**
 * Why keys that look the same do not match.
 *
 * @module
 */

/** Usual differences between two files' spelling of one key. */
const MENDS: readonly { readonly words: string; readonly mend: (key: string) => string }[] = [
  { words: "trimming spaces", mend: (key) => key.trim() },
  { words: "ignoring upper and lower case", mend: (key) => key.toLowerCase() },
  { words: "dropping leading zeros", mend: (key) => key.replace(/^0+(?=.)/, "") },
];

/**
 * Says how many more keys would match after trimming spaces, ignoring case or dropping leading zeros, whichever helps
 * most; all three together where that helps more than any one. Null where none helps.
 *
 * @param layerOnly Distinct keys of the layer that the table lacks.
 * @param tableOnly Distinct keys of the table that the layer lacks.
 */
export function joinHint(
  layerOnly: readonly string[],
  tableOnly: readonly string[],
): string | null {
  const together = {
    words: MENDS.map(({ words }) => words).join(" and "),
    mend: (key: string) => MENDS.reduce((mended, { mend }) => mend(mended), key),
  };
  let best = { words: "", matches: 0 };
  for (const { words, mend } of [...MENDS, together]) {
    const mended = new Set(tableOnly.map(mend));
    const matches = layerOnly.filter((key) => mended.has(mend(key))).length;
    if (matches > best.matches) best = { words, matches };
  }
  if (best.matches === 0) return null;
  const keys = best.matches === 1 ? "key" : "keys";
  return `${best.matches} more ${keys} would match after ${best.words}`;
}
