/** Shared draws for areas whose neighbors weigh differently: a table of values, weighed eight permutations abreast. */

import { drawDistinct } from "./draw";
import { bufferEnd, openStream } from "./stream";

/** Permutations in a block, and in a row of the tables. */
const BLOCK: u32 = 1024;

/** One area to be counted. */
// @ts-ignore: decorators on classes are AssemblyScript
@unmanaged
class Row {
  observed: f64;
  /** Score of the area itself. */
  own: f64;
  /** Singles above and below which a weighed sum is certain to differ from the observed one, and to which side. */
  surelyAbove: f32;
  surelyBelow: f32;
  /** First weight and number of weights. */
  start: u32;
  length: u32;
  /** Counts of the block. */
  atLeast: u32;
  atMost: u32;
}

/** Where everything is, written by `../weighed_kernel.ts` field by field. */
// @ts-ignore: decorators on classes are AssemblyScript
@unmanaged
export class WeighedLayout {
  seedLow: u32;
  seedHigh: u32;
  purpose: u32;
  /** Standard scores as doubles, and how many. */
  z: usize;
  n: u32;
  /** Rows of this unit; weights as doubles and as singles. */
  rows: usize;
  weights: usize;
  singles: usize;
  /** For each area its row plus 1; 0 where it is not counted. */
  rowOf: usize;
  /** Areas that a permutation draws. */
  draws: u32;
  /** Tables with a line of 1,024 permutations for each draw: areas, and their scores as singles. */
  dealt: usize;
  table: usize;
  /** Scratch: a stream, the areas drawn, a mark for each area, the weights of two rows side by side. */
  stream: usize;
  drawn: usize;
  marks: usize;
  paired: usize;
  /** What a draw adds: 0, its score; 1, the squared difference between its score and the row's own. */
  squared: u32;
}

/** Fills both tables with the `count` permutations of a block. Marks of this block must not have been used before. */
export function dealBlock(layout: WeighedLayout, block: u32, count: u32): void {
  const draws = layout.draws, drawn = layout.drawn, stream = layout.stream, z = layout.z;
  const seed = ((layout.seedHigh as u64) << 32) | (layout.seedLow as u64);
  openStream(stream, seed, layout.purpose, block);
  let at = bufferEnd(stream);
  for (let p: u32 = 0; p < count; p++) {
    at = drawDistinct(drawn, draws, layout.n, stream, at, layout.marks, block * BLOCK + p + 1);
    for (let m: u32 = 0; m < draws; m++) {
      const area = load<u32>(drawn + ((m as usize) << 2));
      const place = ((m * BLOCK + p) as usize) << 2;
      store<u32>(layout.dealt + place, area);
      store<f32>(layout.table + place, load<f64>(z + ((area as usize) << 3)) as f32);
    }
  }
}

/**
 * Counts the block's `count` permutations for `active` rows, whose numbers are listed at `list`, two rows at a
 * time. Single precision decides where its error cannot matter; the rest is computed again in doubles.
 */
export function weighBlock(layout: WeighedLayout, list: usize, active: u32, count: u32, tie: f64): void {
  for (let r: u32 = 0; r < active; r += 2) {
    const first = rowAt(layout, load<u32>(list + ((r as usize) << 2)));
    const hasSecond = r + 1 < active;
    const second = hasSecond ? rowAt(layout, load<u32>(list + ((r as usize) << 2), 4)) : first;
    // Two copies of the loop, each without the question.
    if (layout.squared) weighTwo(layout, first, second, hasSecond, count, tie, true);
    else weighTwo(layout, first, second, hasSecond, count, tie, false);
  }
}

// @ts-ignore: decorators on functions are AssemblyScript
@inline
function rowAt(layout: WeighedLayout, row: u32): Row {
  return changetype<Row>(layout.rows + (row as usize) * offsetof<Row>());
}

