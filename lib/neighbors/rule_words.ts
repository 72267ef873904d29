/**
 * What the words of a rule mean: terms with their arguments, options with their values.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import { nearestName } from "../layer/nearest_name.ts";
import { type Length, parseLength } from "../project/length.ts";
import { type Rule, type RuleOptions, type Term, TERM_NAMES } from "./rule_tree.ts";
import { ruleFault, type Token } from "./rule_tokens.ts";

/** Names of the options, in canonical order. */
export const OPTION_NAMES = ["order", "upto", "mutual", "either", "snap", "islands"] as const;

/** How each term that takes an argument is written. */
const WITH_ARGUMENT = {
  nearest: "nearest:8",
  within: "within:5km",
  same: "same:REGION",
  links: "links:FILE.csv",
} as const;

/** Options of which an item can have only one. */
const RIVALS: Readonly<Record<string, string>> = {
  order: "upto",
  upto: "order",
  mutual: "either",
  either: "mutual",
};

/** A word in the text it stands in. */
interface Word {
  readonly rule: string;
  readonly at: number;
  readonly text: string;
}

/**
 * Reads a term such as `touching` or `nearest:8`.
 *
 * @param rule The whole text, for error messages.
 * @throws {UsageError} pointing at the name or the argument.
 */
export function readTerm(rule: string, { text, at }: Token): Term {
  const colon = text.search(/:|$/);
  const name = text.slice(0, colon);
  const known = TERM_NAMES.find((term) => term === name);
  if (known === undefined) throw unknownName({ rule, at, text });
  const takes = known in WITH_ARGUMENT;
  if (takes !== colon < text.length) {
    const written = takes ? WITH_ARGUMENT[known as keyof typeof WITH_ARGUMENT] : known;
    const fault = takes ? "needs its argument" : "takes no argument";
    const where = takes ? at : at + colon;
    throw ruleFault(rule, where, `The neighbor rule "${name}" ${fault}; write ${written}`);
  }
  const argument = { rule, at: at + colon + 1, text: text.slice(colon + 1) };
  switch (known) {
    case "nearest":
      return { kind: known, count: wholeNumber(argument, `"nearest"`) };
    case "within":
      return { kind: known, distance: length(argument) };
    case "same":
      return { kind: known, field: unquoted(argument, "field") };
    case "links":
      return { kind: known, file: unquoted(argument, "file") };
    default:
      return { kind: known };
  }
}

/**
 * Reads one option such as `upto=2` or `mutual`.
 *
 * @param rule The whole text, for error messages.
 * @param item What the option is for.
 * @param before Options that the item has so far.
 * @throws {UsageError} pointing at the option or its value.
 */
export function readOption(
  rule: string,
  { text, at }: Token,
  item: Rule,
  before: RuleOptions,
): RuleOptions {
  const equals = text.search(/=|$/);
  const name = text.slice(0, equals);
  const known = OPTION_NAMES.find((option) => option === name);
  if (known === undefined) throw unexpectedWord({ rule, at, text });
  if (known in before) throw ruleFault(rule, at, `Cannot give the option "${name}" twice`);
  if (RIVALS[known] in before) {
    throw ruleFault(rule, at, `Cannot have both "${RIVALS[known]}" and "${name}"; choose one`);
  }
  const value = { rule, at: at + equals + 1, text: text.slice(equals + 1) };
  const bare = known === "mutual" || known === "either";
  if (bare !== (equals === text.length)) {
    const fault = bare ? "takes no value" : "needs a value, as in";
    const example = { order: " order=2", upto: " upto=2", snap: " snap=1m" }[known as string];
    const more = bare ? "" : example ?? " islands=nearest";
    throw ruleFault(rule, at, `The option "${name}" ${fault}${more}`);
  }
  switch (known) {
    case "order":
    case "upto":
      return { [known]: wholeNumber(value, `"${known}"`) };
    case "mutual":
    case "either":
      return { [known]: true };
    case "snap":
      if (item.kind !== "touching" && item.kind !== "edge") {
        throw ruleFault(rule, at, `The option "snap" follows only "touching" and "edge"`);
      }
      return { snap: length(value) };
    case "islands":
      if (value.text !== "nearest") {
        throw ruleFault(rule, value.at, `The option "islands" takes only "nearest"`);
      }
      return { islands: "nearest" };
  }
}

function wholeNumber({ rule, at, text }: Word, what: string): number {
  const number = /^\d{1,9}$/.test(text) ? Number(text) : 0;
  if (number > 0) return number;
  throw ruleFault(rule, at, `Expected a whole number of 1 or more for ${what} but found "${text}"`);
}

function length({ rule, at, text }: Word): Length {
  try {
    return parseLength(text);
  } catch (error) {
    if (error instanceof UsageError) throw ruleFault(rule, at, error.message);
    throw error;
  }
}

function unquoted({ rule, at, text }: Word, what: string): string {
  const name = text.startsWith('"') ? text.slice(1, -1).replaceAll('""', '"') : text;
  if (name === "") throw ruleFault(rule, at, `Expected the name of a ${what} but found nothing`);
  const wild = text.startsWith('"')
    ? text.slice(1, -1).replaceAll('""', "").indexOf('"')
    : text.search(/[+&"]/);
  if (wild < 0) return name;
  throw ruleFault(
    rule,
    at + wild,
    `Cannot tell where this name ends; put spaces around operators, or the name in double quotes`,
  );
}

function unknownName({ rule, at, text }: Word): UsageError {
  const name = text.slice(0, text.search(/:|$/));
  const sign = name.search(/[+&-]/);
  if (sign > 0) return ruleFault(rule, at + sign, "Put spaces around an operator");
  if (OPTION_NAMES.some((option) => name.split("=")[0] === option)) {
    return ruleFault(rule, at, `Expected a neighbor rule before the option "${name}"`);
  }
  const near = nearestName(name, TERM_NAMES);
  const help = near ? `did you mean "${near}"` : `choose one of ${TERM_NAMES.join(", ")}`;
  return ruleFault(rule, at, `Unknown neighbor rule "${name}"; ${help}`);
}

function unexpectedWord({ rule, at, text }: Word): UsageError {
  const name = text.slice(0, text.search(/[=:]|$/));
  const sign = name.search(/[+&-]/);
  if (sign >= 0) return ruleFault(rule, at + sign, "Put spaces around an operator");
  const term = TERM_NAMES.some((known) => known === name);
  if (term) {
    return ruleFault(rule, at, `Expected an operator (+, & or -) before the rule "${name}"`);
  }
  const near = nearestName(name, OPTION_NAMES);
  const help = near ? `did you mean "${near}"` : `choose one of ${OPTION_NAMES.join(", ")}`;
  return ruleFault(rule, at, `Unknown option "${name}" of a neighbor rule; ${help}`);
}
