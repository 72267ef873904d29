/**
 * The curves by which weights fall with distance.
 *
 * No density constants: every curve but the inverse powers is 1 at distance 0. A constant would
 * cancel under every standardizing but `none`, and there it would only make weights harder to read.
 *
 * @module
 */
import type { KernelName } from "./weight_rule.ts";

/**
 * Share of the bandwidth from which a compact kernel is 0: the neighbor that sets an adaptive
 * bandwidth must come out 0 even where its distance was rounded another way.
 */
const RIM = 1 - 1e-12;

/**
 * Kernel weight at distance `d` for bandwidth `D`, both in the same unit, `d` 0 or more and `D`
 * above 0: 1 at 0, falling, never negative. `bisquare`, `triangular` and `epanechnikov` are 0 from
 * `D` on (Silverman 1986, table 3.1, up to constants); `gaussian` is exp(-(d/D)²/2), `exponential`
 * exp(-d/D).
 */
export function kernelWeight(kernel: KernelName, d: number, D: number): number {
  const u = d / D;
  switch (kernel) {
    case "exponential":
      return steadied(Math.exp(-u));
    case "gaussian":
      return steadied(Math.exp(-u * u / 2));
    case "bisquare":
      return u < RIM ? (1 - u * u) * (1 - u * u) : 0;
    case "triangular":
      return u < RIM ? 1 - u : 0;
    case "epanechnikov":
      return u < RIM ? 1 - u * u : 0;
  }
}

/** d^-power for `d` above 0; Infinity where that leaves the range of numbers. */
export function inverseWeight(d: number, power: number): number {
  if (power === 1) return 1 / d;
  if (power === 2) return 1 / (d * d);
  return steadied(Math.pow(d, -power));
}

/**
 * Rounds to 44 significant bits (a little over 13 digits): `exp` and `pow` differ in their last
 * bits between JavaScript engines, and weights must not. Veltkamp's splitting; beyond 1e300 the
 * number stays as it is.
 */
function steadied(weight: number): number {
  if (!(weight < 1e300)) return weight;
  const spread = 513 * weight;
  return spread - (spread - weight);
}
