/**
 * Field names for formats that allow fewer of them.
 *
 * @module
 */

/** What a format allows. */
export interface NameRule {
  /** Longest name in UTF-8 bytes. @default no limit */
  readonly bytes?: number;
  /**
   * Set where a name is letters, digits and `_`, digits not first: letters of any script, or of ASCII.
   * @default any characters
   */
  readonly letters?: "any" | "ascii";
}

/** A field whose name had to change. */
export interface Renamed {
  readonly from: string;
  readonly to: string;
}

/** Longest ending worth keeping whole, its `_` included: `_class`, `_steady`. */
const ENDING = /_[A-Za-z]{1,6}$/;

/**
 * New names that obey a format's rule, in the order of the old.
 *
 * Names that fit stay. Others lose accents and letters before their ending (`unemployment_class` becomes
 * `unem_class` in 10 bytes); where that name is taken, the last letters give way to a number. Names
 * that differ only in letter case count as the same. The result depends on nothing but the arguments.
 */
export function fitNames(names: readonly string[], rule: NameRule): string[] {
  const taken = new Set<string>();
  const fitted = names.map((name) => {
    if (!isAllowed(name, rule) || taken.has(name.toLowerCase())) return null;
    taken.add(name.toLowerCase());
    return name;
  });
  const numbers = new Map<string, number>();
  return fitted.map((kept, i) => {
    if (kept !== null) return kept;
    const wanted = shorten(onlyLetters(names[i], rule), rule);
    let name = wanted;
    while (taken.has(name.toLowerCase())) {
      const number = (numbers.get(wanted) ?? 1) + 1;
      numbers.set(wanted, number);
      name = numbered(wanted, number, rule);
    }
    taken.add(name.toLowerCase());
    return name;
  });
}

/** The pairs that differ. */
export function renamedFields(names: readonly string[], fitted: readonly string[]): Renamed[] {
  return names.flatMap((from, i) => from === fitted[i] ? [] : [{ from, to: fitted[i] }]);
}

const WORD = { any: /^[\p{L}_][\p{L}\p{N}_]*$/u, ascii: /^[A-Za-z_][A-Za-z0-9_]*$/ };

function isAllowed(name: string, { bytes = Infinity, letters }: NameRule): boolean {
  return byteLength(name) <= bytes && (letters === undefined || WORD[letters].test(name));
}

function onlyLetters(name: string, { letters }: NameRule): string {
  if (letters === undefined) return name;
  const word = letters === "any"
    ? name.replace(/[^\p{L}\p{N}_]/gu, "_")
    : name.normalize("NFD").replace(/\p{M}/gu, "").replace(/[^A-Za-z0-9_]/g, "_");
  return /^\p{N}/u.test(word) ? `_${word}` : word;
}

function shorten(name: string, { bytes = Infinity }: NameRule): string {
  const ending = ENDING.exec(name)?.[0] ?? "";
  const kept = ending.length < bytes ? ending : "";
  return cut(name.slice(0, name.length - kept.length), bytes - kept.length) + kept;
}

function numbered(name: string, number: number, { bytes = Infinity }: NameRule): string {
  return cut(name, bytes - String(number).length) + number;
}

/** The longest beginning of whole characters within so many bytes. */
function cut(text: string, bytes: number): string {
  let kept = text;
  while (byteLength(kept) > bytes) kept = [...kept].slice(0, -1).join("");
  return kept;
}

function byteLength(text: string): number {
  return new TextEncoder().encode(text).length;
}
