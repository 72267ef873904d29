/**
 * Streams of random numbers in memory: xoshiro256** (Blackman & Vigna 2021), a buffer at a time.
 *
 * A stream is four 64-bit words of state followed by a buffer of 32-bit numbers. Filling the whole buffer
 * keeps the state in registers; users only read the next number. The same numbers, in the same order, as
 * `../stream.ts`.
 */

const STATE: usize = 32;
const BUFFER: usize = 2048;
/** Bytes of a stream. */
export const STREAM: usize = STATE + BUFFER;

const GOLDEN: u64 = 0x9e3779b97f4a7c15;

/** Opens stream number `index` of a purpose, seeded by splitmix64; its buffer is yet to be filled. */
export function openStream(stream: usize, seed: u64, purpose: u32, index: u32): void {
  let counter = mix(seed + GOLDEN) ^ (((purpose as u64) << 32) | (index as u64));
  for (let word: usize = 0; word < STATE; word += 8) {
    counter += GOLDEN;
    store<u64>(stream + word, mix(counter));
  }
}

function mix(value: u64): u64 {
  let z = value;
  z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9;
  z = (z ^ (z >> 27)) * 0x94d049bb133111eb;
  return z ^ (z >> 31);
}

/** First number of the buffer. */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
export function bufferOf(stream: usize): usize {
  return stream + STATE;
}

/** One past the last number of the buffer: who has read up to here has to refill. */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
export function bufferEnd(stream: usize): usize {
  return stream + STREAM;
}

/** Fills the buffer with the next numbers; each word gives its low half first. */
export function refill(stream: usize): void {
  let a = load<u64>(stream), b = load<u64>(stream, 8);
  let c = load<u64>(stream, 16), d = load<u64>(stream, 24);
  for (let at = stream + STATE; at < stream + STREAM; at += 8) {
    store<u64>(at, rotl<u64>(b * 5, 7) * 9);
    const shifted = b << 17;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = rotl<u64>(d, 45);
  }
  store<u64>(stream, a);
  store<u64>(stream, b, 8);
  store<u64>(stream, c, 16);
  store<u64>(stream, d, 24);
}

/**
 * Of 32 random bits times `bound`, the lower half is at least this when the bits are free of bias; others are
 * passed over (Lemire 2019).
 */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
export function leastUnbiased(bound: u32): u32 {
  return (0 - bound) % bound;
}
