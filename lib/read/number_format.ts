/**
 * How a column writes its numbers: which mark is the decimal mark, which groups thousands.
 *
 * @module
 */

/** Decimal mark. */
export type DecimalMark = "." | ",";
/** Thousands mark; a space stands for every kind of space, an apostrophe for both kinds of apostrophe. */
export type ThousandsMark = "none" | "," | "." | " " | "'";

/** One way of writing numbers. */
export interface NumberFormat {
  readonly decimal: DecimalMark;
  readonly thousands: ThousandsMark;
}

/** What is known of the format beforehand. */
export interface FormatOptions {
  /** @default "auto" */
  readonly decimal?: DecimalMark | "auto";
  /** @default "auto" */
  readonly thousands?: ThousandsMark | "auto";
}

/** A detected format, and the first text that another format would have read as a different number. */
export interface DetectedFormat {
  readonly format: NumberFormat;
  readonly doubt: { readonly text: string; readonly other: NumberFormat } | null;
}

/** Every format tried, the preferred first. */
const FORMATS: readonly NumberFormat[] = [
  { decimal: ".", thousands: "none" },
  { decimal: ".", thousands: "," },
  { decimal: ",", thousands: "none" },
  { decimal: ",", thousands: "." },
  { decimal: ".", thousands: " " },
  { decimal: ",", thousands: " " },
  { decimal: ".", thousands: "'" },
  { decimal: ",", thousands: "'" },
];

/**
 * Decides how a column writes its numbers, from all of its texts at once: the format under which the most texts are
 * numbers. `1.234,5` settles decimal comma and thousands point for the whole column, `1,5` the decimal
 * comma, `1 234` the space. Where several formats read equally many, the earlier of this list is taken: decimal
 * point; with thousands comma; decimal comma; with thousands point; and the same with spaces and
 * apostrophes. So a column whose every mark is one comma before exactly three digits (`1,234`) reads as thousands, and one
 * whose every mark is one point before exactly three digits (`1.234`) reads as decimals; such a column is
 * reported as a `doubt`. Cost: at most eight passes over the texts.
 *
 * @param texts Texts of the column without the missing ones.
 */
export function detectNumberFormat(
  texts: readonly string[],
  options: FormatOptions = {},
): DetectedFormat {
  const { decimal = "auto", thousands = "auto" } = options;
  const allowed = FORMATS.filter((format) =>
    (decimal === "auto" || format.decimal === decimal) &&
    (thousands === "auto" || format.thousands === thousands)
  );
  const read = allowed.map((format) => {
    const parse = numberParser(format);
    return texts.reduce((count, text) => count + (parse(text) === null ? 0 : 1), 0);
  });
  const most = Math.max(...read);
  const [format, ...others] = allowed.filter((_, f) => read[f] === most);
  return { format, doubt: firstDoubt(texts, format, others) };
}

function firstDoubt(
  texts: readonly string[],
  format: NumberFormat,
  others: readonly NumberFormat[],
): DetectedFormat["doubt"] {
  const parse = numberParser(format);
  for (const other of others) {
    const parseOther = numberParser(other);
    const text = texts.find((text) => parse(text) !== parseOther(text));
    if (text !== undefined) return { text, other };
  }
  return null;
}

const MARK_PATTERNS: Record<ThousandsMark, string> = {
  "none": "",
  ",": ",",
  ".": "\\.",
  // Space, no-break space, figure space, thin space, narrow no-break space.
  " ": "[ \\u00a0\\u2007\\u2009\\u202f]",
  "'": "['\\u2019]",
};

/**
 * A function that reads one text as a number written in a format, or gives null when it is none. Accepts a sign
 * (`+`, `-`, minus sign U+2212), complete groups of three digits or none, an exponent, blanks around, and a
 * percent sign at the end, which does not change the number (`12.5 %` is 12.5).
 * Words such as `NaN` or `Infinity` and an empty text are no numbers.
 */
export function numberParser(
  { decimal, thousands }: NumberFormat,
): (text: string) => number | null {
  const group = MARK_PATTERNS[thousands];
  const grouped = group === "" ? "" : `[1-9]\\d{0,2}(?:${group}\\d{3})+|`;
  const point = decimal === "." ? "\\." : ",";
  const pattern = new RegExp(
    `^([+\\-\\u2212]?)(?:(${grouped}\\d+)(?:${point}(\\d*))?|${point}(\\d+))((?:[eE][+\\-]?\\d+)?)\\s?%?$`,
  );
  return (text) => {
    const match = pattern.exec(text.trim());
    if (match === null) return null;
    const [, sign, whole = "0", fraction, bare, exponent] = match;
    const digits = whole.replace(/\D/g, "");
    const magnitude = Number(`${digits}.${fraction || bare || "0"}${exponent}`);
    return sign === "" || sign === "+" ? magnitude : -magnitude;
  };
}
