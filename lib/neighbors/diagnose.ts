/**
 * What a careful person looks up about a map before trusting any links on it.
 *
 * @module
 */
import type { ContiguityFinder } from "./contiguity.ts";
import type { Length } from "../project/length.ts";
import type { PointSpace } from "./point_space.ts";
import { isLinked } from "./topology.ts";

/** How boundaries fit together; unordered pairs of areas throughout. */
export interface BoundaryDiagnostics {
  /** Pairs that share no vertex exactly, only within a billionth of the layer's diagonal. */
  nearVertexPairs: number;
  /** Pairs that share no vertex, but a vertex of one lies on a segment of the other. */
  junctionPairs: number;
  /** Pairs of polygons that overlap. */
  overlapPairs: number;
  /** Pairs that touch only because `snap` closed a gap. */
  snappedPairs: number;
  /** Pairs that do not touch but lie within a thousandth of an area's width, `snap` considered. */
  nearMisses: number;
  /** Widest gap among them in meters (map units without a CRS): what a `snap` needs; null where there are none. */
  widestGap: number | null;
}

/** Facts about places and boundaries that hold under every rule. */
export interface GroundDiagnostics {
  /** Areas whose point is that of another one too; null without distances, as the next two. */
  sharingPlaces: number | null;
  /** Shortest distance at which no area is alone; null with fewer than two places. */
  noneAlone: number | null;
  /** Shortest distance at which all areas hang together. */
  oneComponent: number | null;
  /** Null where there are no polygons. */
  boundaries: BoundaryDiagnostics | null;
}

/** What {@link diagnose} looks at. */
export interface DiagnoseInput {
  /** Distance between the usable areas; null where it cannot be measured. */
  readonly space: PointSpace | null;
  /** Boundaries of the kept areas; null where there are no polygons. */
  readonly contiguity: ContiguityFinder | null;
  /** The gap that the rule closes; null for none. */
  readonly snap: Length | null;
}

/** Collects the facts. Cost: a triangulation, and a search along all boundaries that nobody shares. */
export function diagnose({ space, contiguity, snap }: DiagnoseInput): GroundDiagnostics {
  const connecting = space && space.located > 1 ? space.connecting() : null;
  return {
    sharingPlaces: space && space.countSharing(),
    noneAlone: connecting && connecting.noneAlone,
    oneComponent: connecting && connecting.oneComponent,
    boundaries: contiguity && diagnoseBoundaries(contiguity, snap),
  };
}

/** How the boundaries of a layer fit together. @param snap The gap that is closed; null for none. */
export function diagnoseBoundaries(
  contiguity: ContiguityFinder,
  snap: Length | null = null,
): BoundaryDiagnostics {
  const { touching, report } = contiguity.find(snap);
  const { nearVertexPairs, junctionPairs, overlapPairs, snappedPairs } = report;
  const misses = contiguity.nearMisses().filter(({ one, other }) =>
    !isLinked(touching, one, other)
  );
  return {
    nearVertexPairs,
    junctionPairs,
    overlapPairs,
    snappedPairs,
    nearMisses: misses.length,
    widestGap: misses.at(-1)?.gap ?? null,
  };
}
