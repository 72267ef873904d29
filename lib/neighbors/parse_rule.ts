/**
 * The neighbor grammar:
 *
 * ```
 * rule    = product { ("+" | "-") product }
 * product = item { "&" item }
 * item    = ( term | "(" rule ")" ) { option }
 * term    = name [ ":" argument ]
 * option  = "mutual" | "either" | name "=" value
 * ```
 *
 * Operators stand between spaces; those of the same rank group from the left. Options bind to the
 * item they follow.
 *
 * @module
 */
import { isCombination, type Rule, type RuleOptions } from "./rule_tree.ts";
import { OPTION_NAMES, readOption, readTerm } from "./rule_words.ts";
import { ruleFault, type Token, tokenizeRule } from "./rule_tokens.ts";

/** Most levels of parentheses; deeper text is no rule a person wrote, and would overflow the stack. */
const DEEPEST = 100;

/**
 * Reads a rule such as `touching upto=2` or `(touching + nearest:4) mutual`.
 *
 * @throws {UsageError} with a line that points at the character that cannot be read; unknown names
 * come with the nearest known one.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.deepEqual(parseRule("nearest:8 mutual"), { kind: "nearest", count: 8, mutual: true });
 * ```
 */
export function parseRule(text: string): Rule {
  const reader: Reader = { text, tokens: tokenizeRule(text), next: 0, depth: 0 };
  const rule = readSum(reader);
  const rest = reader.tokens[reader.next];
  if (rest.kind === ")") throw ruleFault(text, rest.at, "Cannot close a parenthesis never opened");
  return rule;
}

/** The tokens and how far they have been read. */
interface Reader {
  readonly text: string;
  readonly tokens: readonly Token[];
  next: number;
  depth: number;
}

/** The next token when it is one of `texts`, moving past it. */
function take(reader: Reader, ...texts: string[]): string | null {
  const { text } = reader.tokens[reader.next];
  if (!texts.includes(text)) return null;
  reader.next++;
  return text;
}

function readSum(reader: Reader): Rule {
  let left = readProduct(reader);
  for (;;) {
    const sign = take(reader, "+", "-");
    if (sign === null) return left;
    left = { kind: sign === "+" ? "union" : "difference", left, right: readProduct(reader) };
  }
}

function readProduct(reader: Reader): Rule {
  let left = readItem(reader);
  while (take(reader, "&")) left = { kind: "intersection", left, right: readItem(reader) };
  return left;
}

function readItem(reader: Reader): Rule {
  const start = reader.tokens[reader.next];
  if (start.text === "(") return withOptions(reader, readGroup(reader));
  if (start.kind !== "word") {
    const found = start.kind === "end" ? "the end of the text" : `"${start.text}"`;
    throw ruleFault(reader.text, start.at, `Expected a neighbor rule but found ${found}`);
  }
  reader.next++;
  return withOptions(reader, readTerm(reader.text, start));
}

function readGroup(reader: Reader): Rule {
  const open = reader.tokens[reader.next++];
  if (++reader.depth > DEEPEST) {
    throw ruleFault(reader.text, open.at, `Cannot read more than ${DEEPEST} nested parentheses`);
  }
  const rule = readSum(reader);
  if (!take(reader, ")")) {
    const { kind, at, text } = reader.tokens[reader.next];
    throw kind === "end"
      ? ruleFault(reader.text, open.at, "Cannot find the parenthesis that closes this one")
      : ruleFault(reader.text, at, `Expected an operator, an option or ) but found "${text}"`);
  }
  reader.depth--;
  return rule;
}

/** Reads the options behind an item; an item that has some already becomes a group. */
function withOptions(reader: Reader, item: Rule): Rule {
  let options: RuleOptions = {};
  for (; reader.tokens[reader.next].kind === "word"; reader.next++) {
    options = { ...options, ...readOption(reader.text, reader.tokens[reader.next], item, options) };
  }
  if (Object.keys(options).length === 0) return item;
  const whole = isCombination(item) || OPTION_NAMES.some((name) => name in item);
  return whole ? { kind: "group", rule: item, ...options } : { ...item, ...options };
}
