/**
 * Neighbor rules: their data, their text, and what they need. (A door to the files beside it.)
 *
 * @module
 */
export { parseRule } from "./parse_rule.ts";
export { ruleText } from "./rule_text.ts";
export { type Family, type Rule, ruleFamily, type RuleNeeds, ruleNeeds } from "./rule_tree.ts";
export type { Combination, Group, RuleOptions, Term } from "./rule_tree.ts";
