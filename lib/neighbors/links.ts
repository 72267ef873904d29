/**
 * The rule `links:FILE`: pairs somebody gave, such as travel times or flows.
 *
 * @module
 */
import type { Topology } from "./topology.ts";
import { UnfitDataError } from "../layer/errors.ts";

/** Directed links in the order of the file. */
export interface LinkTriples {
  /** Position of the area a link starts from. */
  readonly from: Uint32Array;
  /** Position of the area it goes to, parallel to `from`. */
  readonly to: Uint32Array;
  /** Weight of each link, or null where the file has none. */
  readonly weight: Float64Array | null;
  /** What to call an area in messages. @default its position */
  readonly nameOf?: (area: number) => string;
}

/**
 * A topology from links as given: directed, with their weights as `given`. Links of an area with itself
 * are left out, and a weight of 0 is no link.
 *
 * @param count Number of areas.
 * @throws {UnfitDataError} when a pair comes twice with different weights.
 */
export function linksTopology(
  count: number,
  { from, to, weight, nameOf = String }: LinkTriples,
): Topology {
  const order = new Uint32Array(from.length).map((_, link) => link)
    .filter((link) => from[link] !== to[link] && weight?.[link] !== 0)
    .sort((a, b) => from[a] - from[b] || to[a] - to[b]);
  const offsets = new Uint32Array(count + 1);
  const indices = new Uint32Array(order.length);
  const given = new Float64Array(order.length);
  let size = 0, last = -1;
  for (const link of order) {
    const again = last >= 0 && from[last] === from[link] && to[last] === to[link];
    if (again && weight && weight[last] !== weight[link]) {
      throw new UnfitDataError(
        `Cannot weigh the link from area ${nameOf(from[link])} to area ${
          nameOf(to[link])
        } as it is given twice, ` +
          `with ${weight[last]} and ${weight[link]}; keep one of them`,
      );
    }
    last = link;
    if (again) continue;
    indices[size] = to[link];
    if (weight) given[size] = weight[link];
    offsets[from[link] + 1] = ++size;
  }
  for (let i = 0; i < count; i++) offsets[i + 1] = Math.max(offsets[i], offsets[i + 1]);
  const weights = weight && { given: given.slice(0, size) };
  return { offsets, indices: indices.slice(0, size), ...weights };
}
