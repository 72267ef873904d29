/**
 * Coordinates in whole grains, so that decisions about distance are the same in every JavaScript engine.
 *
 * @module
 */

/** Points with the grain they were rounded to. */
export interface RoundedPoints {
  /** x and y of each point, NaN in both where it has no place. */
  readonly xy: Float64Array;
  /** Grains in a unit; two distances with the same number of whole grains are equal. */
  readonly perUnit: number;
}

/**
 * Rounds coordinates to a million grains a unit (micrometers in a metric CRS), or to more, by powers of
 * ten, where the points spread over less than 1000 units, as degrees do.
 */
export function roundPoints(points: Float64Array): RoundedPoints {
  const spread = Math.max(spreadOf(points, 0), spreadOf(points, 1));
  let perUnit = 1e6;
  while (spread > 0 && spread * perUnit < 1e9 && perUnit < 1e15) perUnit *= 10;
  const xy = new Float64Array(points.length);
  for (let at = 0; at < points.length; at += 2) {
    const located = Number.isFinite(points[at] + points[at + 1]);
    xy[at] = located ? Math.round(points[at] * perUnit) / perUnit : NaN;
    xy[at + 1] = located ? Math.round(points[at + 1] * perUnit) / perUnit : NaN;
  }
  return { xy, perUnit };
}

/** Positions of the points that have a place, ascending. */
export function locatedPoints(xy: Float64Array): Uint32Array {
  const located = new Uint32Array(xy.length / 2);
  let count = 0;
  for (let i = 0; i < located.length; i++) if (!Number.isNaN(xy[2 * i])) located[count++] = i;
  return located.subarray(0, count);
}

function spreadOf(points: Float64Array, axis: 0 | 1): number {
  let low = Infinity, high = -Infinity;
  for (let at = axis; at < points.length; at += 2) {
    if (points[at] < low) low = points[at];
    if (points[at] > high) high = points[at];
  }
  return high > low ? high - low : 0;
}
