/**
 * The rules `touching` and `edge`, found together from the boundaries.
 *
 * @module
 */
import { boundsOf, type FlatGeometry } from "../layer/geometry.ts";
import type { Length } from "../project/length.ts";
import { type AreaContact, areaContacts, type Scale } from "./area_contacts.ts";
import { type Contiguity, findAsDrawn, linkPairs, MIN_STRETCH } from "./boundaries_as_drawn.ts";
import { union } from "./combine.ts";
import { fitsGlobe, metersPerDegree } from "./globe.ts";
import { once } from "./once.ts";
import { indexSegments } from "./segment_index.ts";
import { smallGap } from "./small_gap.ts";
import { measureShared } from "./shared_lengths.ts";
import { isLinked, type Topology } from "./topology.ts";

export type { Contiguity, ContiguityReport } from "./boundaries_as_drawn.ts";

/** Two areas that come close without touching. */
export interface NearMiss {
  readonly one: number;
  readonly other: number;
  /** Smallest distance between their boundaries, in meters (map units where there is no CRS). */
  readonly gap: number;
}

/** Asks about the boundaries of one layer; what was found for one question serves the next. */
export interface ContiguityFinder {
  /** Shared boundaries as they are drawn (null), or with gaps up to a length closed. */
  readonly find: (snap: Length | null) => Contiguity;
  /**
   * Pairs at most `gap` meters apart that do not touch, narrowest first. With a small gap these are
   * digitizing errors; a `snap` of no less than their gaps links them. @default {@link smallGap}
   */
  readonly nearMisses: (gap?: number) => NearMiss[];
  /** The `edge` topology with the length of each shared boundary, in meters, as `given`. */
  readonly sharedLengths: (snap: Length | null) => Topology;
}

/** In what units the boundaries are. */
export interface ContiguityOptions {
  /** Whether they are longitude and latitude in degrees; taken as flat where they cannot be. @default false */
  readonly geographic?: boolean;
  /** Meters in a unit of projected boundaries. @default 1 */
  readonly metersPerUnit?: number;
}

/**
 * Prepares to find shared boundaries, in the layer's own coordinates: {@link findAsDrawn} says how.
 *
 * Gaps are measured in meters at their place. Only segments that no other area has take part in closing them,
 * so that areas thinner than the gap do not link what lies on either side of them.
 *
 * @throws {UnfitDataError} from the functions, for a layer of nothing but points.
 */
export function contiguityFinder(
  geometry: FlatGeometry,
  options: ContiguityOptions = {},
): ContiguityFinder {
  const { metersPerUnit = 1 } = options;
  const geographic = options.geographic === true && fitsGlobe(boundsOf(geometry) ?? [0, 0, 0, 0]);
  const scale = (y: number): Scale =>
    geographic ? metersPerDegree(y) : { east: metersPerUnit, north: metersPerUnit };
  const drawn = once(() => findAsDrawn(geometry, geographic));
  const looseIndex = once(() => {
    const { boundaries, segments, period } = drawn();
    return indexSegments(boundaries, segments.loose, period);
  });
  const snapped = new Map<number, Contiguity>();

  /** Contacts across gaps, of pairs that touch and of pairs that do not. */
  function contactsWithin(reach: number): AreaContact[] {
    const { boundaries, segments, period } = drawn();
    const search = { from: segments.loose, index: looseIndex(), reach, scale, period };
    return areaContacts(boundaries, search);
  }

  function close(reach: number): Contiguity {
    const { touching, edge, report } = drawn();
    const contacts = contactsWithin(reach);
    const along = contacts.filter(({ stretch }) => stretch > MIN_STRETCH * reach);
    const joined = union(touching, linkPairs(geometry.kinds.length, contacts));
    const snappedPairs = (joined.indices.length - touching.indices.length) / 2;
    return {
      touching: joined,
      edge: union(edge, linkPairs(geometry.kinds.length, along)),
      report: { ...report, snappedPairs },
    };
  }

  function find(snap: Length | null): Contiguity {
    if (snap === null) return drawn();
    const contiguity = snapped.get(snap.meters) ?? close(snap.meters);
    snapped.set(snap.meters, contiguity);
    return contiguity;
  }

  return {
    find,
    nearMisses: (gap = smallGap(geometry, scale)) =>
      contactsWithin(gap)
        .filter(({ one, other }) => !isLinked(drawn().touching, one, other))
        .map(({ one, other, gap }) => ({ one, other, gap }))
        .sort((a, b) => a.gap - b.gap || a.one - b.one || a.other - b.other),
    sharedLengths: (snap) => {
      const contacts = contactsWithin(snap?.meters ?? drawn().report.tolerance * scale(0).north);
      return measureShared(find(snap).edge, drawn(), contacts, scale);
    },
  };
}
