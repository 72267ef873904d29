/**
 * Where boundaries of different areas come close without matching vertex by vertex.
 *
 * @module
 */
import type { Boundaries } from "./boundaries.ts";
import { type Segment, type SegmentContact, segmentContact } from "./segment_contact.ts";
import type { SegmentIndex } from "./segment_index.ts";

/** How near two areas come on the segments that were compared. */
export interface AreaContact {
  readonly one: number;
  readonly other: number;
  /** Smallest distance, in the units of the reach. */
  readonly gap: number;
  /** Total length over which the two run alongside each other within reach. */
  readonly stretch: number;
  /** Whether the boundaries of two polygons cross, so that the areas overlap. */
  readonly overlaps: boolean;
}

/** What is compared, and how far. */
export interface ContactSearch {
  /** 1 at the first vertex of each segment that is looked around. */
  readonly from: Uint8Array;
  /** The segments that are looked for. */
  readonly index: SegmentIndex;
  /** Largest distance of a contact. */
  readonly reach: number;
  /** Units of the reach in one coordinate unit eastward and northward, at a given y. */
  readonly scale: (y: number) => Scale;
  /** Coordinate units around the globe, where boundaries may go around it; else 0. */
  readonly period: number;
}

/** Local scale of coordinates. */
export interface Scale {
  readonly east: number;
  readonly north: number;
}

/**
 * Compares each segment of `from` with the indexed ones that are near it and belong to another area.
 *
 * Cost: a search in an R-tree for each segment of `from`.
 *
 * @returns The pairs of areas in contact, in the order found.
 */
export function areaContacts(boundaries: Boundaries, search: ContactSearch): AreaContact[] {
  const { xy, areaOf } = boundaries;
  const { from, period } = search;
  const { tree, starts, stops, mask: to } = search.index;
  const contacts = new Map<number, AreaContact>();
  const shifts = period > 0 ? [-period, 0, period] : [0];
  for (let s = 0; tree && s < from.length; s++) {
    if (!from[s]) continue;
    for (const shift of shifts) {
      const view = viewFrom(xy, s, shift, search);
      const segment = seenIn(xy, s, view, { shift, period });
      tree.search(view.west, view.south, view.east, view.north, (chunk) => {
        for (let t = starts[chunk]; t < stops[chunk]; t++) {
          // Segments of both masks meet twice; the second time is skipped.
          if (!to[t] || areaOf[t] === areaOf[s] || (t < s && from[t] && to[s])) continue;
          if (!inView(xy, t, view, period)) continue;
          const near = seenIn(xy, t, view, { period });
          const contact = segmentContact(segment, near, search.reach);
          if (contact) note(contacts, boundaries, areaOf[s], areaOf[t], contact);
        }
        return false;
      });
    }
  }
  return [...contacts.values()];
}

/** A box around a segment with a margin of the reach, and coordinates in units of the reach. */
interface View {
  readonly west: number;
  readonly south: number;
  readonly east: number;
  readonly north: number;
  readonly scale: Scale;
}

function viewFrom(xy: Float64Array, s: number, shift: number, search: ContactSearch): View {
  const scale = search.scale((xy[2 * s + 1] + xy[2 * s + 3]) / 2);
  const marginX = search.reach / scale.east, marginY = search.reach / scale.north;
  const start = xy[2 * s] + shift, end = endOf(xy, s, search.period) + shift;
  return {
    west: Math.min(start, end) - marginX,
    south: Math.min(xy[2 * s + 1], xy[2 * s + 3]) - marginY,
    east: Math.max(start, end) + marginX,
    north: Math.max(xy[2 * s + 1], xy[2 * s + 3]) + marginY,
    scale,
  };
}

/** Where a segment ends eastward; one that spans more than half the globe goes the other way around. */
function endOf(xy: Float64Array, v: number, period: number): number {
  const span = xy[2 * v + 2] - xy[2 * v];
  if (2 * Math.abs(span) <= period || period === 0) return xy[2 * v + 2];
  return xy[2 * v + 2] - Math.sign(span) * period;
}

function inView(
  xy: Float64Array,
  t: number,
  { west, south, east, north }: View,
  period: number,
): boolean {
  const end = endOf(xy, t, period);
  return (xy[2 * t] >= west || end >= west) && (xy[2 * t] <= east || end <= east) &&
    (xy[2 * t + 1] >= south || xy[2 * t + 3] >= south) &&
    (xy[2 * t + 1] <= north || xy[2 * t + 3] <= north);
}

/** A segment in the units of the reach, from the corner of the view, so that no digits are lost. */
function seenIn(
  xy: Float64Array,
  v: number,
  { west, south, scale }: View,
  { shift = 0, period }: { readonly shift?: number; readonly period: number },
): Segment {
  return {
    ax: (xy[2 * v] + shift - west) * scale.east,
    ay: (xy[2 * v + 1] - south) * scale.north,
    bx: (endOf(xy, v, period) + shift - west) * scale.east,
    by: (xy[2 * v + 3] - south) * scale.north,
  };
}

function note(
  contacts: Map<number, AreaContact>,
  { areas, solid }: Boundaries,
  a: number,
  b: number,
  found: SegmentContact,
): void {
  const one = Math.min(a, b), other = Math.max(a, b);
  const key = one * areas + other;
  const before = contacts.get(key);
  contacts.set(key, {
    one,
    other,
    gap: Math.min(before?.gap ?? Infinity, found.gap),
    stretch: (before?.stretch ?? 0) + found.stretch,
    overlaps: before?.overlaps || (found.crosses && solid[one] + solid[other] === 2),
  });
}
