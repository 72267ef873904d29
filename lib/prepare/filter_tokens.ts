/**
 * Words, signs and literals of a filter, and how its errors point at them.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";

/** A piece of a filter. */
export interface Token {
  readonly kind: "name" | "number" | "text" | "keyword" | "sign" | "end";
  /** What it means: keywords in upper case, quotes taken off. */
  readonly text: string;
  /** What stands in the filter. */
  readonly source: string;
  /** Character where it begins, from 0. */
  readonly at: number;
}

const KEYWORDS = ["AND", "OR", "NOT", "IN", "BETWEEN", "LIKE", "IS", "NULL", "TRUE", "FALSE"];

/** Sticky patterns in the order they are tried. */
const PATTERNS: readonly [Token["kind"], RegExp][] = [
  ["text", /'(?:[^']|'')*'/y],
  ["name", /"(?:[^"]|"")+"/y],
  ["number", /[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?(?![\p{L}\p{N}_.:])/uy],
  ["name", /[\p{L}_][\p{L}\p{N}_.:]*/uy],
  ["sign", /<=|>=|<>|=(?!=)|[<>(),]/y],
];

/** Slips that deserve a better answer than "unexpected character". */
const SLIPS: readonly [RegExp, string][] = [
  [/==/y, "write = instead of =="],
  [/!=/y, "write <> instead of !="],
  [/&&/y, "write AND instead of &&"],
  [/\|\|/y, "write OR instead of ||"],
  [/'/y, "the single quote opened here is never closed"],
  [/"/y, "the double quote opened here is never closed, or holds no name"],
  [/\d/y, "put a field name that begins with a digit in double quotes, a text in single quotes"],
];

/**
 * Splits a filter into tokens; the last one is always `end`.
 *
 * @throws {UsageError} that points at the first character that fits nowhere.
 */
export function tokenize(text: string): Token[] {
  const tokens: Token[] = [];
  let at = skipBlanks(text, 0);
  while (at < text.length) {
    const token = tokenAt(text, at);
    tokens.push(token);
    at = skipBlanks(text, at + token.source.length);
  }
  return [...tokens, { kind: "end", text: "", source: "", at }];
}

function tokenAt(text: string, at: number): Token {
  for (const [kind, pattern] of PATTERNS) {
    const source = matchAt(pattern, text, at);
    if (source !== null) return meaning(kind, source, at);
  }
  const slip = SLIPS.find(([pattern]) => matchAt(pattern, text, at) !== null);
  throw filterError(text, at, slip?.[1] ?? `${text[at]} has no meaning here`);
}

function meaning(kind: Token["kind"], source: string, at: number): Token {
  if (kind === "text") {
    return { kind, text: source.slice(1, -1).replaceAll("''", "'"), source, at };
  }
  if (kind !== "name") return { kind, text: source, source, at };
  if (source[0] === '"') {
    return { kind, text: source.slice(1, -1).replaceAll('""', '"'), source, at };
  }
  const keyword = source.toUpperCase();
  if (KEYWORDS.includes(keyword)) return { kind: "keyword", text: keyword, source, at };
  return { kind, text: source, source, at };
}

function skipBlanks(text: string, at: number): number {
  return at + (matchAt(/\s+/y, text, at)?.length ?? 0);
}

function matchAt(pattern: RegExp, text: string, at: number): string | null {
  const here = new RegExp(pattern);
  here.lastIndex = at;
  return here.exec(text)?.[0] ?? null;
}

/** A usage error that shows the filter with a caret below the character at `at` (from 0). */
export function filterError(text: string, at: number, reason: string): UsageError {
  const shown = text.replace(/\s/g, " ");
  return new UsageError(
    `Cannot read the filter at character ${at + 1}: ${reason}\n  ${shown}\n  ${" ".repeat(at)}^`,
  );
}
