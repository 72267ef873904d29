/**
 * From a rule to weights on the used areas.
 *
 * @module
 */
import { neighborBuilder } from "../neighbors/build.ts";
import { describeTopology, type NeighborSummary } from "../neighbors/describe.ts";
import { boundaryLengths } from "../neighbors/boundary_lengths.ts";
import { openSpace } from "../neighbors/open_space.ts";
import type { PointSpace } from "../neighbors/point_space.ts";
import { type Rule, ruleNeeds, ruleText } from "../neighbors/rule.ts";
import type { Topology } from "../neighbors/topology.ts";
import type { Standardize } from "../weights/standardize.ts";
import { weigh } from "../weights/weigh.ts";
import { parseWeightRule, type WeightRule } from "../weights/weight_rule.ts";
import type { Weights } from "../weights/weights.ts";
import type { LaidGround } from "./lay_ground.ts";

/** One definition of neighbor on this map. */
export interface BuiltDefinition {
  readonly summary: NeighborSummary;
  readonly topology: Topology;
  readonly weights: Weights;
}

/** What a {@link definitionBuilder} needs besides the ground. */
export interface BuilderOptions {
  readonly standardize: Standardize;
  /** What to call used area i in messages. */
  readonly nameOf: (i: number) => string;
}

/** Builds definitions on one ground; terms that several rules share are found once. */
export interface DefinitionBuilder {
  /** Distance between the used areas; null without a metric. */
  readonly space: PointSpace | null;
  build(rule: Rule, weights: string): BuiltDefinition;
}

/** See {@link DefinitionBuilder}. */
export function definitionBuilder(
  { ground }: LaidGround,
  { standardize, nameOf }: BuilderOptions,
): DefinitionBuilder {
  const space = spaceOf(ground);
  const topologyOf = neighborBuilder({ ...ground, space });
  return {
    space,
    build: (rule, weightsText) => {
      const topology = topologyOf(rule);
      const weightRule = parseWeightRule(weightsText);
      const weights = weigh(topology, {
        weights: weightRule,
        standardize,
        distance: space?.distance,
        bandwidths: space ? adaptiveBandwidths(space, weightRule) : undefined,
        boundaryLength: weightRule.kind === "boundary"
          ? boundaryLengths(ground, topology, ruleNeeds(rule).snap)
          : undefined,
        idOf: nameOf,
      });
      const summary = describeTopology(topology, {
        rule: ruleText(rule),
        distance: space?.distance,
      });
      return { summary, topology, weights };
    },
  };
}

function spaceOf({ points, usable, ellipsoid }: LaidGround["ground"]): PointSpace | null {
  if (points === null) return null;
  return openSpace(points.filter((_, at) => usable[at >> 1] === 1), ellipsoid);
}

/** Distance of each area to its N-th nearest, for a `kN` bandwidth; undefined for all others. */
function adaptiveBandwidths(space: PointSpace, rule: WeightRule): Float64Array | undefined {
  if (!("bandwidth" in rule) || rule.bandwidth.kind !== "adaptive") return undefined;
  return space.toNearest(rule.bandwidth.nearest);
}
