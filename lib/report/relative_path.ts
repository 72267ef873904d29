/**
 * Path data in whole units, each point relative to the one before: a hundred thousand areas in a few
 * megabytes.
 *
 * @module
 */

/** A path that grows. Points are flat lists x0, y0, x1, y1, … of whole numbers. */
export interface RelativePath {
  /** Adds a closed ring. */
  ring(points: readonly number[]): void;
  /** Adds an open line. */
  line(points: readonly number[]): void;
  /** Adds a square of one unit, for what is smaller than that; once at each place. */
  dot(x: number, y: number): void;
  /** The path data so far. */
  text(): string;
}

/** Opens an empty path. */
export function relativePath(): RelativePath {
  const pieces: string[] = [];
  const dots = new Set<string>();
  let penX = 0, penY = 0;
  const start = (x: number, y: number) => {
    pieces.push(`m${pair(x - penX, y - penY)}`);
    penX = x;
    penY = y;
  };
  return {
    // Closing a ring takes the pen back to where the ring began.
    ring: (points) => {
      start(points[0], points[1]);
      pieces.push(steps(points), "z");
    },
    line: (points) => {
      start(points[0], points[1]);
      pieces.push(steps(points));
      penX = points[points.length - 2];
      penY = points[points.length - 1];
    },
    dot: (x, y) => {
      const place = pair(x, y);
      if (dots.has(place)) return;
      dots.add(place);
      start(x, y);
      pieces.push("h1v1h-1z");
    },
    text: () => pieces.join(""),
  };
}

/** Steps from each point to the next, in as few characters as the grammar of paths allows. */
function steps(points: readonly number[]): string {
  let text = "";
  for (let i = 2; i < points.length; i += 2) {
    const dx = points[i] - points[i - 2];
    text += `${dx < 0 ? "" : " "}${pair(dx, points[i + 1] - points[i - 1])}`;
  }
  return text;
}

function pair(a: number, b: number): string {
  return b < 0 ? `${a}${b}` : `${a} ${b}`;
}
