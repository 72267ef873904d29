/**
 * Room for links: how many fit, growing, sorting.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";

/** Most directed links a topology may have: 800 MB of positions. */
export const MOST_LINKS = 200_000_000;

/**
 * Refuses a number of links that would not fit.
 *
 * @param count Directed links.
 * @param what What links the areas, to follow "by".
 * @param remedy What to do instead, to follow "which is too many;".
 * @throws {UnfitDataError} beyond {@link MOST_LINKS}.
 */
export function refuseTooMany(count: number, what: string, remedy: string): void {
  if (count <= MOST_LINKS) return;
  const millions = Math.ceil(count / 1e6);
  throw new UnfitDataError(
    `Cannot link the areas by ${what} as that makes ${millions} million links and only ` +
      `${MOST_LINKS / 1e6} million fit; ${remedy}`,
  );
}

/** The same list when `size` entries fit, else a copy at least twice as long. */
export function withRoom(list: Uint32Array, size: number): Uint32Array {
  if (size <= list.length) return list;
  const longer = new Uint32Array(Math.max(size, Math.min(2 * list.length, MOST_LINKS)));
  longer.set(list);
  return longer;
}

/** Rows up to this length are sorted by insertion, which beats a call of `sort`. */
const SHORT = 40;

/** Sorts `list[start]` … `list[end - 1]` ascending, in place. */
export function sortRow(list: Uint32Array, start: number, end: number): void {
  if (end - start > SHORT) {
    list.subarray(start, end).sort();
    return;
  }
  for (let at = start + 1; at < end; at++) {
    const value = list[at];
    let gap = at;
    for (; gap > start && list[gap - 1] > value; gap--) list[gap] = list[gap - 1];
    list[gap] = value;
  }
}
