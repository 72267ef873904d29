/**
 * The one canonical way to write a rule.
 *
 * @module
 */
import { isCombination, OPERATORS, type Rule, type RuleOptions, type Term } from "./rule_tree.ts";

/**
 * A rule as text: single spaces, options in a fixed order, no parentheses and no options that change
 * nothing. `parseRule` reads it back to the same rule, and rules that differ only in how they were
 * written give the same text.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * import { parseRule } from "./parse_rule.ts";
 * assert.equal(ruleText(parseRule("(touching upto=1)  +  nearest:4")), "touching + nearest:4");
 * ```
 */
export function ruleText(rule: Rule): string {
  const core = unwrapped(rule);
  if (isCombination(core)) {
    const tight = core.kind === "intersection";
    const left = operand(core.left, tight ? ["union", "difference"] : []);
    const right = operand(core.right, ["union", "difference", tight ? "intersection" : ""]);
    return `${left} ${OPERATORS[core.kind]} ${right}`;
  }
  const options = optionTexts(core);
  if (core.kind !== "group") return [termText(core), ...options].join(" ");
  const inner = unwrapped(core.rule);
  const needless = !isCombination(inner) && optionTexts(inner).length === 0;
  return [needless ? ruleText(inner) : `(${ruleText(inner)})`, ...options].join(" ");
}

/** The rule inside parentheses that do nothing. */
function unwrapped(rule: Rule): Rule {
  const idle = rule.kind === "group" && optionTexts(rule).length === 0;
  return idle ? unwrapped(rule.rule) : rule;
}

/** The text of a rule beside an operator, in parentheses where its own operator binds too loosely. */
function operand(rule: Rule, loose: readonly string[]): string {
  return loose.includes(unwrapped(rule).kind) ? `(${ruleText(rule)})` : ruleText(rule);
}

function termText(term: Term): string {
  switch (term.kind) {
    case "nearest":
      return `nearest:${term.count}`;
    case "within":
      return `within:${term.distance.text}`;
    case "same":
      return `same:${quoted(term.field)}`;
    case "links":
      return `links:${quoted(term.file)}`;
    default:
      return term.kind;
  }
}

function optionTexts({ order, upto, mutual, either, snap, islands }: RuleOptions): string[] {
  return [
    order !== undefined && order !== 1 ? `order=${order}` : "",
    upto !== undefined && upto !== 1 ? `upto=${upto}` : "",
    mutual ? "mutual" : "",
    either ? "either" : "",
    snap ? `snap=${snap.text}` : "",
    islands ? `islands=${islands}` : "",
  ].filter((text) => text !== "");
}

/** A name as the grammar reads it back: in double quotes where a space or sign would end it. */
function quoted(name: string): string {
  const plain = name !== "" && !/[\s()"+&,]|\.\./.test(name);
  return plain ? name : `"${name.replaceAll('"', '""')}"`;
}
