/**
 * The relative neighborhood graph (Toussaint 1980).
 *
 * @module
 */
import { distanceBetween } from "./distance_between.ts";
import { keepEdges } from "./gabriel.ts";
import { indexPoints, rangeSearch } from "./point_index.ts";
import type { RoundedPoints } from "./rounded_points.ts";
import type { Edges } from "./triangulate.ts";

/**
 * Keeps the edges for which no third place is nearer to both ends than they are to each other:
 * d(p,q) <= max(d(p,c), d(q,c)) for every c, compared in whole grains.
 *
 * Cost: one search around each edge of the Gabriel graph, which holds all relative neighbors.
 *
 * @param edges The Gabriel graph of the places.
 */
export function relativeEdges(places: RoundedPoints, edges: Edges): Edges {
  const { xy, perUnit } = places;
  const index = indexPoints(places);
  const { found, around } = rangeSearch(index);
  const grains = (p: number, q: number) => Math.round(distanceBetween(xy, p, q) * perUnit);
  return keepEdges(edges, (p, q, corners) => {
    const length = grains(p, q);
    const blocks = (c: number) => c >= 0 && grains(p, c) < length && grains(q, c) < length;
    if (corners.some(blocks)) return false;
    // The two circles of radius d(p,q) overlap within √3/2 of it from the middle; a grain more is safe.
    const reach = Math.sqrt(0.75) * distanceBetween(xy, p, q) + 1 / perUnit;
    const size = around((xy[2 * p] + xy[2 * q]) / 2, (xy[2 * p + 1] + xy[2 * q + 1]) / 2, reach);
    for (let f = 0; f < size; f++) {
      const c = index.ids[found[f]];
      if (c !== p && c !== q && blocks(c)) return false;
    }
    return true;
  });
}
