/**
 * One number for each link, before any scaling: what each weight rule makes of a pair of areas.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import type { Topology } from "../neighbors/topology.ts";
import { inverseWeight, kernelWeight } from "./decay.ts";
import type { Bandwidth, KernelName, WeightRule } from "./weight_rule.ts";

/** What weight rules look at. What a rule does not need may be left out. */
export interface LinkFacts {
  /**
   * x0, y0, x1, y1, … in meters (or map units), length 2n, finite; for rules that fall with
   * distance.
   */
  readonly points?: Float64Array | null;
  /**
   * Distance between areas i and j in the unit of the bandwidths, where it is not the straight line
   * between `points` (on the ellipsoid).
   */
  readonly distance?: (i: number, j: number) => number;
  /** Distance of each area to its N-th nearest, length n; for `kN` bandwidths. */
  readonly bandwidths?: Float64Array;
  /**
   * Length of the boundary two areas share, parallel to the topology's `indices`; for `boundary`.
   */
  readonly boundaryLength?: Float64Array;
  /** What to call area i in messages. @default its position */
  readonly idOf?: (i: number) => string;
}

/**
 * Weight of each link by a rule, parallel to the topology's `indices`: finite, 0 or more, zeros
 * included.
 *
 * @throws {UnfitDataError} when `inverse` meets two areas at the same place, `given` a negative
 * weight or a topology without weights, a `kN` bandwidth is 0 or missing, a point is, or weights
 * leave the range of numbers; the areas are named.
 * @throws {RangeError} when the array a rule needs is missing or of the wrong length.
 * Cost: one pass over the links.
 */
export function linkWeights(
  topology: Topology,
  rule: WeightRule,
  facts: LinkFacts = {},
): Float64Array {
  switch (rule.kind) {
    case "equal":
      return new Float64Array(topology.indices.length).fill(1);
    case "given":
      return givenWeights(topology, facts);
    case "boundary":
      return checked(facts.boundaryLength, topology.indices.length, "shared boundary lengths");
    case "inverse":
      return inverseWeights(topology, rule.power, facts);
    default:
      return kernelWeights(topology, rule, facts);
  }
}

function givenWeights(topology: Topology, facts: LinkFacts): Float64Array {
  const { given } = topology;
  if (given === undefined) {
    throw new UnfitDataError(
      "Cannot use given weights as these neighbors came without any; " +
        "take them from a links: file with a weight column, or pass --weights equal",
    );
  }
  const fault = given.findIndex((weight) => !(weight >= 0 && weight < Infinity));
  if (fault < 0) return given;
  throw new UnfitDataError(
    `Cannot use the weight ${given[fault]} given for ${pairText(topology, fault, facts)}; ` +
      "weights must be finite and not negative",
  );
}

function inverseWeights(topology: Topology, power: number, facts: LinkFacts): Float64Array {
  return eachLink(topology, facts, (d, _i, link) => {
    const weight = d > 0 ? inverseWeight(d, power) : Infinity;
    if (weight < Infinity) return weight;
    const fault = d === 0 ? "they lie at the same place" : `${d} is too short a distance`;
    throw new UnfitDataError(
      `Cannot weigh ${pairText(topology, link, facts)} by inverse:${power} as ${fault}; ` +
        "use a kernel such as gaussian:5km, or leave one of them out",
    );
  });
}

function kernelWeights(
  topology: Topology,
  { kind, bandwidth }: { kind: KernelName; bandwidth: Bandwidth },
  facts: LinkFacts,
): Float64Array {
  if (bandwidth.kind === "fixed") {
    const { meters } = bandwidth.length;
    return eachLink(topology, facts, (d) => kernelWeight(kind, d, meters));
  }
  const { nearest } = bandwidth;
  const reach = checked(facts.bandwidths, topology.offsets.length - 1, "adaptive bandwidths");
  return eachLink(topology, facts, (d, i) => {
    if (reach[i] > 0) return kernelWeight(kind, d, reach[i]);
    const fault = reach[i] === 0
      ? `its ${nearest} nearest lie at the same place; use a larger number, or a length`
      : `it has no ${nearest} others around it; use a smaller number, or a length`;
    throw new UnfitDataError(
      `Cannot weigh the neighbors of area ${nameOf(i, facts)} by ${kind}:k${nearest} as ${fault}`,
    );
  });
}

/** Weighs every link by its distance, the area it starts from and its position. */
function eachLink(
  { offsets, indices }: Topology,
  facts: LinkFacts,
  weightOf: (distance: number, i: number, link: number) => number,
): Float64Array {
  const n = offsets.length - 1;
  const distance = facts.distance ?? straightLine(checked(facts.points, 2 * n, "coordinates"));
  const weights = new Float64Array(indices.length);
  for (let i = 0; i < n; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      const d = distance(i, indices[link]);
      if (Number.isNaN(d)) throw withoutPlace(pairText({ offsets, indices }, link, facts));
      weights[link] = weightOf(d, i, link);
    }
  }
  return weights;
}

function withoutPlace(pair: string): UnfitDataError {
  return new UnfitDataError(
    `Cannot weigh ${pair} by distance as one of them has no place; use --weights equal, or leave it out`,
  );
}

function straightLine(xy: Float64Array): (i: number, j: number) => number {
  return (i, j) => {
    const dx = xy[2 * i] - xy[2 * j], dy = xy[2 * i + 1] - xy[2 * j + 1];
    return Math.sqrt(dx * dx + dy * dy);
  };
}

function checked(
  array: Float64Array | null | undefined,
  length: number,
  what: string,
): Float64Array {
  if (array?.length === length) return array;
  throw new RangeError(
    `Cannot weigh links with ${array?.length ?? "no"} ${what} instead of ${length}`,
  );
}

function pairText({ offsets, indices }: Topology, link: number, facts: LinkFacts): string {
  const i = offsets.findIndex((_, row) => offsets[row + 1] > link);
  return `areas ${nameOf(i, facts)} and ${nameOf(indices[link], facts)}`;
}

function nameOf(i: number, { idOf = String }: LinkFacts): string {
  return idOf(i);
}
