import assert from "node:assert/strict";
import { seedFromText } from "../../lib/inference/seed.ts";
import {
  drawBelow,
  drawUniform,
  HIGH,
  LOW,
  nextBits,
  nextWord,
  openStream,
  PURPOSES,
} from "../../lib/inference/stream.ts";

const MASK = 2n ** 64n - 1n;
const turn = (x: bigint, bits: bigint) => (x << bits | x >> 64n - bits) & MASK;

/** xoshiro256** as published (Blackman & Vigna 2021), in big integers. */
function publishedGenerator(state: bigint[]): () => bigint {
  const s = [...state];
  return () => {
    const result = turn(s[1] * 5n & MASK, 7n) * 9n & MASK;
    const shifted = s[1] << 17n & MASK;
    s[2] ^= s[0];
    s[3] ^= s[1];
    s[1] ^= s[2];
    s[0] ^= s[3];
    s[2] ^= shifted;
    s[3] = turn(s[3], 45n);
    return result;
  };
}

Deno.test("nextWord() draws the words of the published generator", () => {
  const stream = openStream(seedFromText("words"), "permutation", 12);
  const word = (at: number) => BigInt(stream[at]) | BigInt(stream[at + 1]) << 32n;
  const published = publishedGenerator([word(0), word(2), word(4), word(6)]);
  for (let i = 0; i < 2000; i++) {
    nextWord(stream);
    assert.equal(BigInt(stream[LOW]) | BigInt(stream[HIGH]) << 32n, published());
  }
});

Deno.test("openStream() gives streams that differ by seed, purpose and number", () => {
  const seen = new Set<string>();
  for (const text of ["a", "b"]) {
    for (const purpose of Object.keys(PURPOSES) as (keyof typeof PURPOSES)[]) {
      for (let index = 0; index < 50; index++) {
        seen.add(String(openStream(seedFromText(text), purpose, index)));
      }
    }
  }
  assert.equal(seen.size, 2 * 4 * 50);
});

Deno.test("seedFromText() stays as it is, as recorded runs depend on it", () => {
  assert.deepEqual(seedFromText("nearkin"), { low: 3323314642, high: 2982103277 });
  assert.notDeepEqual(seedFromText(""), seedFromText(" "));
});

Deno.test("nextBits() hands out the low half of each word, then the high half", () => {
  const bits = openStream(seedFromText("halves"), "permutation", 0);
  const words = openStream(seedFromText("halves"), "permutation", 0);
  for (let i = 0; i < 100; i++) {
    nextWord(words);
    assert.deepEqual([nextBits(bits), nextBits(bits)], [words[LOW], words[HIGH]]);
  }
});

Deno.test("drawBelow() is the upper half of bits times bound, biased bits passed over", () => {
  for (const bound of [1, 2, 3, 1000, 2 ** 21 + 1, 3_000_000_019, 2 ** 32 - 1]) {
    const draws = openStream(seedFromText("bound"), "permutation", 0);
    const bits = openStream(seedFromText("bound"), "permutation", 0);
    const wide = BigInt(bound), biased = (2n ** 32n - wide) % wide;
    for (let i = 0; i < 500; i++) {
      let product = BigInt(nextBits(bits)) * wide;
      while ((product & 0xffffffffn) < biased) product = BigInt(nextBits(bits)) * wide;
      assert.equal(drawBelow(draws, bound), Number(product >> 32n));
    }
  }
});

Deno.test("drawBelow() is even over a bound that does not divide 2^32", () => {
  // With 3 × 2^30 naive multiplication gives every third number twice as often.
  const stream = openStream(seedFromText("even"), "permutation", 0);
  const thirds = [0, 0, 0];
  for (let i = 0; i < 30_000; i++) thirds[drawBelow(stream, 3 * 2 ** 30) % 3]++;
  // Standard deviation of each count is sqrt(30000 · 2/9) = 82.
  for (const count of thirds) assert.ok(Math.abs(count - 10_000) < 4 * 82, String(thirds));
});

Deno.test("drawUniform() lies in [0, 1) with mean a half", () => {
  const stream = openStream(seedFromText("uniform"), "simulatedMap", 1);
  let sum = 0;
  for (let i = 0; i < 10_000; i++) {
    const u = drawUniform(stream);
    assert.ok(u >= 0 && u < 1);
    sum += u;
  }
  assert.ok(Math.abs(sum / 10_000 - 0.5) < 4 * Math.sqrt(1 / 12 / 10_000));
});
