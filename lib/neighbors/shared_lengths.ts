/**
 * Adding up the stretches of boundary that areas share.
 *
 * @module
 */
import type { AreaContact, Scale } from "./area_contacts.ts";
import type { DrawnContiguity } from "./boundaries_as_drawn.ts";
import { linkAt, type Topology } from "./topology.ts";

/**
 * Gives each link of an `edge` topology the length of the shared boundary: segments that match, and stretches
 * along which loose segments run beside each other.
 *
 * @param edge Symmetric.
 * @param contacts Contacts between loose segments, measured in meters.
 * @param scale Meters in a coordinate unit eastward and northward, at a given y.
 */
export function measureShared(
  edge: Topology,
  { boundaries, segments, period }: DrawnContiguity,
  contacts: readonly AreaContact[],
  scale: (y: number) => Scale,
): Topology {
  const { xy } = boundaries;
  const given = new Float64Array(edge.indices.length);
  const add = (one: number, other: number, length: number) => {
    const there = linkAt(edge, one, other);
    if (there < 0) return;
    given[there] += length;
    given[linkAt(edge, other, one)] += length;
  };
  segments.starts.forEach((v, match) => {
    const { east, north } = scale((xy[2 * v + 1] + xy[2 * v + 3]) / 2);
    const span = Math.abs(xy[2 * v + 2] - xy[2 * v]);
    const dx = (period > 0 ? Math.min(span, period - span) : span) * east;
    const dy = (xy[2 * v + 3] - xy[2 * v + 1]) * north;
    add(segments.one[match], segments.other[match], Math.sqrt(dx * dx + dy * dy));
  });
  for (const { one, other, stretch } of contacts) add(one, other, stretch);
  return { ...edge, given };
}
