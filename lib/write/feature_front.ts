/**
 * The front that every feature written here has, before its geometry block:
 *
 *     size | root offset | vtable | Feature table | properties | padding | geometry block
 *
 * Offsets of FlatBuffers are relative and point forward, so the geometry block can be any bytes that
 * hold a Geometry table and all it refers to (https://flatbuffers.dev/internals).
 *
 * @module
 */

/** Where each field of the front lies, counted from the size prefix. */
const FRONT = { root: 4, vtable: 8, table: 16, geometry: 20, properties: 24, length: 28 } as const;

/** Where the properties begin, counted from the size prefix. */
export const PROPERTIES_AT = 32;

/** What a front says; lengths in bytes, positions counted from the size prefix. */
export interface FeatureFront {
  /** Whole length of the feature, size prefix included. */
  readonly size: number;
  /** Length of the properties. */
  readonly properties: number;
  /** Position of the Geometry table, 0 for none. */
  readonly geometry: number;
}

/**
 * Where the geometry block may begin, after so many bytes of properties: its doubles must stay on
 * multiples of 8, so it keeps the remainder it was made for.
 */
export function blockPosition(properties: number, remainder: number): number {
  const end = PROPERTIES_AT + properties;
  return end + (remainder - end % 8 + 8) % 8;
}

/** Writes the front of the feature that begins at `at`, all but the properties themselves. */
export function writeFront(view: DataView, at: number, feature: FeatureFront): void {
  const hasGeometry = feature.geometry !== 0;
  view.setUint32(at, feature.size - 4, true);
  view.setUint32(at + FRONT.root, FRONT.table - FRONT.root, true);
  // The vtable: its own length, the table's, then where the two fields lie in the table.
  view.setUint16(at + FRONT.vtable, 8, true);
  view.setUint16(at + FRONT.vtable + 2, 12, true);
  view.setUint16(at + FRONT.vtable + 4, hasGeometry ? FRONT.geometry - FRONT.table : 0, true);
  view.setUint16(at + FRONT.vtable + 6, FRONT.properties - FRONT.table, true);
  view.setInt32(at + FRONT.table, FRONT.table - FRONT.vtable, true);
  view.setUint32(at + FRONT.geometry, hasGeometry ? feature.geometry - FRONT.geometry : 0, true);
  view.setUint32(at + FRONT.properties, FRONT.length - FRONT.properties, true);
  view.setUint32(at + FRONT.length, feature.properties, true);
}
