/**
 * The rule `same:FIELD`: areas with the same value of a field, such as the region they belong to.
 *
 * @module
 */
import { refuseTooMany } from "./link_room.ts";
import type { Topology } from "./topology.ts";

/**
 * Links every area with all others of the same key; areas whose key is null are alone. Cost: the links.
 *
 * @param field Name of the field, for the error.
 * @throws {UnfitDataError} beyond 200 million links.
 */
export function linkSame(keys: readonly (string | null)[], field: string): Topology {
  const blocks = new Map<string, number[]>();
  keys.forEach((key, i) => {
    if (key === null) return;
    const block = blocks.get(key);
    if (block) block.push(i);
    else blocks.set(key, [i]);
  });
  let links = 0;
  for (const { length } of blocks.values()) links += length * (length - 1);
  refuseTooMany(links, `the field ${field}`, "choose a field with smaller groups");
  const offsets = new Uint32Array(keys.length + 1);
  const indices = new Uint32Array(links);
  let size = 0;
  keys.forEach((key, i) => {
    for (const j of key === null ? [] : blocks.get(key)!) if (j !== i) indices[size++] = j;
    offsets[i + 1] = size;
  });
  return { offsets, indices };
}
