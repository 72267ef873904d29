/**
 * Every order of a few values, one after the other.
 *
 * @module
 */

/**
 * Calls `visit` with each of the n! orders of `values`, the order given first, always in the same array. Each
 * order differs from the one before by one swap (Heap 1963). Cost: n! calls; meant for n <= 8.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const seen: string[] = [];
 * visitOrders(Float64Array.of(1, 2, 3), (order) => seen.push(order.join("")));
 * assert.deepEqual(seen.sort(), ["123", "132", "213", "231", "312", "321"]);
 * ```
 */
export function visitOrders(values: Float64Array, visit: (order: Float64Array) => void): void {
  const order = values.slice();
  const visitBelow = (size: number): void => {
    if (size <= 1) return visit(order);
    for (let i = 0; i < size; i++) {
      visitBelow(size - 1);
      if (i === size - 1) return;
      const other = size % 2 === 0 ? i : 0;
      const kept = order[other];
      order[other] = order[size - 1];
      order[size - 1] = kept;
    }
  };
  visitBelow(order.length);
}
