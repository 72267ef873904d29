/**
 * The links of a definition by rows of the layer, for tables and maps.
 *
 * @module
 */
import { linkDistances } from "../neighbors/distances.ts";
import type { PointSpace } from "../neighbors/point_space.ts";
import type { LinkTable } from "../write/results.ts";
import type { BuiltDefinition } from "./build_definitions.ts";

/** One entry for each directed link that carries a weight. */
export function linkTable(
  { weights }: BuiltDefinition,
  { used, space }: { readonly used: Uint32Array; readonly space: PointSpace | null },
): LinkTable {
  const { offsets, indices, values } = weights;
  const from = new Uint32Array(indices.length);
  used.forEach((row, i) => from.fill(row, offsets[i], offsets[i + 1]));
  return {
    from,
    to: indices.map((j) => used[j]),
    weight: values,
    distance: space && linkDistances(weights, space.distance),
  };
}
