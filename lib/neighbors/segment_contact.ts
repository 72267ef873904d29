/**
 * How two straight pieces of boundary lie to each other.
 *
 * @module
 */

/** A segment from a to b. */
export interface Segment {
  readonly ax: number;
  readonly ay: number;
  readonly bx: number;
  readonly by: number;
}

/** Two segments that come within reach of each other. */
export interface SegmentContact {
  /** Distance between them; 0 where they cross. */
  readonly gap: number;
  /** Length over which they run alongside each other, nowhere farther apart than the reach. */
  readonly stretch: number;
  /** Whether they cross, with all four ends out of reach of the other segment. */
  readonly crosses: boolean;
}

/** Sine of 30°: segments that meet under a wider angle meet in a point, however long the reach. */
const ALONGSIDE = 0.5;

/**
 * Compares two segments; null when they stay more than `reach` apart.
 *
 * An end within reach of the other segment makes a contact in a point (a T-junction, a common corner);
 * a stretch needs the whole overlap of the two, seen from the first, to be within reach, so that two sides
 * of a sharp corner are no stretch.
 */
export function segmentContact(s: Segment, t: Segment, reach: number): SegmentContact | null {
  const ux = s.bx - s.ax, uy = s.by - s.ay, vx = t.bx - t.ax, vy = t.by - t.ay;
  const gap = Math.min(
    distanceToSegment(t.ax, t.ay, s),
    distanceToSegment(t.bx, t.by, s),
    distanceToSegment(s.ax, s.ay, t),
    distanceToSegment(s.bx, s.by, t),
  );
  const turn = ux * vy - uy * vx;
  if (gap > reach) {
    return turn !== 0 && crossInside(s, t, turn) ? { gap: 0, stretch: 0, crosses: true } : null;
  }
  const lengths = Math.sqrt((ux * ux + uy * uy) * (vx * vx + vy * vy));
  const alongside = Math.abs(turn) <= ALONGSIDE * lengths;
  return { gap, stretch: alongside ? commonStretch(s, t, reach) : 0, crosses: false };
}

function distanceToSegment(x: number, y: number, { ax, ay, bx, by }: Segment): number {
  const ux = bx - ax, uy = by - ay;
  const square = ux * ux + uy * uy;
  const along = square > 0 ? ((x - ax) * ux + (y - ay) * uy) / square : 0;
  const clamped = Math.max(0, Math.min(1, along));
  const dx = x - ax - clamped * ux, dy = y - ay - clamped * uy;
  return Math.sqrt(dx * dx + dy * dy);
}

/** Whether the lines meet between the ends of both, given the cross product of their directions. */
function crossInside(s: Segment, t: Segment, turn: number): boolean {
  const wx = t.ax - s.ax, wy = t.ay - s.ay;
  const alongS = (wx * (t.by - t.ay) - wy * (t.bx - t.ax)) / turn;
  const alongT = (wx * (s.by - s.ay) - wy * (s.bx - s.ax)) / turn;
  return alongS >= 0 && alongS <= 1 && alongT >= 0 && alongT <= 1;
}

/** Length of the part of `s` that `t` runs beside, or 0 where they drift out of reach on it. */
function commonStretch(s: Segment, t: Segment, reach: number): number {
  const ux = s.bx - s.ax, uy = s.by - s.ay;
  const length = Math.sqrt(ux * ux + uy * uy);
  const along = (x: number, y: number) => ((x - s.ax) * ux + (y - s.ay) * uy) / length;
  const beside = (x: number, y: number) => ((y - s.ay) * ux - (x - s.ax) * uy) / length;
  const alongA = along(t.ax, t.ay), alongB = along(t.bx, t.by);
  const start = Math.max(0, Math.min(alongA, alongB));
  const end = Math.min(length, Math.max(alongA, alongB));
  if (!(end > start)) return 0;
  const besideA = beside(t.ax, t.ay), besideB = beside(t.bx, t.by);
  const slope = (besideB - besideA) / (alongB - alongA);
  const drift = (at: number) => Math.abs(besideA + (at - alongA) * slope);
  return drift(start) <= reach && drift(end) <= reach ? end - start : 0;
}
