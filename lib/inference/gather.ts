/**
 * Picking numbers by place.
 *
 * @module
 */

/** `values[places[0]]`, `values[places[1]]`, … Cost: one pass. */
export function gather(values: Float64Array, places: Uint32Array): Float64Array;
/** `values[places[0]]`, `values[places[1]]`, … Cost: one pass. */
export function gather(values: Uint32Array, places: Uint32Array): Uint32Array;
export function gather<A extends Float64Array | Uint32Array>(values: A, places: Uint32Array): A {
  const gathered = values instanceof Float64Array
    ? new Float64Array(places.length)
    : new Uint32Array(places.length);
  for (let i = 0; i < places.length; i++) gathered[i] = values[places[i]];
  return gathered as A;
}
