/**
 * Finding segments near a segment.
 *
 * @module
 */
import Flatbush from "flatbush";
import type { Boundaries } from "./boundaries.ts";

/** Segments a chunk: consecutive ones of a ring share a box, which makes the index small. */
const CHUNK = 16;

/** Chunks of boundary in a packed R-tree (Kamel & Faloutsos 1993). */
export interface SegmentIndex {
  /** 1 at the first vertex of each segment that is looked for. */
  readonly mask: Uint8Array;
  /** Vertex at which the first segment of each chunk starts. */
  readonly starts: Uint32Array;
  /** Vertex at which the last segment of each chunk ends. */
  readonly stops: Uint32Array;
  /** Boxes of the chunks; null when there is none. */
  readonly tree: Flatbush | null;
}

/**
 * Indexes the boundary in chunks; those without a segment of `mask` are left out. Cost: one pass and a
 * sort of the chunks.
 *
 * @param mask 1 at the first vertex of each segment that will be looked for.
 * @param period Coordinate units around the globe, where boundaries may go around it; else 0.
 */
export function indexSegments(
  { xy, ends }: Boundaries,
  mask: Uint8Array,
  period: number,
): SegmentIndex {
  const starts: number[] = [], stops: number[] = [];
  const n = ends.length;
  for (let start = 0; start < n;) {
    let stop = start, wanted = false;
    while (stop < start + CHUNK && !ends[stop]) wanted = mask[stop++] === 1 || wanted;
    if (wanted) {
      starts.push(start);
      stops.push(stop);
    }
    start = ends[stop] ? stop + 1 : stop;
  }
  const chunks = { mask, starts: Uint32Array.from(starts), stops: Uint32Array.from(stops) };
  if (starts.length === 0) return { ...chunks, tree: null };
  const tree = new Flatbush(starts.length);
  starts.forEach((start, chunk) => {
    let west = Infinity, south = Infinity, east = -Infinity, north = -Infinity;
    for (let v = start; v <= stops[chunk]; v++) {
      west = Math.min(west, xy[2 * v]);
      east = Math.max(east, xy[2 * v]);
      south = Math.min(south, xy[2 * v + 1]);
      north = Math.max(north, xy[2 * v + 1]);
    }
    // A chunk this wide holds a segment that goes the other way around, to beyond one of its sides.
    const beyond = east - west > period / 2 ? period : 0;
    tree.add(west - beyond, south, east + beyond, north);
  });
  tree.finish();
  return { ...chunks, tree };
}
