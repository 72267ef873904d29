/**
 * The grammar of filters: a subset of OGC CQL2 Text (OGC 21-065r2, annex B) as a tree.
 *
 * ```
 * filter     = and { OR and }
 * and        = factor { AND factor }
 * factor     = [ NOT ] ( predicate | "(" filter ")" )
 * predicate  = operand ( = | <> | < | <= | > | >= ) operand
 *            | operand [ NOT ] BETWEEN operand AND operand
 *            | operand [ NOT ] IN "(" operand { "," operand } ")"
 *            | operand [ NOT ] LIKE text
 *            | operand IS [ NOT ] NULL
 * operand    = field | number | text | TRUE | FALSE
 * field      = bare name (letters, digits, _ . :; not starting with a digit) | "name in double quotes"
 * text       = 'in single quotes, a quote inside doubled'
 * ```
 *
 * Keywords may be in any case.
 *
 * @module
 */
import { filterError, type Token, tokenize } from "./filter_tokens.ts";

/** Comparison signs. */
export type Sign = "=" | "<>" | "<" | "<=" | ">" | ">=";

/** A field or a literal, with the character where it stands (from 0) for messages. */
export type Operand =
  | { readonly kind: "field"; readonly name: string; readonly quoted: boolean; readonly at: number }
  | { readonly kind: "number"; readonly value: number; readonly at: number }
  | { readonly kind: "text"; readonly value: string; readonly at: number }
  | { readonly kind: "boolean"; readonly value: boolean; readonly at: number };

/** A filter as a tree. BETWEEN stands as two comparisons, IN as one comparison for each value. */
export type Expression =
  | { readonly kind: "and" | "or"; readonly parts: readonly Expression[] }
  | { readonly kind: "not"; readonly part: Expression }
  | {
    readonly kind: "compare";
    readonly sign: Sign;
    readonly left: Operand;
    readonly right: Operand;
  }
  | { readonly kind: "like"; readonly operand: Operand; readonly pattern: string }
  | { readonly kind: "null"; readonly operand: Operand };

/**
 * Parses a filter.
 *
 * @throws {UsageError} that points at the character with a caret.
 */
export function parseFilter(text: string): Expression {
  const reader = tokenReader(text);
  const expression = parseOr(reader);
  if (reader.peek().kind !== "end") throw reader.expected("AND, OR or the end of the filter");
  return expression;
}

/** Names of the fields a filter asks for, each once, in order of appearance. */
export function filterFields(text: string): string[] {
  const names = new Set<string>();
  const note = (operand: Operand) => operand.kind === "field" && names.add(operand.name);
  const visit = (expression: Expression): void => {
    switch (expression.kind) {
      case "and":
      case "or":
        return expression.parts.forEach(visit);
      case "not":
        return visit(expression.part);
      case "compare":
        return [expression.left, expression.right].forEach(note);
      default:
        note(expression.operand);
    }
  };
  visit(parseFilter(text));
  return [...names];
}

/** A place in the list of tokens. */
interface TokenReader {
  peek(): Token;
  take(): Token;
  /** Takes the next token if it is this keyword or sign. */
  accept(word: string): boolean;
  expect(word: string): void;
  expected(what: string): Error;
}

function tokenReader(text: string): TokenReader {
  const tokens = tokenize(text);
  let next = 0;
  const isNext = (word: string) =>
    tokens[next].text === word && (tokens[next].kind === "keyword" || tokens[next].kind === "sign");
  const expected = (what: string) => {
    const { at, kind, source } = tokens[next];
    return filterError(text, at, `expected ${what}, found ${kind === "end" ? "the end" : source}`);
  };
  return {
    expected,
    peek: () => tokens[next],
    take: () => tokens[next++],
    accept(word) {
      if (!isNext(word)) return false;
      next++;
      return true;
    },
    expect(word) {
      if (!isNext(word)) throw expected(word);
      next++;
    },
  };
}

function parseOr(reader: TokenReader): Expression {
  const parts = [parseAnd(reader)];
  while (reader.accept("OR")) parts.push(parseAnd(reader));
  return parts.length === 1 ? parts[0] : { kind: "or", parts };
}

function parseAnd(reader: TokenReader): Expression {
  const parts = [parseFactor(reader)];
  while (reader.accept("AND")) parts.push(parseFactor(reader));
  return parts.length === 1 ? parts[0] : { kind: "and", parts };
}

function parseFactor(reader: TokenReader): Expression {
  if (reader.accept("NOT")) return { kind: "not", part: parseFactor(reader) };
  if (!reader.accept("(")) return parsePredicate(reader);
  const inner = parseOr(reader);
  reader.expect(")");
  return inner;
}

function parsePredicate(reader: TokenReader): Expression {
  const left = parseOperand(reader, "a field or a value");
  if (reader.accept("IS")) {
    const negated = reader.accept("NOT");
    reader.expect("NULL");
    return negate(negated, { kind: "null", operand: left });
  }
  const { kind, text } = reader.peek();
  if (kind === "sign" && isComparison(text)) {
    reader.take();
    const right = parseOperand(reader, `a value or a field after ${text}`);
    return { kind: "compare", sign: text, left, right };
  }
  const negated = reader.accept("NOT");
  if (reader.accept("BETWEEN")) return negate(negated, parseBetween(reader, left));
  if (reader.accept("IN")) return negate(negated, parseIn(reader, left));
  if (reader.accept("LIKE")) return negate(negated, parseLike(reader, left));
  throw reader.expected(
    negated
      ? "BETWEEN, IN or LIKE"
      : "a comparison (=, <>, <, <=, >, >=), IN, BETWEEN, LIKE or IS NULL",
  );
}

function isComparison(text: string): text is Sign {
  return ["=", "<>", "<", "<=", ">", ">="].includes(text);
}

function negate(negated: boolean, part: Expression): Expression {
  return negated ? { kind: "not", part } : part;
}

function parseBetween(reader: TokenReader, left: Operand): Expression {
  const low = parseOperand(reader, "the lower bound of BETWEEN");
  reader.expect("AND");
  const high = parseOperand(reader, "the upper bound of BETWEEN");
  const parts: Expression[] = [
    { kind: "compare", sign: ">=", left, right: low },
    { kind: "compare", sign: "<=", left, right: high },
  ];
  return { kind: "and", parts };
}

function parseIn(reader: TokenReader, left: Operand): Expression {
  reader.expect("(");
  const parts: Expression[] = [];
  do {
    const right = parseOperand(reader, "a value");
    parts.push({ kind: "compare", sign: "=", left, right });
  } while (reader.accept(","));
  reader.expect(")");
  return { kind: "or", parts };
}

function parseLike(reader: TokenReader, operand: Operand): Expression {
  if (reader.peek().kind !== "text") throw reader.expected("a text in single quotes after LIKE");
  return { kind: "like", operand, pattern: reader.take().text };
}

function parseOperand(reader: TokenReader, what: string): Operand {
  const { kind, text, at, source } = reader.peek();
  const operand = ((): Operand | null => {
    if (kind === "name") return { kind: "field", name: text, quoted: source[0] === '"', at };
    if (kind === "number") return { kind, value: Number(text), at };
    if (kind === "text") return { kind, value: text, at };
    if (kind !== "keyword" || (text !== "TRUE" && text !== "FALSE")) return null;
    return { kind: "boolean", value: text === "TRUE", at };
  })();
  if (operand === null) throw reader.expected(what);
  reader.take();
  return operand;
}
