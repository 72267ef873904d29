/**
 * Maps on which a null hypothesis holds, and the one loop over them.
 *
 * @module
 */
import { checkPermutations, type PermuteOptions } from "./options.ts";
import { createPace } from "./pace.ts";
import { seedFromText } from "./seed.ts";
import { shuffleInto } from "./shuffle.ts";
import { openStream, type Stream } from "./stream.ts";

/**
 * A null: makes one map for each stream, in turn, of that stream's random numbers alone. It is given some streams
 * at once, so that work the maps have in common need not be done for each.
 */
export type NullModel<Map> = (streams: readonly Stream[]) => Iterable<Map>;

/** Maps asked for at once. */
const TOGETHER = 64;

/** The null whose maps share nothing: `make` makes each of its stream. */
export function oneByOne<Map>(make: (stream: Stream) => Map): NullModel<Map> {
  return function* (streams) {
    for (const stream of streams) yield make(stream);
  };
}

/** The null that the values found could lie anywhere; `permuteMoran` does the same much faster. */
export function shuffledMaps(values: Float64Array): NullModel<Float64Array> {
  return oneByOne((stream) => {
    const shuffled = new Float64Array(values.length);
    shuffleInto(shuffled, values, stream);
    return shuffled;
  });
}

/**
 * Makes `permutations` maps (999 by default) of a null and hands each to `visit`, with its number from 0 on; returns how
 * many there were. Map p depends on seed and p only.
 *
 * @throws UsageError for a number that is not whole, below 99 or above 9,999,999. Rejects with the signal's reason
 * when aborted.
 */
export async function visitNullMaps<Map>(
  model: NullModel<Map>,
  visit: (map: Map, number: number) => void,
  options: PermuteOptions = {},
): Promise<number> {
  const maps = checkPermutations(options.permutations ?? 999);
  const seed = seedFromText(options.seed ?? "nearkin");
  const pace = createPace(options);
  for (let first = 0; first < maps; first += TOGETHER) {
    const streams = Array.from(
      { length: Math.min(TOGETHER, maps - first) },
      (_, m) => openStream(seed, "simulatedMap", first + m),
    );
    let number = first;
    for (const map of model(streams)) {
      visit(map, number++);
      await pace(number / maps);
    }
  }
  return maps;
}
