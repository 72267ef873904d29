/**
 * Streams of random numbers: xoshiro256** (Blackman & Vigna 2021) in 32-bit halves.
 *
 * A stream belongs to a permutation or to a block of permutations, never to a worker, so that any number of
 * workers draws the same. The WebAssembly kernels hold the same generator in 64-bit integers.
 *
 * @module
 */
import type { Seed } from "./seed.ts";

/**
 * What a stream is for. Streams of different purposes share no numbers; the kernels are handed the
 * purpose as a number, so the values are fixed.
 */
export const PURPOSES = {
  permutation: 1,
  rankedBlock: 2,
  weighedBlock: 3,
  simulatedMap: 4,
} as const;
/** See {@link PURPOSES}. */
export type Purpose = keyof typeof PURPOSES;

/**
 * State of a stream: four 64-bit words as low and high halves (0 … 7), the halves of the word last drawn
 * ({@link LOW}, {@link HIGH}), and 1 where its high half is still to be handed out (10).
 */
export type Stream = Uint32Array;

/** Where a stream keeps the low half of the word last drawn. */
export const LOW = 8;
/** Where a stream keeps the high half of the word last drawn. */
export const HIGH = 9;
const SPARE = 10;

/** Opens stream number `index` of a purpose, seeded by splitmix64 (Steele, Lea & Flood 2014). */
export function openStream(seed: Seed, purpose: Purpose, index: number): Stream {
  const whole = BigInt(seed.high) << 32n | BigInt(seed.low);
  const label = BigInt(PURPOSES[purpose]) << 32n | BigInt(index);
  let counter = mix(whole + GOLDEN) ^ label;
  const stream = new Uint32Array(11);
  for (let word = 0; word < 4; word++) {
    counter = BigInt.asUintN(64, counter + GOLDEN);
    const mixed = mix(counter);
    stream[2 * word] = Number(mixed & 0xffffffffn);
    stream[2 * word + 1] = Number(mixed >> 32n);
  }
  return stream;
}

const GOLDEN = 0x9e3779b97f4a7c15n;

function mix(value: bigint): bigint {
  let z = BigInt.asUintN(64, value);
  z = BigInt.asUintN(64, (z ^ z >> 30n) * 0xbf58476d1ce4e5b9n);
  z = BigInt.asUintN(64, (z ^ z >> 27n) * 0x94d049bb133111ebn);
  return z ^ z >> 31n;
}

/** Draws the next 64-bit word into `stream[LOW]` and `stream[HIGH]`. */
export function nextWord(stream: Stream): void {
  const aLow = stream[0], aHigh = stream[1], bLow = stream[2], bHigh = stream[3];
  const cLow = stream[4] ^ aLow, cHigh = stream[5] ^ aHigh;
  const dLow = stream[6] ^ bLow, dHigh = stream[7] ^ bHigh;

  // rotl(b * 5, 7) * 9, with b * 5 as b + (b << 2) and x * 9 as x + (x << 3)
  const b4Low = bLow << 2 >>> 0, b4High = (bHigh << 2 | bLow >>> 30) >>> 0;
  const b5Low = bLow + b4Low >>> 0;
  const b5High = bHigh + b4High + (b5Low < b4Low ? 1 : 0) >>> 0;
  const xLow = (b5Low << 7 | b5High >>> 25) >>> 0, xHigh = (b5High << 7 | b5Low >>> 25) >>> 0;
  const x8Low = xLow << 3 >>> 0, x8High = (xHigh << 3 | xLow >>> 29) >>> 0;
  const x9Low = xLow + x8Low >>> 0;
  stream[LOW] = x9Low;
  stream[HIGH] = xHigh + x8High + (x9Low < x8Low ? 1 : 0);

  stream[2] = bLow ^ cLow;
  stream[3] = bHigh ^ cHigh;
  stream[0] = aLow ^ dLow;
  stream[1] = aHigh ^ dHigh;
  stream[4] = cLow ^ bLow << 17;
  stream[5] = cHigh ^ (bHigh << 17 | bLow >>> 15);
  stream[6] = dHigh << 13 | dLow >>> 19; // rotl by 45 swaps the halves and turns by 13
  stream[7] = dLow << 13 | dHigh >>> 19;
}

/** The next 32 random bits: of each word first the low half, then the high one. */
export function nextBits(stream: Stream): number {
  if (stream[SPARE]) {
    stream[SPARE] = 0;
    return stream[HIGH];
  }
  nextWord(stream);
  stream[SPARE] = 1;
  return stream[LOW];
}

/**
 * Uniform integer from 0 to `bound` - 1 without bias: the upper half of 32 random bits times `bound`, where
 * bits that would bias it are passed over (Lemire 2019).
 */
export function drawBelow(stream: Stream, bound: number): number {
  for (;;) {
    const bits = nextBits(stream);
    const low = Math.imul(bits, bound) >>> 0;
    if (low < bound && low < (2 ** 32 - bound) % bound) continue;
    return highHalfOfProduct(bits, bound);
  }
}

/** Upper 32 bits of a product of two unsigned 32-bit integers; a double holds 53 bits, so in two steps. */
function highHalfOfProduct(a: number, b: number): number {
  const low = (a & 0xffff) * b;
  return Math.floor(((a >>> 16) * b + Math.floor(low / 0x10000)) / 0x10000);
}

/** Uniform number in [0, 1) with the 53 upper bits of a word. */
export function drawUniform(stream: Stream): number {
  nextWord(stream);
  return ((stream[HIGH] >>> 5) * 2 ** 26 + (stream[LOW] >>> 6)) / 2 ** 53;
}
