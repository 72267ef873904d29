/**
 * Laying out the kernel's memory before it exists.
 *
 * @module
 */

/** Bytes of a page of WebAssembly memory. */
export const PAGE = 65536;
/** Bytes of a stream in the kernel: four words of state and a buffer. */
export const STREAM_BYTES = 32 + 2048;
/** Bytes that sorting needs for its counters. */
export const SORT_BYTES = 6 * 2048 * 4;

/** Hands out addresses, one after the other. */
export interface MemoryPlan {
  /** Address of a new stretch of `bytes`, on a boundary of 64 bytes. */
  reserve(bytes: number): number;
  /** Bytes handed out so far. */
  readonly size: number;
}

/** An empty plan; the first 1,024 bytes are left to the module itself. */
export function planMemory(): MemoryPlan {
  let size = 1024;
  return {
    reserve(bytes) {
      const address = size;
      size += Math.ceil(bytes / 64) * 64;
      return address;
    },
    get size() {
      return size;
    },
  };
}
