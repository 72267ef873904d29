/**
 * Field names for formats that allow fewer of them.
 *
 * @module
 */

/** What a format allows. */
export interface NameRule {
  /** Longest name in UTF-8 bytes. @default no limit */
  readonly bytes?: number;
  /** Whether only unaccented letters, digits and `_` are allowed, digits not first. @default false */
  readonly plain?: boolean;
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
  const fits = names.map((name) => isAllowed(name, rule));
  const taken = new Set<string>();
  const fitted = names.map((name, i) => {
    if (!fits[i] || taken.has(name.toLowerCase())) return null;
    taken.add(name.toLowerCase());
    return name;
  });
  return fitted.map((kept, i) => {
    if (kept !== null) return kept;
    const name = unused(shorten(rule.plain ? plain(names[i]) : names[i], rule), taken, rule);
    taken.add(name.toLowerCase());
    return name;
  });
}

/** The pairs that differ. */
export function renamedFields(names: readonly string[], fitted: readonly string[]): Renamed[] {
  return names.flatMap((from, i) => from === fitted[i] ? [] : [{ from, to: fitted[i] }]);
}

function isAllowed(
  name: string,
  { bytes = Infinity, plain: onlyPlain = false }: NameRule,
): boolean {
  return byteLength(name) <= bytes && (!onlyPlain || /^[A-Za-z_][A-Za-z0-9_]*$/.test(name));
}

function plain(name: string): string {
  const unaccented = name.normalize("NFD").replace(/\p{M}/gu, "").replace(/[^A-Za-z0-9_]/g, "_");
  return /^[0-9]/.test(unaccented) ? `_${unaccented}` : unaccented;
}

function shorten(name: string, { bytes = Infinity }: NameRule): string {
  const ending = ENDING.exec(name)?.[0] ?? "";
  const kept = ending.length < bytes ? ending : "";
  return cut(name.slice(0, name.length - kept.length), bytes - kept.length) + kept;
}

function unused(name: string, taken: ReadonlySet<string>, { bytes = Infinity }: NameRule): string {
  let candidate = name;
  for (let k = 2; taken.has(candidate.toLowerCase()); k++) {
    candidate = cut(name, bytes - String(k).length) + k;
  }
  return candidate;
}

/** The longest beginning of whole characters within so many bytes. */
function cut(text: string, bytes: number): string {
  let kept = "";
  let length = 0;
  for (const character of text) {
    length += byteLength(character);
    if (length > bytes) break;
    kept += character;
  }
  return kept;
}

function byteLength(text: string): number {
  return new TextEncoder().encode(text).length;
}
