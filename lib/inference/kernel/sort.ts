/** Sorting doubles by their bits: six passes over eleven bits each. */

const PASSES: u32 = 6;
const BITS: u32 = 11;
const BINS: u32 = 2048;
/** Bytes of the counters that sorting needs. */
export const SORT_COUNTERS: u32 = PASSES * BINS * 4;

/**
 * Sorts `count` doubles in place, using `other` of the same size and `counters` of {@link SORT_COUNTERS} bytes. The
 * number of passes is even, so the result ends where it began.
 */
export function sortDoubles(values: usize, count: u32, other: usize, counters: usize): void {
  const bytes = (count as usize) << 3;
  countDigits(values, bytes, counters);
  let from = values, to = other;
  for (let pass: u32 = 0; pass < PASSES; pass++) {
    const bins = counters + ((pass * BINS) << 2);
    turnIntoStarts(bins);
    moveByDigit(from, bytes, to, bins, (pass * BITS) as u64);
    const kept = from;
    from = to;
    to = kept;
  }
  for (let at = values; at < values + bytes; at += 8) store<u64>(at, bitsOfKey(load<u64>(at)));
}

/** Turns the doubles into keys and counts the digits of all passes; written out, as the compiler unrolls nothing. */
function countDigits(values: usize, bytes: usize, counters: usize): void {
  memory.fill(counters, 0, SORT_COUNTERS);
  for (let at = values; at < values + bytes; at += 8) {
    const key = ascendingKey(load<u64>(at));
    store<u64>(at, key);
    increment(counters, key as u32);
    increment(counters + (BINS << 2), (key >> 11) as u32);
    increment(counters + (BINS << 2) * 2, (key >> 22) as u32);
    increment(counters + (BINS << 2) * 3, (key >> 33) as u32);
    increment(counters + (BINS << 2) * 4, (key >> 44) as u32);
    increment(counters + (BINS << 2) * 5, (key >> 55) as u32);
  }
}

/** From how many keys have each digit to the number of the first of them. */
function turnIntoStarts(bins: usize): void {
  let start: u32 = 0;
  for (let bin = bins; bin < bins + (BINS << 2); bin += 4) {
    const count = load<u32>(bin);
    store<u32>(bin, start);
    start += count;
  }
}

function moveByDigit(from: usize, bytes: usize, to: usize, bins: usize, shift: u64): void {
  for (let at = from; at < from + bytes; at += 8) {
    const key = load<u64>(at);
    store<u64>(to + ((increment(bins, (key >> shift) as u32) as usize) << 3), key);
  }
}

/** Adds one to the counter of a digit and returns what it was. */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
function increment(bins: usize, digit: u32): u32 {
  const counter = bins + (((digit & (BINS - 1)) as usize) << 2);
  const before = load<u32>(counter);
  store<u32>(counter, before + 1);
  return before;
}

/** Bits that ascend as unsigned integers when the doubles do: the sign flipped, and for negatives all the rest. */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
function ascendingKey(bits: u64): u64 {
  return bits ^ ((((bits as i64) >> 63) as u64) | 0x8000000000000000);
}

// @ts-ignore: decorators on functions are AssemblyScript
@inline
function bitsOfKey(key: u64): u64 {
  return key ^ (((key >> 63) - 1) | 0x8000000000000000);
}
