/**
 * The words of `--metric`.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";

/** How distance is to be measured, as data. */
export type MetricChoice =
  | { readonly kind: "auto" | "planar" | "geodesic" }
  /** A CRS by its code, such as `EPSG:32632`. */
  | { readonly kind: "code"; readonly code: string }
  /** A projection as a proj string, such as `+proj=utm +zone=32`. */
  | { readonly kind: "proj"; readonly definition: string };

const WORDS = ["auto", "planar", "geodesic"] as const;

/**
 * Reads `auto`, `planar`, `geodesic`, `EPSG:N` or a proj string.
 *
 * @throws {UsageError} for anything else.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.deepEqual(parseMetricChoice("epsg:32632"), { kind: "code", code: "EPSG:32632" });
 * ```
 */
export function parseMetricChoice(text: string): MetricChoice {
  const choice = text.trim();
  const word = WORDS.find((known) => known === choice);
  if (word) return { kind: word };
  if (/^[a-z]+:\d+$/i.test(choice)) return { kind: "code", code: choice.toUpperCase() };
  if (/(^|\s)\+proj=/.test(choice)) return { kind: "proj", definition: choice };
  throw new UsageError(
    `Unknown metric "${text}"; choose auto, planar, geodesic, a code such as EPSG:32632, ` +
      `or a proj string such as "+proj=utm +zone=32"`,
  );
}
