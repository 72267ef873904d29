/**
 * Work cut into units that any worker can do in any order, with the same result.
 *
 * @module
 */

/** One kind of counting over one set of inputs; each worker opens its own. */
export interface Counter<Part> {
  /** Does one unit, pausing wherever the caller may want to look up. */
  run(unit: number): Iterable<void>;
  /** What all units done here amount to. Parts of several workers are put together by the job's owner. */
  finish(): Part;
}

/** How much there is to do. */
export interface Workload {
  /** Number of units, numbered from 0. */
  readonly units: number;
  /** Rough time for all of them on one thread; decides whether workers are worth starting. */
  readonly milliseconds: number;
}
