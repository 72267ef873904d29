/** Shared draws for areas whose neighbors weigh the same: sums of the first k, and taking the area itself out. */

import { drawDistinct } from "./draw";
import { bufferEnd, openStream } from "./stream";

/**
 * One area: what a draw of it needs lies in half a cache line.
 * `degree` is 0 for areas that are not tested; the counts are changes, so they may pass below 0.
 */
// @ts-ignore: decorators on classes are AssemblyScript
@unmanaged
class Area {
  z: f64;
  observed: f64;
  degree: u32;
  atLeast: i32;
  atMost: i32;
  unused: u32;
}

/** Where everything is, written by `../ranked_kernel.ts` field by field. */
// @ts-ignore: decorators on classes are AssemblyScript
@unmanaged
export class RankedLayout {
  seedLow: u32;
  seedHigh: u32;
  purpose: u32;
  /** Areas, and how many of them. */
  areas: usize;
  n: u32;
  /** Distinct neighbor counts, and how many of them. */
  degrees: usize;
  degreeCount: u32;
  /** Areas that a permutation draws. */
  draws: u32;
  /** Sums: a column of `stride` for each distinct neighbor count. */
  sums: usize;
  stride: u32;
  /** Scratch for a block: a stream, the areas drawn, their running sums; and a mark for each area. */
  stream: usize;
  drawn: usize;
  running: usize;
  marks: usize;
}

const AREA: u32 = 5; // an area is 32 bytes

/**
 * Draws the `count` permutations of a block, writes their sums from row `row` of the columns on, and corrects
 * the counts of areas that drew themselves. `tie` is the distance within which sums are equal. Each step does
 * the whole block: on a million areas most reads miss the caches, and short loops keep many of them under way.
 */
export function drawRankedBlock(layout: RankedLayout, block: u32, count: u32, row: u32, tie: f64): void {
  const draws = layout.draws as usize, place = draws << 2;
  drawAreas(layout, block, count);
  for (let p: usize = 0; p < (count as usize); p++) {
    addUp(layout.areas, layout.drawn + p * place, layout.running + ((p * (draws + 1)) << 3), draws);
  }
  for (let p: usize = 0; p < (count as usize); p++) {
    const drawn = layout.drawn + p * place, running = layout.running + ((p * (draws + 1)) << 3);
    keepSums(layout, running, (row as usize) + p);
    takeThemselvesOut(layout.areas, drawn, running, draws, tie);
  }
}

function drawAreas(layout: RankedLayout, block: u32, count: u32): void {
  const seed = ((layout.seedHigh as u64) << 32) | (layout.seedLow as u64);
  const stream = layout.stream, draws = layout.draws, n = layout.n, marks = layout.marks;
  openStream(stream, seed, layout.purpose, block);
  let at = bufferEnd(stream), drawn = layout.drawn;
  for (let p: u32 = 0; p < count; p++) {
    at = drawDistinct(drawn, draws, n, stream, at, marks, block * 1024 + p + 1);
    drawn += (draws as usize) << 2;
  }
}

/** Running sums of the scores drawn: entry k is the sum of the first k. */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
function addUp(areas: usize, drawn: usize, running: usize, draws: usize): void {
  let sum: f64 = 0;
  for (let m: usize = 0; m < draws; m++) {
    sum += load<f64>(areas + ((load<u32>(drawn + (m << 2)) as usize) << AREA), offsetof<Area>("z"));
    store<f64>(running + (m << 3), sum, 8);
  }
}

/** Writes the sums of the first k draws for each neighbor count k that occurs. */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
function keepSums(layout: RankedLayout, running: usize, row: usize): void {
  const degrees = layout.degrees;
  const step = (layout.stride as usize) << 3;
  let target = layout.sums + (row << 3);
  const last = degrees + ((layout.degreeCount as usize) << 2);
  for (let degree = degrees; degree < last; degree += 4) {
    store<f64>(target, load<f64>(running + ((load<u32>(degree) as usize) << 3)));
    target += step;
  }
}

/** An area among its own first k draws gives way to draw k + 1; where that changes a comparison, so do its counts. */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
function takeThemselvesOut(areas: usize, drawn: usize, running: usize, draws: usize, tie: f64): void {
  for (let m: usize = 0; m + 1 < draws; m++) {
    const area = changetype<Area>(areas + ((load<u32>(drawn + (m << 2)) as usize) << AREA));
    const degree = area.degree as usize;
    if (m >= degree) continue;
    const sum = load<f64>(running + (degree << 3));
    const next = changetype<Area>(areas + ((load<u32>(drawn + (degree << 2)) as usize) << AREA));
    const replaced = sum - area.z + next.z;
    const low = area.observed - tie, high = area.observed + tie;
    const more = ((replaced >= low) as i32) - ((sum >= low) as i32);
    const less = ((replaced <= high) as i32) - ((sum <= high) as i32);
    if (more | less) {
      area.atLeast += more;
      area.atMost += less;
    }
  }
}
