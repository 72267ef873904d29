/**
 * What somebody probably meant when a name does not exist.
 *
 * @module
 */

/**
 * The name most like `wanted`, for "did you mean": the least number of letters inserted, dropped,
 * replaced or swapped with their neighbor (optimal string alignment), letter case ignored. Null where
 * even the best differs in more than a third of the letters. Ties go to the earlier name.
 *
 * Cost: names × letters².
 */
export function nearestName(wanted: string, names: readonly string[]): string | null {
  const target = wanted.toLowerCase();
  let best: string | null = null;
  let fewest = Infinity;
  for (const name of names) {
    const edits = editsBetween(target, name.toLowerCase());
    const limit = Math.max(1, Math.floor(Math.max(target.length, name.length) / 3));
    if (edits <= limit && edits < fewest) {
      best = name;
      fewest = edits;
    }
  }
  return best;
}

/** `, did you mean "X"?` reads badly in the middle of a sentence, so: `; did you mean "X"`, or nothing. */
export function suggestion(wanted: string, names: readonly string[]): string {
  const near = nearestName(wanted, names);
  return near === null ? "" : `; did you mean "${near}"`;
}

function editsBetween(a: string, b: string): number {
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1] ? 0 : 1;
      row[j] = Math.min(last[j] + 1, row[j - 1] + 1, last[j - 1] + same);
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      if (swapped) row[j] = Math.min(row[j], beforeLast[j - 2] + 1);
    }
    beforeLast = last;
    last = row;
  }
  return last[b.length];
}
