/**
 * The door that every statistic of values and weights shares.
 *
 * @module
 */
import type { Weights } from "../weights/weights.ts";

/**
 * Makes sure that there is one value for each area and that the rows of the weights fit together.
 *
 * @throws RangeError naming both lengths; this is a fault of the caller, not of the data.
 */
export function checkLengths(values: Float64Array, weights: Weights): void {
  const areas = weights.offsets.length - 1;
  if (values.length !== areas) {
    throw new RangeError(`Cannot match ${values.length} values to weights of ${areas} areas`);
  }
  const links = weights.offsets[areas];
  if (weights.indices.length !== links || weights.values.length !== links) {
    throw new RangeError(
      `Cannot read weights of ${links} links from ${weights.indices.length} neighbors and ` +
        `${weights.values.length} numbers`,
    );
  }
}
