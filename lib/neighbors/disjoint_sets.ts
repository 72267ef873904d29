/**
 * Sets that only ever grow together (Tarjan 1975), in one array of parents; a root is its own parent.
 *
 * @module
 */

/** The member that stands for the set of `member`; shortens the way there. */
export function rootOf(parents: Uint32Array, member: number): number {
  while (parents[member] !== member) {
    parents[member] = parents[parents[member]];
    member = parents[member];
  }
  return member;
}

/** Makes one set of two; false where they were one already. The smaller root stands for both. */
export function joinSets(parents: Uint32Array, a: number, b: number): boolean {
  const one = rootOf(parents, a), other = rootOf(parents, b);
  if (one === other) return false;
  if (one < other) parents[other] = one;
  else parents[one] = other;
  return true;
}

/** Parents of `count` sets of one member each. */
export function singleSets(count: number): Uint32Array {
  const parents = new Uint32Array(count);
  for (let i = 0; i < count; i++) parents[i] = i;
  return parents;
}
