/** Ranks of many areas among the same sorted sums: two walks side by side. */

/**
 * For the areas `first` … `last` - 1 (32 bytes each, see `Area` in `ranked.ts`) adds to `atLeast` how many of
 * `count` sorted sums are at least the observed value less `tie`, and to `atMost` how many are at most that plus
 * `tie`. Quick where the areas ascend by observed value, as then each place is found close to the last one;
 * correct in any order.
 */
export function rankAreas(
  areas: usize,
  first: u32,
  last: u32,
  sums: usize,
  count: u32,
  tie: f64,
): void {
  const end = sums + ((count as usize) << 3);
  let below = sums, upTo = sums;
  for (let i = first; i < last; i++) {
    const area = areas + ((i as usize) << 5);
    const observed = load<f64>(area, 8);
    const low = observed - tie, high = observed + tie;
    while (below < end && load<f64>(below) < low) below += 8;
    while (below > sums && load<f64>(below - 8) >= low) below -= 8;
    while (upTo < end && load<f64>(upTo) <= high) upTo += 8;
    while (upTo > sums && load<f64>(upTo - 8) > high) upTo -= 8;
    store<u32>(area, load<u32>(area, 20) + (((end - below) >> 3) as u32), 20);
    store<u32>(area, load<u32>(area, 24) + (((upTo - sums) >> 3) as u32), 24);
  }
}
