/**
 * Numbers as a table or a label shows them. Made by hand, because locale formatting differs between
 * engines and takes too long for thousands of labels.
 *
 * @module
 */

/** What stands where a number is undefined. */
const NONE = "–";
const MINUS = "\u2212";
/** Keeps a number and its unit on one line. */
const SPACE = "\u00A0";

/** `12,345`. */
export function wholeText(count: number): string {
  return decimalText(count, 0);
}

/** A number with fixed decimals: `−0.12`, `1,234.50`. */
export function decimalText(value: number | null, decimals = 2): string {
  if (!isNumber(value)) return NONE;
  const size = Math.abs(value).toFixed(decimals);
  const [whole, fraction] = size.split(".");
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, ",");
  const sign = value < 0 && Number(size) !== 0 ? MINUS : "";
  return `${sign}${grouped}${fraction ? `.${fraction}` : ""}`;
}

/** A number of unknown size with about four digits that matter: `0.01235`, `12.35`, `1,234,568`. */
export function valueText(value: number | null): string {
  if (!isNumber(value)) return NONE;
  if (value === 0) return "0";
  const power = Math.floor(Math.log10(Math.abs(value)));
  if (power < -9 || power > 14) return value.toExponential(3).replaceAll("-", MINUS);
  const text = decimalText(value, Math.max(0, 3 - power));
  return text.includes(".") ? text.replace(/\.?0+$/, "") : text;
}

/**
 * A p with two digits that matter, never in exponents: `0.012`, `0.0000020`. Digits are added until the
 * text falls on the same side of the level as the number.
 */
export function pText(p: number | null, level: number): string {
  if (!isNumber(p)) return NONE;
  if (p === 0) return "0";
  const zeros = -Math.floor(Math.log10(p));
  for (let decimals = zeros + 1; decimals < 30; decimals++) {
    const text = p.toFixed(decimals);
    if (Math.sign(Number(text) - level) === Math.sign(p - level)) return text;
  }
  return String(p);
}

/** A share as `93 %`. Nothing but all is written as 100 %, nothing but none as 0 %. */
export function percentText(share: number | null): string {
  if (!isNumber(share)) return NONE;
  const percent = Math.round(100 * share);
  if (percent === 100 && share < 1) return `>${SPACE}99${SPACE}%`;
  if (percent === 0 && share > 0) return `<${SPACE}1${SPACE}%`;
  return `${percent}${SPACE}%`;
}

/** A length in meters: `850 m`, `12.4 km`. */
export function lengthText(meters: number): string {
  const kilometers = meters >= 1000;
  const size = Number((kilometers ? meters / 1000 : meters).toPrecision(3));
  return `${valueText(size)}${SPACE}${kilometers ? "km" : "m"}`;
}

function isNumber(value: number | null): value is number {
  return value !== null && Number.isFinite(value);
}
