/**
 * From a rule to links.
 *
 * @module
 */
import { difference, either, intersection, mutual, union } from "./combine.ts";
import type { Ground } from "./ground.ts";
import { linkIslands } from "./islands.ts";
import { type Group, isCombination, type Rule, type RuleOptions, type Term } from "./rule_tree.ts";
import { ruleText } from "./rule_text.ts";
import { groundSources, type Sources } from "./sources.ts";
import { stepsApart } from "./steps.ts";
import type { Topology } from "./topology.ts";

export type { Ground } from "./ground.ts";

/**
 * A function that finds the neighbors of any rule among the usable areas, numbered anew in order.
 *
 * Contiguity, `links` and `same` are facts about all kept areas: these terms with their `order`, `upto`,
 * `mutual` and `either` are found there, then the unusable areas are taken out. Distance and graph rules,
 * `islands=nearest`, operators and groups work among the usable areas only. What was found once is
 * remembered, so that a sweep pays for each term once.
 *
 * @throws {UsageError} from the function, when the ground lacks what the rule needs.
 * @throws {UnfitDataError} from the function, when there are too few areas or too many links.
 *
 * @example Three places on a line, each linked with its nearest, both ways
 * ```ts
 * import assert from "node:assert/strict";
 * import { parseRule } from "./rule.ts";
 * const build = neighborBuilder({
 *   geometry: null,
 *   points: Float64Array.of(0, 0, 10, 0, 15, 0),
 *   count: 3,
 *   usable: Uint8Array.of(1, 1, 1),
 * });
 * const { offsets, indices } = build(parseRule("nearest:1 either"));
 * assert.deepEqual([...offsets], [0, 1, 3, 4]);
 * assert.deepEqual([...indices], [1, 0, 2, 1]);
 * ```
 */
export function neighborBuilder(ground: Ground): (rule: Rule) => Topology {
  const sources = groundSources(ground);
  const known = new Map<string, Topology>();
  return function build(rule: Rule): Topology {
    const text = ruleText(rule);
    const topology = known.get(text) ?? linkRule(rule, sources, build);
    known.set(text, topology);
    return topology;
  };
}

type Build = (rule: Rule) => Topology;

const COMBINE = { union, intersection, difference } as const;

function linkRule(rule: Rule, sources: Sources, build: Build): Topology {
  if (isCombination(rule)) return COMBINE[rule.kind](build(rule.left), build(rule.right));
  const { islands, ...without } = rule;
  if (islands) return linkIslands(build(without), () => sources.space().nearest(1).topology);
  return linkTerm(rule, sources, build);
}

function linkTerm(rule: Term | Group, sources: Sources, build: Build): Topology {
  switch (rule.kind) {
    case "group":
      return applyOptions(build(rule.rule), rule);
    case "touching":
    case "edge": {
      const contiguity = sources.contiguity(rule.snap ?? null);
      return sources.amongUsable(applyOptions(contiguity[rule.kind], rule));
    }
    case "links":
      return sources.amongUsable(applyOptions(sources.links(rule.file), rule));
    case "same":
      return sources.amongUsable(applyOptions(sources.blocks(rule.field), rule));
    case "nearest":
      return applyOptions(sources.space().nearest(rule.count).topology, rule);
    case "within":
      return applyOptions(sources.space().within(rule.distance.meters), rule);
    default:
      return applyOptions(sources.space().graph(rule.kind), rule);
  }
}

function applyOptions(topology: Topology, options: RuleOptions): Topology {
  const { order = 1, upto = order } = options;
  const fewest = options.order ?? 1;
  const reached = upto === 1 ? topology : stepsApart(topology, fewest, upto);
  if (options.mutual) return mutual(reached);
  return options.either ? either(reached) : reached;
}
