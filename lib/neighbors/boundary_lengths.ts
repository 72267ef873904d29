/**
 * How long the boundary is that two areas share.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import type { Length } from "../project/length.ts";
import { contiguityFinder } from "./contiguity.ts";
import type { Ground } from "./ground.ts";
import { restrict } from "./restrict.ts";
import { linkAt, type Topology } from "./topology.ts";

/**
 * Length of the boundary that the two areas of each link share, in meters (map units where there is no
 * CRS); 0 where they share none. Degrees are measured at their place on the ellipsoid.
 *
 * @param topology Links among the usable areas of `ground`.
 * @param snap Gaps closed, as in the rule; null for none.
 * @returns Parallel to `indices`.
 * @throws {UsageError} when the ground has no geometry.
 */
export function boundaryLengths(
  ground: Ground,
  topology: Topology,
  snap: Length | null = null,
): Float64Array {
  const { geometry, usable } = ground;
  if (!ground.contiguity && !geometry) {
    throw new UsageError("Cannot measure shared boundaries as this ground has no geometry");
  }
  const finder = ground.contiguity ?? contiguityFinder(geometry!, ground);
  const shared = restrict(finder.sharedLengths(snap), usable);
  const lengths = new Float64Array(topology.indices.length);
  for (let i = 0; i + 1 < topology.offsets.length; i++) {
    for (let link = topology.offsets[i]; link < topology.offsets[i + 1]; link++) {
      const at = linkAt(shared, i, topology.indices[link]);
      if (at >= 0) lengths[link] = shared.given![at];
    }
  }
  return lengths;
}
