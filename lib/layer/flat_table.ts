/**
 * Reading FlatBuffers tables by hand, where millions of them are walked.
 *
 * A table starts with the distance back to its vtable; the vtable lists, for each field, its offset
 * within the table (0: absent). Vectors and sub-tables are reached by an unsigned forward distance.
 * Slots are counted as in the generated classes: 4, 6, 8, … (https://flatbuffers.dev/internals).
 *
 * @module
 */

/** Byte position of a field of the table at `table`, or 0 where it is absent. */
export function fieldAt(view: DataView, table: number, slot: number): number {
  const vtable = table - view.getInt32(table, true);
  if (slot >= view.getUint16(vtable, true)) return 0;
  const offset = view.getUint16(vtable + slot, true);
  return offset === 0 ? 0 : table + offset;
}

/** Position of what the forward distance stored at `at` points to. */
export function follow(view: DataView, at: number): number {
  return at + view.getUint32(at, true);
}

/** Number of elements of a vector field, and 0 where it is absent; elements start 4 bytes after it. */
export function vectorLength(view: DataView, field: number): number {
  return field === 0 ? 0 : view.getUint32(follow(view, field), true);
}

/** Position of the first element of a vector field that is present. */
export function vectorStart(view: DataView, field: number): number {
  return follow(view, field) + 4;
}

/** A view of exactly these bytes. */
export function viewOf(bytes: Uint8Array): DataView {
  return new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}
