/**
 * Filters over rows, in a subset of OGC CQL2 Text (OGC 21-065r2).
 *
 * @module
 */
import type { ColumnValues } from "../layer/layer.ts";
import { suggestion } from "../layer/nearest_name.ts";
import { type Expression, type Operand, parseFilter, type Sign } from "./filter_syntax.ts";
import { filterError } from "./filter_tokens.ts";

/** True, false, or null for unknown: what SQL and CQL2 call three-valued logic. */
type Truth = boolean | null;
type Test = (row: number) => Truth;

/**
 * Turns a filter such as `region = 'north' AND pop >= 500` into a test of row numbers. The grammar stands in
 * `filter_syntax.ts`: comparisons, AND, OR, NOT, parentheses, IN, BETWEEN, LIKE with `%` and `_`, IS NULL.
 *
 * - A text field against a number compares as numbers where the cell is a plain number (decimal point, no
 *   thousands mark) and is unknown elsewhere; against a quoted text it compares as text, so `code = '0042'` keeps
 *   its zeros. A number field against a quoted text compares as numbers.
 * - Texts compare exactly, by UTF-16 code units. Dates are ISO texts, which order well.
 * - Null is unknown in every comparison, and NOT unknown is unknown; only rows whose filter is true are
 *   selected. An empty text is a text, not null.
 *
 * Cost of one test: the size of the filter.
 *
 * @param columns Columns of equal length; only those named in the filter are looked at (see `filterFields`).
 * @throws {UsageError} that points at the character with a caret: bad grammar, unknown field, values that cannot be compared.
 */
export function compileFilter(
  text: string,
  columns: readonly ColumnValues[],
): (row: number) => boolean {
  const test = compile(parseFilter(text), { text, columns });
  return (row) => test(row) === true;
}

interface Context {
  readonly text: string;
  readonly columns: readonly ColumnValues[];
}

function compile(expression: Expression, context: Context): Test {
  switch (expression.kind) {
    case "and":
      return combine(expression.parts.map((part) => compile(part, context)), false);
    case "or":
      return combine(expression.parts.map((part) => compile(part, context)), true);
    case "not": {
      const test = compile(expression.part, context);
      return (row) => {
        const truth = test(row);
        return truth === null ? null : !truth;
      };
    }
    case "compare":
      return comparison(expression.sign, expression.left, expression.right, context);
    case "like":
      return likeness(expression.operand, expression.pattern, context);
    case "null": {
      const { read } = source(expression.operand, context);
      return (row) => read(row) === null;
    }
  }
}

/** OR is decided by a first true, AND by a first false; else one unknown makes all unknown. */
function combine(tests: readonly Test[], deciding: boolean): Test {
  return (row) => {
    let truth: Truth = !deciding;
    for (const test of tests) {
      const part = test(row);
      if (part === deciding) return deciding;
      if (part === null) truth = null;
    }
    return truth;
  };
}

/** Where the values of an operand come from. Booleans are the numbers 0 and 1. */
type Source =
  | { readonly holds: "number" | "boolean"; readonly read: (row: number) => number | null }
  | { readonly holds: "text"; readonly read: (row: number) => string | null };

function source(operand: Operand, context: Context): Source {
  if (operand.kind === "field") return columnSource(operand, context);
  if (operand.kind === "text") return { holds: "text", read: () => operand.value };
  const value = Number(operand.value);
  return { holds: operand.kind, read: () => value };
}

function columnSource(field: Operand & { kind: "field" }, { text, columns }: Context): Source {
  const column = columns.find(({ name }) => name === field.name);
  if (column === undefined) {
    const hint = suggestion(field.name, columns.map(({ name }) => name)) ||
      (field.quoted ? "; texts stand in single quotes" : "");
    throw filterError(text, field.at, `there is no field "${field.name}"${hint}`);
  }
  const { values, kind } = column;
  if (!(values instanceof Float64Array)) return { holds: "text", read: (row) => values[row] };
  return {
    holds: kind === "boolean" ? "boolean" : "number",
    read: (row) => Number.isNaN(values[row]) ? null : values[row],
  };
}

const HOLDS: Record<Sign, (order: number) => boolean> = {
  "=": (order) => order === 0,
  "<>": (order) => order !== 0,
  "<": (order) => order < 0,
  "<=": (order) => order <= 0,
  ">": (order) => order > 0,
  ">=": (order) => order >= 0,
};

function comparison(sign: Sign, left: Operand, right: Operand, context: Context): Test {
  const a = source(left, context), b = source(right, context);
  const holds = HOLDS[sign];
  const compare = <Value extends string | number>(
    readA: (row: number) => Value | null,
    readB: (row: number) => Value | null,
  ): Test =>
  (row) => {
    const x = readA(row), y = readB(row);
    return x === null || y === null ? null : holds(x < y ? -1 : x > y ? 1 : 0);
  };
  if (a.holds === "text" && b.holds === "text") return compare(a.read, b.read);
  const boolean = a.holds === "boolean" || b.holds === "boolean";
  return compare(numberReader(a, left, boolean, context), numberReader(b, right, boolean, context));
}

const PLAIN_NUMBER = /^\s*[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?\s*$/;

/** Reads texts as numbers, and as truth values where the other side is one. */
function numberReader(
  from: Source,
  operand: Operand,
  boolean: boolean,
  context: Context,
): (row: number) => number | null {
  if (from.holds !== "text") return from.read;
  const read = (text: string | null) => {
    if (text === null) return null;
    if (boolean && /^true$/i.test(text)) return 1;
    if (boolean && /^false$/i.test(text)) return 0;
    return PLAIN_NUMBER.test(text) ? Number(text) : null;
  };
  if (operand.kind === "text" && read(operand.value) === null) {
    const wanted = boolean ? "TRUE or FALSE" : "a number";
    throw filterError(
      context.text,
      operand.at,
      `'${operand.value}' is compared with a field that ` +
        `holds ${boolean ? "truth values" : "numbers"}, so it must be ${wanted}`,
    );
  }
  return (row) => read(from.read(row));
}

function likeness(operand: Operand, pattern: string, context: Context): Test {
  const from = source(operand, context);
  if (from.holds !== "text") {
    throw filterError(
      context.text,
      operand.at,
      "LIKE needs a text field; compare numbers with = or <",
    );
  }
  const shape = likePattern(pattern);
  return (row) => {
    const text = from.read(row);
    return text === null ? null : shape.test(text);
  };
}

/** `%` is any run of characters, `_` is one character; a backslash before either takes it literally. */
function likePattern(pattern: string): RegExp {
  const body = pattern.replace(/\\[%_\\]|[\s\S]/gu, (piece) => {
    if (piece === "%") return ".*";
    if (piece === "_") return ".";
    return piece.at(-1)!.replace(/[\\^$.*+?()[\]{}|/]/, "\\$&");
  });
  return new RegExp(`^${body}$`, "su");
}
