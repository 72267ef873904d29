/**
 * Words and signs of the rule grammar, and errors that point at the character.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";

/** A piece of a rule with its place in the text. */
export interface Token {
  readonly kind: "word" | "operator" | "(" | ")" | "end";
  /** As written, quotes included. */
  readonly text: string;
  /** 0-based position of its first character. */
  readonly at: number;
}

/**
 * Splits a rule into words, operators and parentheses, with an `end` token behind the last.
 * A word runs to the next space or parenthesis; double quotes inside a word keep both, and `""` in
 * quotes is one quote.
 *
 * @throws {UsageError} pointing at a quote that never closes.
 */
export function tokenizeRule(text: string): Token[] {
  const tokens: Token[] = [];
  let at = 0;
  while (at < text.length) {
    if (/\s/.test(text[at])) {
      at++;
      continue;
    }
    const end = "()".includes(text[at]) ? at + 1 : wordEnd(text, at);
    const piece = text.slice(at, end);
    tokens.push({ kind: kindOf(piece), text: piece, at });
    at = end;
  }
  tokens.push({ kind: "end", text: "", at: text.length });
  return tokens;
}

function kindOf(piece: string): Token["kind"] {
  if (piece === "(" || piece === ")") return piece;
  return /^[+&-]$/.test(piece) ? "operator" : "word";
}

function wordEnd(text: string, start: number): number {
  let at = start;
  while (at < text.length && !/[\s()]/.test(text[at])) {
    at = text[at] === '"' ? quoteEnd(text, at) : at + 1;
  }
  return at;
}

function quoteEnd(text: string, start: number): number {
  for (let at = start + 1; at < text.length; at++) {
    if (text[at] !== '"') continue;
    if (text[at + 1] !== '"') return at + 1;
    at++;
  }
  throw ruleFault(text, start, "Cannot find the quote that closes this one in the neighbor rule");
}

/**
 * A usage error whose message shows the rule below the sentence, with a caret under the character.
 *
 * @param at 0-based position of the character.
 */
export function ruleFault(text: string, at: number, sentence: string): UsageError {
  const line = text.replace(/\s/g, " ");
  return new UsageError(`${sentence}\n  ${line}\n  ${" ".repeat(at)}^`);
}
