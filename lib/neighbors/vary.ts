/**
 * Many rules in one text, for a sweep:
 *
 * ```
 * vary    = pattern { "," pattern }
 * pattern = a rule in which the number or length of nearest:, within:, order=, upto= and snap= may be a list
 * list    = piece { "," piece }
 * piece   = value | value ".." value [ "/" count ]
 * ```
 *
 * A comma before a digit goes on with the list, any other comma starts the next pattern. `4..12` takes
 * steps of 1; `2km..20km/10` takes 10 values from end to end. Several lists in one pattern give every
 * combination, the last list changing fastest.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import { parseRule } from "./parse_rule.ts";
import { ruleFault, tokenizeRule } from "./rule_tokens.ts";
import type { Rule } from "./rule_tree.ts";
import { rangeValues } from "./vary_range.ts";

/** Most definitions that one text may span. */
const MOST = 1000;

/**
 * Reads a text such as `nearest:4..12`, `within:2km..20km/10`, `touching upto=1..3` or
 * `touching, edge, nearest:4,5,6 mutual` into rules, in the order written.
 *
 * @throws {UsageError} with a line that points at the character that cannot be read.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * import { ruleText } from "./rule_text.ts";
 * assert.deepEqual(parseVary("edge, nearest:4..6").map(ruleText), [
 *   "edge",
 *   "nearest:4",
 *   "nearest:5",
 *   "nearest:6",
 * ]);
 * ```
 */
export function parseVary(text: string): Rule[] {
  const rules: Rule[] = [];
  for (const pattern of splitPatterns(text)) {
    for (const single of expandPattern(text, pattern)) {
      if (rules.length === MOST) {
        throw new UsageError(
          `Cannot vary "${text}" over more than ${MOST} definitions; use fewer or shorter ranges`,
        );
      }
      rules.push(parseRule(single));
    }
  }
  return rules;
}

/** A stretch of the whole text. */
interface Stretch {
  readonly at: number;
  readonly text: string;
}

/** Cuts at commas outside quotes that no digit follows. */
function splitPatterns(text: string): Stretch[] {
  const patterns: Stretch[] = [];
  let start = 0, quoted = false;
  for (let at = 0; at <= text.length; at++) {
    if (text[at] === '"') quoted = !quoted;
    const comma = text[at] === "," && !quoted && !/^\s*[.\d]/.test(text.slice(at + 1));
    if (!comma && at < text.length) continue;
    patterns.push({ at: start, text: text.slice(start, at) });
    start = at + 1;
  }
  const empty = patterns.find((pattern) => pattern.text.trim() === "");
  if (empty) throw ruleFault(text, empty.at, "Expected a neighbor rule but found nothing");
  return patterns;
}

/** The texts that a pattern stands for, one at a time so that a huge product is never held. */
function* expandPattern(whole: string, pattern: Stretch): Generator<string> {
  const joined = pattern.text.replace(/,\s+(?=[.\d])/g, ",");
  const choices = tokenizeRule(joined).map((token) =>
    wordChoices(whole, pattern.at + token.at, token.text)
  );
  const picks = choices.map(() => 0);
  for (;;) {
    yield choices.map((choice, c) => choice[picks[c]]).join(" ").trim();
    let last = picks.length - 1;
    while (last >= 0 && ++picks[last] === choices[last].length) picks[last--] = 0;
    if (last < 0) return;
  }
}

const LISTED = /^(nearest:|within:|order=|upto=|snap=)(.*)$/;

function wordChoices(whole: string, at: number, word: string): string[] {
  const match = LISTED.exec(word);
  if (!match) return [word];
  const [, head, list] = match;
  const lengths = head === "within:" || head === "snap=";
  try {
    return list.split(",").flatMap((piece) => rangeValues(piece, lengths)).map((v) => head + v);
  } catch (error) {
    if (error instanceof UsageError) throw ruleFault(whole, at + head.length, error.message);
    throw error;
  }
}
