/**
 * Lengths with a written unit, so that nobody has to guess what `within:5` means.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";

/** A length as a person wrote it. */
export interface Length {
  /** In meters, more than 0 and finite. */
  readonly meters: number;
  /** Number and unit without spaces, such as `2.5km`; {@link parseLength} reads it back. */
  readonly text: string;
}

/** Meters in one unit; the foot is the international foot (0.3048 m), the mile 5280 of them. */
const METERS = new Map([["m", 1], ["km", 1000], ["ft", 0.3048], ["mi", 1609.344]]);

const NUMBER_AND_UNIT = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?)\s*(.*)$/i;

/**
 * Reads a length such as `5km`, `0.5 mi` or `250ft`.
 *
 * @throws {UsageError} when the number or the unit is missing or unknown, or the length is not more
 * than 0.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.deepEqual(parseLength("2.5 km"), { meters: 2500, text: "2.5km" });
 * ```
 */
export function parseLength(text: string): Length {
  const match = NUMBER_AND_UNIT.exec(text.trim());
  if (!match) {
    throw new UsageError(
      `Cannot read the length "${text}"; write a number and a unit, such as 5km, 800m, 3mi or 250ft`,
    );
  }
  const [, digits, written] = match;
  const unit = written.toLowerCase();
  const perUnit = METERS.get(unit);
  if (perUnit === undefined) {
    const fault = written === "" ? "has no unit" : `has the unknown unit "${written}"`;
    throw new UsageError(
      `Cannot read the length "${text}", which ${fault}; use m, km, ft or mi, as in ${digits}km`,
    );
  }
  const meters = Number(digits) * perUnit;
  if (!(meters > 0 && meters < Infinity)) {
    throw new UsageError(`Cannot use the length "${text}"; it must be more than 0`);
  }
  return { meters, text: `${digits.replace(/^\+/, "")}${unit}` };
}

/**
 * A length for people: three significant digits, meters below a kilometer, kilometers from there
 * on, whole kilometers from a hundred.
 *
 * @param meters Finite, 0 or more.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.equal(formatLength(48280.32), "48.3 km");
 * ```
 */
export function formatLength(meters: number): string {
  const inMeters = Number(meters.toPrecision(3));
  if (inMeters < 1000) return `${inMeters} m`;
  const kilometers = meters / 1000;
  return `${kilometers < 100 ? Number(kilometers.toPrecision(3)) : Math.round(kilometers)} km`;
}

/**
 * A length as text in m or km, of at most so many significant digits and rounded up, so that what was measured
 * stays within what is written; {@link parseLength} reads it back.
 *
 * @param meters Above 0.
 */
export function lengthAtLeast(meters: number, digits: number): string {
  const inKilometers = meters >= 1000;
  const amount = inKilometers ? meters / 1000 : meters;
  const step = 10 ** (Math.floor(Math.log10(amount)) - digits + 1);
  const textOf = (value: number) => {
    const rounded = Number(value.toPrecision(digits));
    const plain = rounded < 1e-6 ? rounded.toFixed(12).replace(/0+$/, "") : String(rounded);
    return `${plain}${inKilometers ? "km" : "m"}`;
  };
  const text = textOf(amount);
  return parseLength(text).meters < meters
    ? textOf(Number(amount.toPrecision(digits)) + step)
    : text;
}
