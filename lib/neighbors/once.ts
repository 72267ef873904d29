/**
 * Work put off until it is needed.
 *
 * @module
 */

/** A function that makes its value at the first call and returns the same at every later one. */
export function once<Value>(make: () => Value): () => Value {
  let made: { readonly value: Value } | null = null;
  return () => (made ??= { value: make() }).value;
}