// @ts-ignore: decorators on functions are AssemblyScript
@inline
function weighTwo(
  layout: WeighedLayout,
  first: Row,
  second: Row,
  hasSecond: bool,
  count: u32,
  tie: f64,
  squared: bool,
): void {
  const longest = max(first.length, second.length);
  pairWeights(layout, first, second, longest);
  const paired = layout.paired, pairedEnd = paired + ((longest as usize) << 3);
  const ownA = f32x4.splat(first.own as f32), ownB = f32x4.splat(second.own as f32);
  const aboveA = f32x4.splat(first.surelyAbove), belowA = f32x4.splat(first.surelyBelow);
  const aboveB = f32x4.splat(second.surelyAbove), belowB = f32x4.splat(second.surelyBelow);
  let moreA = i32x4.splat(0), lessA = i32x4.splat(0), moreB = i32x4.splat(0), lessB = i32x4.splat(0);
  for (let p: u32 = 0; p < count; p += 8) {
    let line = layout.table + ((p as usize) << 2);
    let a = f32x4.splat(0), A = f32x4.splat(0), b = f32x4.splat(0), B = f32x4.splat(0);
    for (let w = paired; w < pairedEnd; w += 8) {
      const left = v128.load(line), right = v128.load(line, 16);
      const weightA = v128.load_splat<f32>(w), weightB = v128.load_splat<f32>(w, 4);
      a = f32x4.add(a, f32x4.mul(squared ? squaredDifference(left, ownA) : left, weightA));
      A = f32x4.add(A, f32x4.mul(squared ? squaredDifference(right, ownA) : right, weightA));
      b = f32x4.add(b, f32x4.mul(squared ? squaredDifference(left, ownB) : left, weightB));
      B = f32x4.add(B, f32x4.mul(squared ? squaredDifference(right, ownB) : right, weightB));
      line += BLOCK << 2;
    }
    const isMoreA = f32x4.gt(a, aboveA), IsMoreA = f32x4.gt(A, aboveA);
    const isLessA = f32x4.lt(a, belowA), IsLessA = f32x4.lt(A, belowA);
    const isMoreB = f32x4.gt(b, aboveB), IsMoreB = f32x4.gt(B, aboveB);
    const isLessB = f32x4.lt(b, belowB), IsLessB = f32x4.lt(B, belowB);
    // A comparison that holds is -1 in its lane, so subtracting counts.
    const valid = count - p;
    if (valid >= 8) {
      moreA = i32x4.sub(moreA, i32x4.add(isMoreA, IsMoreA));
      lessA = i32x4.sub(lessA, i32x4.add(isLessA, IsLessA));
      moreB = i32x4.sub(moreB, i32x4.add(isMoreB, IsMoreB));
      lessB = i32x4.sub(lessB, i32x4.add(isLessB, IsLessB));
      const surelyA = v128.and(v128.or(isMoreA, isLessA), v128.or(IsMoreA, IsLessA));
      const surelyB = v128.and(v128.or(isMoreB, isLessB), v128.or(IsMoreB, IsLessB));
      if (i32x4.all_true(v128.and(surelyA, surelyB))) continue;
      countDoubtful(layout, first, p, 8, isMoreA, IsMoreA, isLessA, IsLessA, tie);
      if (hasSecond) countDoubtful(layout, second, p, 8, isMoreB, IsMoreB, isLessB, IsLessB, tie);
    } else {
      // The last, partial vector: all of its permutations in doubles.
      const none = i32x4.splat(0);
      countDoubtful(layout, first, p, valid, none, none, none, none, tie);
      if (hasSecond) countDoubtful(layout, second, p, valid, none, none, none, none, tie);
    }
  }
  first.atLeast += addLanes(moreA);
  first.atMost += addLanes(lessA);
  if (!hasSecond) return;
  second.atLeast += addLanes(moreB);
  second.atMost += addLanes(lessB);
}

// @ts-ignore: decorators on functions are AssemblyScript
@inline
function squaredDifference(scores: v128, own: v128): v128 {
  const difference = f32x4.sub(scores, own);
  return f32x4.mul(difference, difference);
}

/** Weights of two rows side by side, the shorter one filled up with zeros. */
function pairWeights(layout: WeighedLayout, first: Row, second: Row, longest: u32): void {
  const singles = layout.singles;
  for (let m: u32 = 0; m < longest; m++) {
    const place = layout.paired + ((m as usize) << 3);
    const a: f32 = m < first.length ? load<f32>(singles + (((first.start + m) as usize) << 2)) : 0;
    const b: f32 = m < second.length ? load<f32>(singles + (((second.start + m) as usize) << 2)) : 0;
    store<f32>(place, a);
    store<f32>(place, b, 4);
  }
}

/** Counts those of the eight (or fewer) permutations from `p` on that no comparison has settled, in doubles. */
function countDoubtful(
  layout: WeighedLayout,
  row: Row,
  p: u32,
  valid: u32,
  more: v128,
  More: v128,
  less: v128,
  Less: v128,
  tie: f64,
): void {
  const settled = (i32x4.bitmask(v128.or(more, less)) as u32) |
    ((i32x4.bitmask(v128.or(More, Less)) as u32) << 4);
  for (let lane: u32 = 0; lane < valid; lane++) {
    if ((settled >> lane) & 1) continue;
    const sum = weighedSum(layout, row, p + lane, row.length);
    row.atLeast += (sum >= row.observed - tie) as u32;
    row.atMost += (sum <= row.observed + tie) as u32;
  }
}

/** Weighted sum of permutation `p` in doubles; draw number `without` gives way to the one after the row's last. */
function weighedSum(layout: WeighedLayout, row: Row, p: u32, without: u32): f64 {
  let sum: f64 = 0;
  for (let m: u32 = 0; m < row.length; m++) {
    const draw = m == without ? row.length : m;
    const area = load<u32>(layout.dealt + (((draw * BLOCK + p) as usize) << 2));
    const weight = load<f64>(layout.weights + (((row.start + m) as usize) << 3));
    const score = load<f64>(layout.z + ((area as usize) << 3)), difference = score - row.own;
    sum += weight * (layout.squared ? difference * difference : score);
  }
  return sum;
}

/**
 * Corrects the counts of rows that drew their own area: without it, and with the next draw in its place. Rows
 * with a length of 0 have stopped.
 */
export function takeOwnAreasOut(layout: WeighedLayout, count: u32, tie: f64): void {
  for (let m: u32 = 0; m + 1 < layout.draws; m++) {
    for (let p: u32 = 0; p < count; p++) {
      const area = load<u32>(layout.dealt + (((m * BLOCK + p) as usize) << 2));
      const number = load<u32>(layout.rowOf + ((area as usize) << 2));
      if (number == 0) continue;
      const row = rowAt(layout, number - 1);
      if (m >= row.length) continue;
      const sum = weighedSum(layout, row, p, row.length), replaced = weighedSum(layout, row, p, m);
      const low = row.observed - tie, high = row.observed + tie;
      row.atLeast += ((replaced >= low) as u32) - ((sum >= low) as u32);
      row.atMost += ((replaced <= high) as u32) - ((sum <= high) as u32);
    }
  }
}

// @ts-ignore: decorators on functions are AssemblyScript
@inline
function addLanes(lanes: v128): u32 {
  return i32x4.extract_lane(lanes, 0) + i32x4.extract_lane(lanes, 1) + i32x4.extract_lane(lanes, 2) +
    i32x4.extract_lane(lanes, 3);
}
