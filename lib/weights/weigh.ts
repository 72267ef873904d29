/**
 * From who to how much: puts a weight on every link of a topology.
 *
 * @module
 */
import type { Topology } from "../neighbors/topology.ts";
import { type LinkFacts, linkWeights } from "./link_weights.ts";
import { type Standardize, standardize } from "./standardize.ts";
import type { WeightRule } from "./weight_rule.ts";
import type { Weights } from "./weights.ts";

/** Options of {@link weigh}. */
export interface WeighOptions extends LinkFacts {
  /** How much each neighbor counts. @default { kind: "equal" } */
  readonly weights?: WeightRule;
  /** How rows are scaled. @default "row" */
  readonly standardize?: Standardize;
}

/**
 * Weighs links by a rule, drops those whose weight comes out 0, and scales rows.
 *
 * @returns Weights of the same n areas; rows may be shorter than the topology's, or empty. Offsets
 * and indices are shared with the topology where nothing was dropped.
 * @throws What {@link linkWeights} throws.
 * Cost: one pass over the links for the weights and one or two for scaling.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * const topology = { offsets: Uint32Array.of(0, 2, 3, 4), indices: Uint32Array.of(1, 2, 0, 0) };
 * const weights = weigh(topology, {
 *   weights: { kind: "inverse", power: 1 },
 *   points: Float64Array.of(0, 0, 1, 0, 0, 3),
 * });
 * assert.deepEqual([...weights.values], [0.75, 0.25, 1, 1]);
 * ```
 */
export function weigh(topology: Topology, options: WeighOptions = {}): Weights {
  const raw = linkWeights(topology, options.weights ?? { kind: "equal" }, options);
  const { offsets, indices, values } = dropZeros(topology, raw);
  const scaled = standardize(offsets, values, options.standardize ?? "row");
  return { offsets, indices, values: scaled, equalInRows: isEqualInRows(offsets, scaled) };
}

/** The links whose weight is not 0, with their weights. */
function dropZeros(
  { offsets, indices }: Topology,
  raw: Float64Array,
): Omit<Weights, "equalInRows"> {
  if (!raw.includes(0)) return { offsets, indices, values: raw };
  const keptOffsets = new Uint32Array(offsets.length);
  const keptIndices = new Uint32Array(indices.length);
  const keptValues = new Float64Array(indices.length);
  let count = 0;
  for (let i = 0; i + 1 < offsets.length; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) {
      if (raw[link] === 0) continue;
      keptIndices[count] = indices[link];
      keptValues[count++] = raw[link];
    }
    keptOffsets[i + 1] = count;
  }
  return {
    offsets: keptOffsets,
    indices: keptIndices.slice(0, count),
    values: keptValues.slice(0, count),
  };
}

function isEqualInRows(offsets: Uint32Array, values: Float64Array): boolean {
  for (let i = 0; i + 1 < offsets.length; i++) {
    for (let link = offsets[i] + 1; link < offsets[i + 1]; link++) {
      if (values[link] !== values[offsets[i]]) return false;
    }
  }
  return true;
}
