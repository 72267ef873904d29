/**
 * Global statistics of shuffled maps in the WebAssembly kernel; same sums as `openShuffleSingles`.
 *
 * @module
 */
import type { Counter } from "./job.ts";
import { planMemory, STREAM_BYTES } from "./kernel_memory.ts";
import { startKernel } from "./load_kernel.ts";
import { settleDoubts, type ShuffleJob, type ShufflePart, shufflesOf } from "./shuffle_job.ts";
import { PURPOSES } from "./stream.ts";

/** Permutations side by side. */
const LANES = 8;
/** Rows of pairs summed in one call, so that calls stay short; a multiple of the kernel's blocks of rows. */
const ROWS_PER_CALL = 65_536;

/**
 * Counts a {@link ShuffleJob} in the kernel. Memory: 68 bytes an area, 32 more where areas are put in other places,
 * and 8 a pair of each definition.
 */
export function openShuffleKernel(
  job: ShuffleJob,
  module: WebAssembly.Module,
): Counter<ShufflePart> {
  const { z, seed, definitions } = job;
  const n = z.length;
  const plan = planMemory();
  const valuesAt = plan.reserve(n * 4);
  const columnsAt = plan.reserve(LANES * n * 4);
  const lanesAt = plan.reserve(LANES * n * 4);
  const streamAt = plan.reserve(STREAM_BYTES);
  const totalsAt = plan.reserve(LANES * 8);
  const isMoved = definitions.some(({ places }) => places !== null);
  const movedAt = plan.reserve(isMoved ? LANES * n * 4 : 0);
  const addresses = definitions.map(({ offsets, indices, places }) => ({
    offsets: plan.reserve(offsets.byteLength),
    indices: plan.reserve(indices.byteLength),
    values: plan.reserve(indices.length * 4),
    places: places === null ? null : plan.reserve(places.byteLength),
  }));
  const { kernel, memory } = startKernel(module, plan.size);
  new Float32Array(memory, valuesAt, n).set(z);
  definitions.forEach(({ offsets, indices, values, places }, d) => {
    const at = addresses[d];
    new Uint32Array(memory, at.offsets, offsets.length).set(offsets);
    new Uint32Array(memory, at.indices, indices.length).set(indices);
    new Float32Array(memory, at.values, values.length).set(values);
    if (places !== null) new Uint32Array(memory, at.places!, n).set(places);
  });
  const totals = new Float64Array(memory, totalsAt, LANES);
  const part: ShufflePart[number][] = [];

  function* shuffleLanes(first: number): Generator<void> {
    for (let lane = 0; lane < LANES; lane++) {
      const target = columnsAt + lane * n * 4;
      const { low, high } = seed;
      kernel.shuffleColumn(
        valuesAt,
        n,
        low,
        high,
        PURPOSES.permutation,
        first + lane,
        streamAt,
        target,
      );
      yield;
    }
    kernel.interleave(columnsAt, n, lanesAt);
  }

  function* sumLanes(d: number): Generator<void> {
    totals.fill(0);
    const { offsets, indices, values, places } = addresses[d];
    if (places !== null) {
      kernel.putInPlace(lanesAt, n, places, movedAt);
      yield;
    }
    const from = places === null ? lanesAt : movedAt;
    for (let row = 0; row < n; row += ROWS_PER_CALL) {
      const last = Math.min(n, row + ROWS_PER_CALL);
      kernel.sumPairs(offsets, indices, values, from, row, last, totalsAt);
      yield;
    }
  }

  return {
    *run(unit) {
      const [from, to] = shufflesOf(job, unit);
      const sums = definitions.map(() => new Float64Array(to - from));
      for (let first = from; first < to; first += LANES) {
        yield* shuffleLanes(first);
        for (let d = 0; d < definitions.length; d++) {
          yield* sumLanes(d);
          sums[d].set(totals.subarray(0, Math.min(LANES, to - first)), first - from);
        }
      }
      part.push({ unit, sums: yield* settleDoubts(job, unit, sums) });
    },
    finish: () => part,
  };
}
