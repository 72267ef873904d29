/**
 * The small language of `--weights`: how much each neighbor counts.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import { nearestName } from "../layer/nearest_name.ts";
import { type Length, parseLength } from "../project/length.ts";

/** Weights that fall with distance at a pace set by a bandwidth. */
export const KERNELS = [
  "exponential",
  "gaussian",
  "bisquare",
  "triangular",
  "epanechnikov",
] as const;
/** See {@link KERNELS}. */
export type KernelName = typeof KERNELS[number];

/**
 * How far a kernel reaches: a length for all areas, or each area's distance to its `nearest`-th
 * neighbor.
 */
export type Bandwidth =
  | { readonly kind: "fixed"; readonly length: Length }
  | { readonly kind: "adaptive"; readonly nearest: number };

/** How much each neighbor counts, as data. */
export type WeightRule =
  | { readonly kind: "equal" }
  | { readonly kind: "inverse"; readonly power: number }
  | { readonly kind: KernelName; readonly bandwidth: Bandwidth }
  | { readonly kind: "boundary" }
  | { readonly kind: "given" };

const WITHOUT_ARGUMENT = ["equal", "boundary", "given"] as const;

/** Every word the language knows, for help and suggestions. */
const WORDS: readonly string[] = [...WITHOUT_ARGUMENT, "inverse", ...KERNELS];

/**
 * Reads `equal`, `inverse:P`, a kernel with its bandwidth (`gaussian:25km`, `bisquare:k12`),
 * `boundary` or `given`.
 *
 * @throws {UsageError} for an unknown word (with the nearest known one), a missing or surplus
 * argument, a power or bandwidth out of range.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.deepEqual(parseWeightRule("inverse:2"), { kind: "inverse", power: 2 });
 * ```
 */
export function parseWeightRule(text: string): WeightRule {
  const [word, argument] = split(text);
  const plain = WITHOUT_ARGUMENT.find((kind) => kind === word);
  if (plain) {
    if (argument === "") return { kind: plain };
    throw new UsageError(
      `Cannot read the weights "${text}"; write ${plain} without anything after it`,
    );
  }
  if (word === "inverse") return { kind: "inverse", power: parsePower(argument, text) };
  const kernel = KERNELS.find((kind) => kind === word);
  if (kernel) return { kind: kernel, bandwidth: parseBandwidth(argument, text) };
  const near = nearestName(word, WORDS);
  throw new UsageError(
    `Unknown weights "${text}"${near ? ` (did you mean ${near}?)` : ""}; choose one of ${
      WORDS.join(", ")
    }`,
  );
}

/** The rule in its shortest spelling; {@link parseWeightRule} reads it back. */
export function weightRuleText(rule: WeightRule): string {
  if (rule.kind === "inverse") return `inverse:${rule.power}`;
  if (!("bandwidth" in rule)) return rule.kind;
  const { bandwidth } = rule;
  return `${rule.kind}:${
    bandwidth.kind === "fixed" ? bandwidth.length.text : `k${bandwidth.nearest}`
  }`;
}

/** Whether a rule looks at distance. */
export function fallsWithDistance(rule: WeightRule): boolean {
  return rule.kind === "inverse" || "bandwidth" in rule;
}

/** Word and argument around the first colon, without spaces at their ends. */
function split(text: string): [word: string, argument: string] {
  const colon = text.indexOf(":");
  if (colon < 0) return [text.trim(), ""];
  return [text.slice(0, colon).trim(), text.slice(colon + 1).trim()];
}

function parsePower(argument: string, text: string): number {
  const power = argument === "" ? NaN : Number(argument);
  if (power > 0 && power < Infinity) return power;
  throw new UsageError(
    `Cannot read the weights "${text}"; inverse needs a power above 0, such as inverse:1 or inverse:2`,
  );
}

function parseBandwidth(argument: string, text: string): Bandwidth {
  const adaptive = /^k(\d+)$/.exec(argument);
  if (adaptive && Number(adaptive[1]) > 0) {
    return { kind: "adaptive", nearest: Number(adaptive[1]) };
  }
  if (argument === "" || argument.startsWith("k")) {
    const [kernel] = split(text);
    throw new UsageError(
      `Cannot read the weights "${text}"; ${kernel} needs a bandwidth: a length such as ${kernel}:5km, ` +
        `or ${kernel}:k8 for each area's distance to its 8th nearest`,
    );
  }
  return { kind: "fixed", length: parseLength(argument) };
}
