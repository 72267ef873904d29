/**
 * A neighbor rule as data: what the grammar's text means, and what job files and code can write
 * without any text.
 *
 * @module
 */
import type { Length } from "../project/length.ts";

/**
 * What may follow a term or a group in parentheses; all may be left out. They work in this order:
 * `snap`, then `order` or `upto`, then `mutual` or `either`, then `islands`.
 */
export interface RuleOptions {
  /** Exactly this many steps apart. @default 1 */
  readonly order?: number;
  /** At most this many steps apart. @default 1 */
  readonly upto?: number;
  /** Keep a link only where both areas choose each other. */
  readonly mutual?: true;
  /** Link both ways where either area chooses the other. */
  readonly either?: true;
  /** Boundaries count as shared when no farther apart than this (`touching` and `edge` only). */
  readonly snap?: Length;
  /** `nearest`: link each area that is left alone with its nearest area, both ways. */
  readonly islands?: "nearest";
}

/** Areas that share any boundary point. */
export interface Touching extends RuleOptions {
  readonly kind: "touching";
}

/** Areas that share a stretch of boundary. */
export interface Edge extends RuleOptions {
  readonly kind: "edge";
}

/** The `count` nearest areas by representative point. */
export interface Nearest extends RuleOptions {
  readonly kind: "nearest";
  readonly count: number;
}

/** Areas whose points lie no farther apart than `distance`. */
export interface Within extends RuleOptions {
  readonly kind: "within";
  readonly distance: Length;
}

/** Graph rules on the points: Delaunay, Gabriel, relative neighborhood, sphere of influence. */
export interface PointGraph extends RuleOptions {
  readonly kind: "triangulated" | "gabriel" | "relative" | "sphere";
}

/** Areas with the same value of a field. */
export interface Same extends RuleOptions {
  readonly kind: "same";
  readonly field: string;
}

/** Pairs given in a file. */
export interface Links extends RuleOptions {
  readonly kind: "links";
  readonly file: string;
}

/** One rule without operators. */
export type Term = Touching | Edge | Nearest | Within | PointGraph | Same | Links;

/** Two rules combined: links of either, of both, or of the left without the right. */
export interface Combination {
  readonly kind: "union" | "intersection" | "difference";
  readonly left: Rule;
  readonly right: Rule;
}

/** A rule in parentheses with options of its own. */
export interface Group extends RuleOptions {
  readonly kind: "group";
  readonly rule: Rule;
}

/** Who is whose neighbor. */
export type Rule = Term | Combination | Group;

/** Names of the terms, in the order help lists them. */
export const TERM_NAMES = [
  "touching",
  "edge",
  "nearest",
  "within",
  "triangulated",
  "gabriel",
  "relative",
  "sphere",
  "same",
  "links",
] as const;

/** The signs between rules. */
export const OPERATORS = { union: "+", intersection: "&", difference: "-" } as const;

/** Whether a rule is two rules combined. */
export function isCombination(rule: Rule): rule is Combination {
  return rule.kind in OPERATORS;
}

/** Kinds of rules over which a sweep averages, so that ten bands do not outvote one contiguity. */
export type Family = "contiguity" | "nearest" | "band" | "graph" | "weighted" | "links";

const FAMILY_OF: Readonly<Record<Term["kind"], Family>> = {
  touching: "contiguity",
  edge: "contiguity",
  nearest: "nearest",
  within: "band",
  triangulated: "graph",
  gabriel: "graph",
  relative: "graph",
  sphere: "graph",
  same: "links",
  links: "links",
};

/**
 * The family of a rule. Blocks (`same`) belong with `links`: membership that was given, not measured.
 * A combination belongs to the family of its first term, which is the one being amended.
 * Options change no family. (`weighted` is never a rule's own: it is for unequal weights.)
 */
export function ruleFamily(rule: Rule): Family {
  if (rule.kind === "group") return ruleFamily(rule.rule);
  return isCombination(rule) ? ruleFamily(rule.left) : FAMILY_OF[rule.kind];
}

/** What must be at hand before a rule's neighbors can be found. */
export interface RuleNeeds {
  /** Points in a metric. */
  readonly points: boolean;
  /** Boundaries. */
  readonly boundaries: boolean;
  /** The widest `snap` of any term; null for none. */
  readonly snap: Length | null;
  /** Fields of `same` terms, each once. */
  readonly fields: readonly string[];
  /** Files of `links` terms, each once. */
  readonly linkFiles: readonly string[];
}

/** Collects what the terms and options of a rule need. */
export function ruleNeeds(rule: Rule): RuleNeeds {
  const parts = partsOf(rule);
  return {
    points: parts.some(needsPoints),
    boundaries: parts.some(({ kind }) => kind === "touching" || kind === "edge"),
    snap: parts.flatMap((part) => "snap" in part && part.snap ? [part.snap] : [])
      .reduce<Length | null>((a, b) => a && a.meters >= b.meters ? a : b, null),
    fields: unique(parts.flatMap((part) => part.kind === "same" ? [part.field] : [])),
    linkFiles: unique(parts.flatMap((part) => part.kind === "links" ? [part.file] : [])),
  };
}

function needsPoints(rule: Rule): boolean {
  if (isCombination(rule)) return false;
  if (rule.islands === "nearest") return true;
  return rule.kind !== "group" && ["nearest", "band", "graph"].includes(FAMILY_OF[rule.kind]);
}

function partsOf(rule: Rule): Rule[] {
  if (rule.kind === "group") return [rule, ...partsOf(rule.rule)];
  return isCombination(rule) ? [...partsOf(rule.left), ...partsOf(rule.right)] : [rule];
}

function unique(names: readonly string[]): string[] {
  return [...new Set(names)];
}
