/**
 * The slow obvious way to a local permutation test: every order of the other areas' values.
 *
 * @module
 */
import { visitOrders } from "../../lib/inference/all_orders.ts";

/** Orders of the other values, and in how many the statistic is at least and at most the observed one. */
export interface HeldOrders {
  readonly atLeast: number;
  readonly atMost: number;
  readonly orders: number;
}

/** Holds the value of `area`, puts the others in all orders and asks for the statistic of each map. */
export function countHeldOrders(
  values: Float64Array,
  area: number,
  statistic: (map: Float64Array) => number,
): HeldOrders {
  const observed = statistic(values);
  let atLeast = 0, atMost = 0, orders = 0;
  visitOrders(values.filter((_, i) => i !== area), (others) => {
    const map = Float64Array.of(...others.slice(0, area), values[area], ...others.slice(area));
    const found = statistic(map);
    if (found >= observed - 1e-10) atLeast++;
    if (found <= observed + 1e-10) atMost++;
    orders++;
  });
  return { atLeast, atMost, orders };
}
