/**
 * Which definitions a sweep tries, as plain data before anything is computed.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import { type Family, type Rule, ruleFamily, ruleNeeds, ruleText } from "../neighbors/rule.ts";
import { definitionText } from "./merge.ts";
import type { Definition } from "./standard.ts";

/** What a sweep is made from. */
export interface SweepRequest {
  /** The definition the rest of the report is about. */
  readonly main: Definition;
  /** Other rules to try; null for the standard sweep. */
  readonly vary: readonly Rule[] | null;
  /** Weights to cross the other rules with. @default the main definition's */
  readonly varyWeights?: readonly string[];
  /** The standard sweep, used where `vary` is null. @default none */
  readonly standard?: readonly Definition[];
  /** Most definitions that are accepted. @default 200 */
  readonly most?: number;
}

/** One definition of the plan. */
export interface PlannedDefinition {
  readonly rule: Rule;
  readonly ruleText: string;
  readonly weights: string;
  readonly family: Family;
  readonly main: boolean;
}

/** A sweep before it runs: what a dry run prints and the report quotes. */
export interface SweepPlan {
  /** The main definition first, then the others in the order given, each once. */
  readonly definitions: readonly PlannedDefinition[];
  /** Definitions that were named more than once, as text; they count once. */
  readonly repeated: readonly string[];
  /** How many definitions each family has. */
  readonly families: readonly { readonly family: Family; readonly definitions: number }[];
}

/**
 * Lines up the main definition and the others.
 *
 * The same rule with the same weights named twice is one definition. (Two different ones that turn out to
 * give the same links on this map are merged later, and count as two.) Weights that a rule cannot have
 * (`given` without a link file, `boundary` without boundaries) are replaced by `equal`.
 *
 * @throws {UsageError} when there are more definitions than `most`.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * import { parseRule } from "../neighbors/rule.ts";
 * const plan = planSweep({
 *   main: { rule: parseRule("touching"), weights: "equal" },
 *   vary: ["nearest:4", "touching"].map(parseRule),
 * });
 * assert.deepEqual(plan.definitions.map(({ ruleText }) => ruleText), ["touching", "nearest:4"]);
 * assert.deepEqual(plan.repeated, ["touching"]);
 * ```
 */
export function planSweep(request: SweepRequest): SweepPlan {
  const { main, most = 200 } = request;
  const all = [main, ...othersOf(request)].map(({ rule, weights }, at): PlannedDefinition => ({
    rule,
    ruleText: ruleText(rule),
    weights,
    family: familyOf(rule, weights),
    main: at === 0,
  }));
  const once = new Map<string, PlannedDefinition>();
  const repeated = new Set<string>();
  for (const definition of all) {
    const text = definitionText({ rule: definition.ruleText, weightsText: definition.weights });
    if (once.has(text)) repeated.add(text);
    else once.set(text, definition);
  }
  if (once.size > most) {
    throw new UsageError(
      `Cannot try ${once.size} definitions of neighbor as ${most} are the most; vary fewer rules`,
    );
  }
  const definitions = [...once.values()];
  return { definitions, repeated: [...repeated], families: familyCounts(definitions) };
}

function othersOf({ main, vary, varyWeights, standard = [] }: SweepRequest): readonly Definition[] {
  if (vary === null) return standard;
  const wanted = varyWeights ?? [main.weights];
  return vary.flatMap((rule) =>
    wanted.map((weights) => ({ rule, weights: canWeigh(rule, weights) ? weights : "equal" }))
  );
}

function canWeigh(rule: Rule, weights: string): boolean {
  const { linkFiles, boundaries } = ruleNeeds(rule);
  if (weights === "given") return linkFiles.length > 0;
  return weights === "boundary" ? boundaries : true;
}

/** Unequal weights make a family of their own; `given` ones belong to the links they came with. */
function familyOf(rule: Rule, weights: string): Family {
  return weights === "equal" || weights === "given" ? ruleFamily(rule) : "weighted";
}

function familyCounts(definitions: readonly PlannedDefinition[]): SweepPlan["families"] {
  const counts = new Map<Family, number>();
  for (const { family } of definitions) counts.set(family, (counts.get(family) ?? 0) + 1);
  return [...counts].map(([family, count]) => ({ family, definitions: count }));
}
