/**
 * What a section of the benchmark is: something timed against something else, with a target.
 *
 * @module
 */

/** Two things timed in the same run. */
export interface Comparison {
  /** What was done, for people. */
  readonly what: string;
  /** Median seconds of nearkin. */
  readonly ours: number;
  /** Median seconds of the peer; null where the peer is not installed. */
  readonly peer: number | null;
  /** The target in words; null where the row is for information. */
  readonly target: string | null;
  /** Whether the target is met, given both medians. */
  readonly isMet?: (ours: number, peer: number) => boolean;
}

/** A named part of the benchmark. */
export interface Section {
  /** What `deno task bench NAME` calls it. */
  readonly name: string;
  /** What it measures and against what. */
  readonly title: string;
  /** Measures. */
  run(): Promise<Comparison[]> | Comparison[];
}

/** Comparisons as a text table, times in seconds and the ratio of ours to the peer's. */
export function comparisonTable(comparisons: readonly Comparison[]): string {
  const rows = comparisons.map((row) => [
    row.what,
    row.ours.toFixed(3),
    row.peer?.toFixed(3) ?? "missing",
    row.peer === null ? "-" : (row.ours / row.peer).toFixed(2),
    row.target ?? "-",
    row.target === null ? "" : isMet(row) ? "MET" : "NOT MET",
  ]);
  const table = [["", "nearkin s", "peer s", "ratio", "target", ""], ...rows];
  const widths = table[0].map((_, column) => Math.max(...table.map((row) => row[column].length)));
  const line = (row: readonly string[]) =>
    row.map((cell, column) => cell.padEnd(widths[column])).join("  ").trimEnd();
  return table.map(line).join("\n");
}

/** Whether a comparison meets its target; a missing peer never does, no target always. */
export function isMet({ ours, peer, target, isMet }: Comparison): boolean {
  if (target === null || isMet === undefined) return true;
  return peer !== null && isMet(ours, peer);
}
