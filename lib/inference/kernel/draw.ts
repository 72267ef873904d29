/** Distinct areas for one permutation. */

import { bufferEnd, bufferOf, leastUnbiased, refill } from "./stream";

/** Up to this many draws, comparing with all earlier ones is faster than looking up a mark. */
const FEW: u32 = 32;

/**
 * Draws `count` distinct numbers below `n` into `drawn`, reading random numbers from `at` on, and returns
 * where the next reader goes on. `marks` holds a number for each area; `mark` is one that was never used
 * before. Numbers drawn twice are passed over.
 */
export function drawDistinct(
  drawn: usize,
  count: u32,
  n: u32,
  stream: usize,
  at: usize,
  marks: usize,
  mark: u32,
): usize {
  const end = bufferEnd(stream), least = leastUnbiased(n), few = count <= FEW;
  let next = at;
  for (let m: u32 = 0; m < count;) {
    if (next == end) {
      refill(stream);
      next = bufferOf(stream);
    }
    const product = (load<u32>(next) as u64) * (n as u64);
    next += 4;
    if ((product as u32) < least) continue;
    const area = (product >> 32) as u32;
    if (few ? isAmong(drawn, m, area) : isMarked(marks, mark, area)) continue;
    store<u32>(drawn + ((m as usize) << 2), area);
    m++;
  }
  return next;
}

// @ts-ignore: decorators on functions are AssemblyScript
@inline
function isAmong(drawn: usize, count: u32, area: u32): bool {
  for (let at = drawn, last = drawn + ((count as usize) << 2); at < last; at += 4) {
    if (load<u32>(at) == area) return true;
  }
  return false;
}

// @ts-ignore: decorators on functions are AssemblyScript
@inline
function isMarked(marks: usize, mark: u32, area: u32): bool {
  const place = marks + ((area as usize) << 2);
  if (load<u32>(place) == mark) return true;
  store<u32>(place, mark);
  return false;
}
