/**
 * Numbers and lists as a sentence wants them.
 *
 * @module
 */

/** `1 area`, `12,000 areas`. */
export function counted(count: number, singular: string, plural: string = `${singular}s`): string {
  return `${count.toLocaleString("en-US")} ${count === 1 ? singular : plural}`;
}

/** `A`, `A and B`, `A, B, and C`. */
export function listed(items: readonly string[]): string {
  if (items.length < 3) return items.join(" and ");
  return `${items.slice(0, -1).join(", ")}, and ${items[items.length - 1]}`;
}

/** A statistic of about -1 to 1: two decimals, two digits where it is small, `0.000` where tiny. */
export function statistic(value: number): string {
  const size = Math.abs(value);
  if (size >= 0.1) return value.toFixed(2);
  return size < 0.0005 ? "0.000" : String(Number(value.toPrecision(2)));
}

/**
 * `p = 0.012`, `p < 0.001`. Never rounded onto the level or across it: digits are added until the text
 * falls on the same side of the level as the number.
 */
export function pValue(p: number, level: number): string {
  if (p < 0.001 && level >= 0.001) return "p < 0.001";
  for (let digits = 2; digits < 15; digits++) {
    const rounded = Number(p.toPrecision(digits));
    if (Math.sign(rounded - level) === Math.sign(p - level)) return `p = ${rounded}`;
  }
  return `p = ${p}`;
}
