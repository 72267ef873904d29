/** Shuffled maps, eight of them side by side. */

import { leastUnbiased, openStream } from "./stream";

/** Fills `target` with the `n` singles of `values` in the order of permutation `index`. */
export function shuffleColumn(
  values: usize,
  n: u32,
  seedLow: u32,
  seedHigh: u32,
  purpose: u32,
  index: u32,
  stream: usize,
  target: usize,
): void {
  memory.copy(target, values, (n as usize) << 2);
  openStream(stream, ((seedHigh as u64) << 32) | (seedLow as u64), purpose, index);
  shuffle(target, n, stream);
}

/**
 * Fisher & Yates; the same order as `../shuffle.ts` gives. The stream is used up at once, so its state stays in
 * registers and each word serves two steps, its low half first.
 */
function shuffle(values: usize, n: u32, stream: usize): void {
  let a = load<u64>(stream), b = load<u64>(stream, 8);
  let c = load<u64>(stream, 16), d = load<u64>(stream, 24);
  for (let left = n; left > 1;) {
    const word = rotl<u64>(b * 5, 7) * 9, shifted = b << 17;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = rotl<u64>(d, 45);
    left = settleLast(values, left, word as u32);
    if (left > 1) left = settleLast(values, left, (word >> 32) as u32);
  }
}

/** Swaps the last of `left` singles with any of them and returns how many are left; with biased bits, all are. */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
function settleLast(values: usize, left: u32, bits: u32): u32 {
  const product = (bits as u64) * (left as u64), low = product as u32;
  if (low < left && low < leastUnbiased(left)) return left;
  const last = values + (((left - 1) as usize) << 2), chosen = values + (((product >> 32) as usize) << 2);
  const kept = load<u32>(last);
  store<u32>(last, load<u32>(chosen));
  store<u32>(chosen, kept);
  return left - 1;
}

/**
 * Lays eight columns of `n` singles, one after the other, side by side in `lanes`: eight singles of area 0, eight
 * of area 1, and so on. Four areas and four columns at a time.
 */
export function interleave(columns: usize, n: u32, lanes: usize): void {
  const column = (n as usize) << 2;
  let i: u32 = 0;
  for (; i + 4 <= n; i += 4) {
    for (let half: usize = 0; half < 2; half++) {
      const from = columns + half * 4 * column + ((i as usize) << 2);
      const to = lanes + ((i as usize) << 5) + half * 16;
      const a = v128.load(from), b = v128.load(from + column);
      const c = v128.load(from + 2 * column), d = v128.load(from + 3 * column);
      const ab = v128.shuffle<f32>(a, b, 0, 4, 1, 5), cd = v128.shuffle<f32>(c, d, 0, 4, 1, 5);
      const AB = v128.shuffle<f32>(a, b, 2, 6, 3, 7), CD = v128.shuffle<f32>(c, d, 2, 6, 3, 7);
      v128.store(to, v128.shuffle<f32>(ab, cd, 0, 1, 4, 5));
      v128.store(to, v128.shuffle<f32>(ab, cd, 2, 3, 6, 7), 32);
      v128.store(to, v128.shuffle<f32>(AB, CD, 0, 1, 4, 5), 64);
      v128.store(to, v128.shuffle<f32>(AB, CD, 2, 3, 6, 7), 96);
    }
  }
  for (; i < n; i++) {
    for (let lane: usize = 0; lane < 8; lane++) {
      const value = load<f32>(columns + lane * column + ((i as usize) << 2));
      store<f32>(lanes + ((i as usize) << 5) + lane * 4, value);
    }
  }
}

/** Moves the eight singles of each area in `lanes` to its place in `target`. */
export function putInPlace(lanes: usize, n: u32, places: usize, target: usize): void {
  for (let i: u32 = 0; i < n; i++) {
    const from = lanes + ((i as usize) << 5);
    const to = target + ((load<u32>(places + ((i as usize) << 2)) as usize) << 5);
    v128.store(to, v128.load(from));
    v128.store(to, v128.load(from, 16), 16);
  }
}
