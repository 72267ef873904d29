/**
 * From a rule to weights on the used areas.
 *
 * @module
 */
import { neighborBuilder } from "../neighbors/build.ts";
import { describeTopology, type NeighborSummary } from "../neighbors/describe.ts";
import { kNearestDistances } from "../neighbors/distances.ts";
import { type Rule, ruleText } from "../neighbors/rule.ts";
import type { Topology } from "../neighbors/topology.ts";
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
  readonly standardize: "row" | "none";
  /** What to call used area i in messages. */
  readonly nameOf: (i: number) => string;
}

/** Builds definitions on one ground; terms that several rules share are found once. */
export interface DefinitionBuilder {
  /** Points of the used areas in the metric, x0, y0, …; null without one. */
  readonly points: Float64Array | null;
  build(rule: Rule, weights: string): BuiltDefinition;
}

/** See {@link DefinitionBuilder}. */
export function definitionBuilder(
  { ground }: LaidGround,
  { standardize, nameOf }: BuilderOptions,
): DefinitionBuilder {
  const topologyOf = neighborBuilder(ground);
  const points = ground.points && usablePoints(ground.points, ground.usable);
  return {
    points,
    build: (rule, weightsText) => {
      const topology = topologyOf(rule);
      const weightRule = parseWeightRule(weightsText);
      const weights = weigh(topology, {
        weights: weightRule,
        standardize,
        points,
        bandwidths: points === null ? undefined : adaptiveBandwidths(points, weightRule),
        idOf: nameOf,
      });
      const summary = describeTopology(topology, { rule: ruleText(rule), points });
      return { summary, topology, weights };
    },
  };
}

function usablePoints(points: Float64Array, usable: Uint8Array): Float64Array {
  return points.filter((_, at) => usable[at >> 1] === 1);
}

/** Distance of each area to its N-th nearest, for a `kN` bandwidth; undefined for all others. */
function adaptiveBandwidths(points: Float64Array, rule: WeightRule): Float64Array | undefined {
  if (!("bandwidth" in rule) || rule.bandwidth.kind !== "adaptive") return undefined;
  return kNearestDistances(points, rule.bandwidth.nearest);
}
