/**
 * The graph rules `triangulated`, `gabriel`, `relative` and `sphere`.
 *
 * @module
 */
import { gabrielEdges } from "./gabriel.ts";
import { once } from "./once.ts";
import { distinctPlaces, linkAtPlaces } from "./places.ts";
import { relativeEdges } from "./relative.ts";
import type { RoundedPoints } from "./rounded_points.ts";
import type { PointGraph } from "./rule_tree.ts";
import { sphereEdges } from "./sphere.ts";
import type { Topology } from "./topology.ts";
import { topologyFromPairs } from "./topology_from_pairs.ts";
import { triangulate } from "./triangulate.ts";

/**
 * A function that links points by a graph rule; what one rule leaves for the next (`relative` is part of
 * `gabriel`, that of `triangulated`) is kept.
 *
 * Points at the same place are linked with each other, and each has all the neighbors of the place;
 * points without a place are alone. All four rules are symmetric.
 */
export function pointGraphFinder(points: RoundedPoints): (kind: PointGraph["kind"]) => Topology {
  const { perUnit } = points;
  const places = once(() => distinctPlaces(points));
  const triangulated = once(() => triangulate({ xy: places().xy, perUnit }));
  const gabriel = once(() => gabrielEdges(places().xy, triangulated(), 1 / perUnit));
  const edges = {
    triangulated,
    gabriel,
    relative: () => relativeEdges({ xy: places().xy, perUnit }, gabriel()),
    sphere: () => sphereEdges({ xy: places().xy, perUnit }),
  };
  return (kind) => {
    const { one, other } = edges[kind]();
    const topology = topologyFromPairs(places().xy.length / 2, one, other);
    return linkAtPlaces(places(), topology, points.xy.length / 2);
  };
}
