/**
 * Points on an ellipsoid, with geodesics between them.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import type { Ellipsoid } from "../project/ellipsoid.ts";
import { earthCentered, geodesicDistance } from "../project/geodesic.ts";
import { longestJoin } from "./earth_joins.ts";
import { type EarthTree, plantEarthTree, visitAround } from "./earth_tree.ts";
import { MOST_LINKS, refuseTooMany, sortRow } from "./link_room.ts";
import { type NearestLinks, refuseAbsent } from "./nearest.ts";
import { once } from "./once.ts";
import { countSharingPlaces } from "./places.ts";
import type { PointSpace } from "./point_space.ts";
import { locatedPoints } from "./rounded_points.ts";
import { topologyFromPairs } from "./topology_from_pairs.ts";
import type { Topology } from "./topology.ts";

/** Distances are compared in whole micrometers. */
const GRAINS_PER_METER = 1e6;
/** Meters by which a straight line may come out too long: coordinates in space are rounded too. */
const SLACK = 1e-6;

/**
 * The space of points on an ellipsoid. Candidates are found by straight lines through the Earth, which are never
 * longer than geodesics, then measured. The 180th meridian and the poles are nothing special.
 *
 * Cost: a few microseconds for each pair measured; `nearest` measures a few more than it keeps.
 *
 * @param degrees Longitude and latitude of each point, NaN where it has no place.
 */
export function earthSpace(degrees: Float64Array, ellipsoid: Ellipsoid): PointSpace {
  const areas = degrees.length / 2;
  const located = locatedPoints(degrees);
  const tree = once(() => plantEarthTree(located, earthCentered(degrees, ellipsoid)));
  const measure = geodesicDistance(degrees, ellipsoid);
  const distance = (i: number, j: number): number => {
    const known = !Number.isNaN(degrees[2 * i]) && !Number.isNaN(degrees[2 * j]);
    return known ? measure(i, j) : NaN;
  };
  const nearest = once(() => nearestOnEarth(tree(), distance));
  const toNearest = (k: number): Float64Array => {
    const distances = new Float64Array(areas).fill(NaN);
    if (k >= located.length) return distances;
    const { width, lengths } = nearest()(k);
    tree().ids.forEach((id, at) => distances[id] = lengths[at * width + k - 1]);
    return distances;
  };
  return {
    located: located.length,
    planar: false,
    distance,
    nearest: (count) => {
      refuseAbsent(count, located.length);
      const table = nearest()(Math.min(count + 1, located.length - 1));
      return linkNearest(tree(), table, { areas, count });
    },
    within: (length) => linkWithinOnEarth(tree(), distance, { areas, length }),
    graph: (kind) => {
      throw new UsageError(
        `Cannot draw the graph ${kind} on the ellipsoid as it is defined in a plane; ` +
          "choose a projection, such as --metric auto or --metric EPSG:N",
      );
    },
    toNearest,
    connecting: once(() => ({
      noneAlone: toNearest(1).reduce((most, d) => d > most || Number.isNaN(most) ? d : most, NaN),
      oneComponent: longestJoin(tree(), distance),
    })),
    countSharing: () => countSharingPlaces(oneNameEach(degrees)),
  };
}

/** The nearest of every point, in tree order. */
interface EarthTable {
  readonly width: number;
  /** Positions in the input, `width` for each tree position, nearest first, ties by position. */
  readonly near: Uint32Array;
  /** Their distances in meters. */
  readonly lengths: Float64Array;
}

/** A function that finds tables of at least a width; the widest so far is kept. */
function nearestOnEarth(
  tree: EarthTree,
  distance: PointSpace["distance"],
): (width: number) => EarthTable {
  let table: EarthTable = { width: 0, near: new Uint32Array(), lengths: new Float64Array() };
  return (width) => {
    if (width > table.width) table = fillTable(tree, distance, width);
    return table;
  };
}

function fillTable(
  tree: EarthTree,
  distance: PointSpace["distance"],
  width: number,
): EarthTable {
  const { count, ids } = tree;
  const near = new Uint32Array(count * width), lengths = new Float64Array(count * width);
  for (let from = 0; from < count; from++) {
    const start = from * width;
    let found = 0, reach = Infinity;
    visitAround(tree, from, {
      reachOf: () => reach,
      visit: (at) => {
        if (at === from) return;
        const id = ids[at], length = distance(ids[from], id);
        let slot = found < width ? found++ : width;
        for (; slot > 0; slot--) {
          const before = start + slot - 1;
          const ahead = lengths[before] < length ||
            (lengths[before] === length && near[before] < id);
          if (ahead) break;
          if (slot === width) continue;
          near[before + 1] = near[before];
          lengths[before + 1] = lengths[before];
        }
        if (slot < width) {
          near[start + slot] = id;
          lengths[start + slot] = length;
        }
        if (found === width) reach = lengths[start + width - 1] + SLACK;
      },
    });
  }
  return { width, near, lengths };
}

function linkNearest(
  { ids }: EarthTree,
  { width, near, lengths }: EarthTable,
  { areas, count }: { readonly areas: number; readonly count: number },
): NearestLinks {
  refuseTooMany(ids.length * count, `nearest:${count}`, "choose fewer neighbors");
  const offsets = new Uint32Array(areas + 1);
  for (const id of ids) offsets[id + 1] = count;
  for (let i = 0; i < areas; i++) offsets[i + 1] += offsets[i];
  const indices = new Uint32Array(ids.length * count);
  let tied = 0;
  ids.forEach((id, at) => {
    const first = at * width, last = first + count;
    indices.set(near.subarray(first, last), offsets[id]);
    sortRow(indices, offsets[id], offsets[id + 1]);
    if (count < width && lengths[last] === lengths[last - 1]) tied++;
  });
  return { topology: { offsets, indices }, tied };
}

function linkWithinOnEarth(
  tree: EarthTree,
  distance: PointSpace["distance"],
  { areas, length }: { readonly areas: number; readonly length: number },
): Topology {
  const most = Math.round(length * GRAINS_PER_METER) / GRAINS_PER_METER;
  const one: number[] = [], other: number[] = [];
  for (let from = 0; from < tree.count; from++) {
    visitAround(tree, from, {
      reachOf: () => most + SLACK,
      visit: (at) => {
        if (at <= from || distance(tree.ids[from], tree.ids[at]) > most) return;
        one.push(tree.ids[from]);
        other.push(tree.ids[at]);
        if (2 * one.length > MOST_LINKS) refuse(2 * one.length);
      },
    });
  }
  return topologyFromPairs(areas, Uint32Array.from(one), Uint32Array.from(other));
}

function refuse(links: number): void {
  refuseTooMany(links, "this distance", "choose a shorter one, or nearest:K");
}

/** Longitudes and latitudes in which each place has one name: no -180°, and one longitude at the poles. */
function oneNameEach(degrees: Float64Array): Float64Array {
  return degrees.map((angle, at) => {
    if (at % 2 === 1 || Number.isNaN(angle)) return angle;
    if (Math.abs(degrees[at + 1]) === 90) return 0;
    return angle === -180 ? 180 : angle;
  });
}
