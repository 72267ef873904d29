/**
 * Shared boundaries without any repair.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { boundsOf, type FlatGeometry } from "../layer/geometry.ts";
import { type AreaContact, areaContacts } from "./area_contacts.ts";
import { type Boundaries, boundariesOf } from "./boundaries.ts";
import { union } from "./combine.ts";
import { globePlaces } from "./globe.ts";
import { nestedAreas } from "./nested_areas.ts";
import { indexSegments } from "./segment_index.ts";
import { linkSharedPlaces } from "./shared_places.ts";
import { matchSegments, type SharedSegments } from "./shared_segments.ts";
import { isLinked, type Topology } from "./topology.ts";
import { topologyFromPairs } from "./topology_from_pairs.ts";
import { type VertexIds, vertexIds } from "./vertex_ids.ts";

/** Places are one when nearer than this share of the diagonal of the layer's box. */
const TOLERANCE = 1e-9;

/** A shared stretch is longer than this many tolerances. */
export const MIN_STRETCH = 2;

/** Shared boundaries of a layer. Both topologies are symmetric. */
export interface Contiguity {
  /** Areas that share any boundary point, or overlap. */
  readonly touching: Topology;
  /** Areas that share a stretch of boundary, or overlap. */
  readonly edge: Topology;
  readonly report: ContiguityReport;
}

/** What it took to find the touching pairs: unordered pairs, each kind counted. */
export interface ContiguityReport {
  /** Coordinate units within which places were taken as one. */
  readonly tolerance: number;
  /** Pairs that share no vertex exactly, only within the tolerance. */
  readonly nearVertexPairs: number;
  /** Pairs that share no vertex, but a vertex of one lies on a segment of the other. */
  readonly junctionPairs: number;
  /** Pairs of polygons that overlap: their boundaries cross, or one lies inside the other. */
  readonly overlapPairs: number;
  /** Pairs that touch only because `snap` closed a gap. */
  readonly snappedPairs: number;
}

/** Shared boundaries, and what is needed to look for more. */
export interface DrawnContiguity extends Contiguity {
  readonly boundaries: Boundaries;
  /** Segments by who has them. */
  readonly segments: SharedSegments;
  /** Coordinate units around the globe, where the layer spans more than half of it; else 0. */
  readonly period: number;
}

/**
 * Finds who shares a boundary point and who a stretch.
 *
 * 1. Vertices whose coordinates differ by at most 1e-9 of the layer's diagonal are one place; areas that
 *    have a place in common touch.
 * 2. Areas that have both ends of a segment in common share a stretch.
 * 3. Segments that found no partner (coasts, T-junctions, slivers) are compared with all that are near: a
 *    vertex on a segment is a touch, running alongside is a stretch, crossing polygons overlap, and that is both.
 * 4. A polygon part inside a polygon that has no hole there overlaps it too.
 *
 * Lines are compared like boundaries, except that crossing lines share only a point. Points touch where they
 * coincide with a vertex. On a globe, the western border of the map is the eastern one, and a segment over
 * more than 180° goes the other way around.
 *
 * Cost: a hash look-up for each vertex and each segment, a search for each segment without a partner.
 *
 * @throws {UnfitDataError} for a layer of nothing but points.
 */
export function findAsDrawn(geometry: FlatGeometry, geographic: boolean): DrawnContiguity {
  const box = boundsOf(geometry) ?? [0, 0, 0, 0];
  const boundaries = boundariesOf(geometry);
  if (boundaries.ends.length > 0 && boundaries.ends.every((end) => end === 1)) {
    throw new UnfitDataError(
      "Cannot find shared boundaries as the layer has only points; choose nearest:6 or within:DIST",
    );
  }
  const tolerance = TOLERANCE * Math.sqrt((box[2] - box[0]) ** 2 + (box[3] - box[1]) ** 2);
  const places = vertexIds(
    geographic ? globePlaces(geometry.xy, box, tolerance) : geometry.xy,
    tolerance,
  );
  const byPlace = linkSharedPlaces(boundaries, places.ids, places.count);
  const segments = matchSegments(boundaries, places.ids);
  const period = geographic && box[2] - box[0] > 180 ? 360 : 0;
  const { contacts, overlaps } = compareLoose(geometry, boundaries, segments.loose, {
    tolerance,
    period,
  });
  const along = contacts.filter(({ stretch }) => stretch > MIN_STRETCH * tolerance);
  const areas = boundaries.areas;
  const matched = topologyFromPairs(areas, segments.one, segments.other);
  return {
    touching: union(byPlace, linkPairs(areas, [...contacts, ...overlaps])),
    edge: union(matched, linkPairs(areas, [...along, ...overlaps])),
    report: {
      tolerance,
      nearVertexPairs: (byPlace.indices.length - exactLinks(boundaries, places, byPlace)) / 2,
      junctionPairs: contacts.filter((pair) => !pair.overlaps && !linked(byPlace, pair)).length,
      overlapPairs: linkPairs(areas, overlaps).indices.length / 2,
      snappedPairs: 0,
    },
    boundaries,
    segments,
    period,
  };
}

/** An unordered pair of areas. */
interface Pair {
  readonly one: number;
  readonly other: number;
}

/** A symmetric topology of some pairs. */
export function linkPairs(areas: number, pairs: readonly Pair[]): Topology {
  const one = Uint32Array.from(pairs, (pair) => pair.one);
  return topologyFromPairs(areas, one, Uint32Array.from(pairs, (pair) => pair.other));
}

function linked(topology: Topology, { one, other }: Pair): boolean {
  return isLinked(topology, one, other);
}

/** Directed links there would be between places without the tolerance. */
function exactLinks(boundaries: Boundaries, places: VertexIds, byPlace: Topology): number {
  const { ids, exactIds, exactCount } = places;
  if (ids === exactIds) return byPlace.indices.length;
  return linkSharedPlaces(boundaries, exactIds, exactCount).indices.length;
}

function compareLoose(
  geometry: FlatGeometry,
  boundaries: Boundaries,
  loose: Uint8Array,
  { tolerance, period }: { readonly tolerance: number; readonly period: number },
): { contacts: AreaContact[]; overlaps: Pair[] } {
  if (!loose.includes(1)) return { contacts: [], overlaps: [] };
  const all = boundaries.ends.map((end) => 1 - end);
  const index = indexSegments(boundaries, all, period);
  const scale = () => ({ east: 1, north: 1 });
  const search = { from: loose, index, reach: tolerance, scale, period };
  let contacts = areaContacts(boundaries, search);
  // Two layers laid over each other cross where each is matched within itself: then nothing is skipped.
  if (contacts.some(({ overlaps }) => overlaps)) {
    contacts = areaContacts(boundaries, { ...search, from: all });
  }
  const nested = nestedAreas(geometry, boundaries, { loose, index, period })
    .map(({ inner, outer }) => ({ one: inner, other: outer }));
  return { contacts, overlaps: [...contacts.filter(({ overlaps }) => overlaps), ...nested] };
}
