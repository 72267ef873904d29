/**
 * The WebAssembly kernel, compiled from its text form.
 *
 * @module
 */
import { KERNEL_BASE64 } from "./kernel_module.ts";
import { PAGE } from "./kernel_memory.ts";

/** What the kernel offers; addresses and counts are plain numbers. The sources in `kernel/` say what each does. */
export interface Kernel {
  drawRankedBlock(layout: number, block: number, count: number, row: number, tie: number): void;
  sortDoubles(values: number, count: number, other: number, counters: number): void;
  rankAreas(
    areas: number,
    first: number,
    last: number,
    sums: number,
    count: number,
    tie: number,
  ): void;
  shuffleColumn(
    values: number,
    n: number,
    seedLow: number,
    seedHigh: number,
    purpose: number,
    index: number,
    stream: number,
    target: number,
  ): void;
  interleave(columns: number, n: number, lanes: number): void;
  putInPlace(lanes: number, n: number, places: number, target: number): void;
  sumPairs(
    offsets: number,
    indices: number,
    values: number,
    lanes: number,
    first: number,
    last: number,
    totals: number,
  ): void;
  dealBlock(layout: number, block: number, count: number): void;
  weighBlock(layout: number, list: number, active: number, count: number, tie: number): void;
  takeOwnAreasOut(layout: number, count: number, tie: number): void;
}

/**
 * Compiles the kernel, or returns null where WebAssembly with vectors is not to be had; then the plain
 * TypeScript counters do the same work more slowly. Cost: about 2 ms; a compiled module can be posted to workers.
 */
export function compileKernel(): WebAssembly.Module | null {
  const bytes = Uint8Array.from(atob(KERNEL_BASE64), (character) => character.charCodeAt(0));
  return typeof WebAssembly === "object" && WebAssembly.validate(bytes)
    ? new WebAssembly.Module(bytes)
    : null;
}

/** A kernel with `bytes` of memory of its own. */
export function startKernel(
  module: WebAssembly.Module,
  bytes: number,
): { kernel: Kernel; memory: ArrayBuffer } {
  const memory = new WebAssembly.Memory({ initial: Math.ceil(bytes / PAGE) });
  const instance = new WebAssembly.Instance(module, { env: { memory } });
  return { kernel: instance.exports as unknown as Kernel, memory: memory.buffer as ArrayBuffer };
}
