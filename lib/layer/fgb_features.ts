/**
 * Where the features of a FlatGeobuf file lie.
 *
 * @module
 */
import { viewOf } from "./flat_table.ts";

/**
 * Byte offset of each feature's size prefix and the end of the last, length n + 1.
 *
 * @param featuresAt Where the first feature begins, past header and index.
 * @throws RangeError where the bytes end within a feature.
 */
export function findFeatures(fgb: Uint8Array, featuresAt: number): Float64Array {
  const view = viewOf(fgb);
  const starts = [featuresAt];
  let at = featuresAt;
  while (at < fgb.length) {
    at += 4 + view.getUint32(at, true);
    starts.push(at);
  }
  if (at !== fgb.length) {
    throw new RangeError(`A feature ends at byte ${at} of a file of ${fgb.length} bytes`);
  }
  return Float64Array.from(starts);
}
