/** The quadratic form over pairs, for eight maps abreast. */

/** Rows whose products are summed in single precision before they are added up in double precision. */
const ROWS: u32 = 32;

/**
 * Adds to the eight doubles at `totals` the sums over rows `first` … `last` - 1 of v_e z_i z_j for each of eight
 * maps in `lanes`. `first` is a multiple of 32. The order of additions is that of `../shuffle_singles.ts`.
 */
export function sumPairs(
  offsets: usize,
  indices: usize,
  values: usize,
  lanes: usize,
  first: u32,
  last: u32,
  totals: usize,
): void {
  let e = load<u32>(offsets + ((first as usize) << 2)) as usize;
  for (let i = first; i < last;) {
    const until = min<u32>(i + ROWS, last);
    let blockA = f32x4.splat(0), blockB = f32x4.splat(0);
    for (; i < until; i++) {
      let rowA = f32x4.splat(0), rowB = f32x4.splat(0);
      const end = load<u32>(offsets + ((i as usize) << 2), 4) as usize;
      for (; e < end; e++) {
        const weight = v128.load_splat<f32>(values + (e << 2));
        const other = lanes + ((load<u32>(indices + (e << 2)) as usize) << 5);
        rowA = f32x4.add(rowA, f32x4.mul(weight, v128.load(other)));
        rowB = f32x4.add(rowB, f32x4.mul(weight, v128.load(other, 16)));
      }
      const own = lanes + ((i as usize) << 5);
      blockA = f32x4.add(blockA, f32x4.mul(rowA, v128.load(own)));
      blockB = f32x4.add(blockB, f32x4.mul(rowB, v128.load(own, 16)));
    }
    addTo(totals, blockA);
    addTo(totals + 32, blockB);
  }
}

/** Four singles onto four doubles. */
// @ts-ignore: decorators on functions are AssemblyScript
@inline
function addTo(totals: usize, block: v128): void {
  const upper = v128.shuffle<f32>(block, block, 2, 3, 2, 3);
  v128.store(totals, f64x2.add(v128.load(totals), f64x2.promote_low_f32x4(block)));
  v128.store(totals, f64x2.add(v128.load(totals, 16), f64x2.promote_low_f32x4(upper)), 16);
}
