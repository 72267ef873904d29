/**
 * `deno run -A test/tasks/compare_results.ts A B`: whether two outcome folders, made by different engines from the
 * same input and options, agree as far as nearkin guarantees: links, counts, p and classes the same, other
 * numbers within 1e-12 relative.
 *
 * @module
 */
import { parse } from "csv-parse/sync";
import { readFileSync } from "node:fs";
import { join } from "node:path";

/** Largest relative difference of numbers that need not be identical. */
const TOLERANCE = 1e-12;

/** A column or member that holds a p, raw or adjusted: these are ratios of counts and so the same. */
const HOLDS_P = /^(p|shareP|pAdjusted)$|_[pq]$/;

/** Where two outcome folders disagree, one line each; empty where they agree. */
export function compareOutcomes(a: string, b: string): string[] {
  const read = (folder: string, name: string) => readFileSync(join(folder, name), "utf8");
  return [
    ...differences(JSON.parse(read(a, "results.json")), JSON.parse(read(b, "results.json"))),
    ...differences(readRecords(read(a, "areas.csv")), readRecords(read(b, "areas.csv"))),
  ];
}

/**
 * Where two JSON values disagree. Whole numbers, text, null, key order of objects aside everything
 * must be the same; other numbers may differ by 1e-12 relative unless their key says that they are a p.
 */
export function differences(a: unknown, b: unknown, path = ""): string[] {
  if (isGroup(a) && isGroup(b) && Array.isArray(a) === Array.isArray(b)) {
    const keys = [...new Set([...Object.keys(a), ...Object.keys(b)])];
    return keys.flatMap((key) => differences(a[key], b[key], path === "" ? key : `${path}.${key}`));
  }
  const key = path.slice(path.lastIndexOf(".") + 1);
  if (a === b || (!HOLDS_P.test(key) && areClose(a, b))) return [];
  return [`${path}: ${JSON.stringify(a)} against ${JSON.stringify(b)}`];
}

function isGroup(value: unknown): value is Record<string, unknown> {
  return typeof value === "object" && value !== null;
}

function areClose(a: unknown, b: unknown): boolean {
  if (typeof a !== "number" || typeof b !== "number") return false;
  if (Number.isInteger(a) && Number.isInteger(b)) return false;
  return Math.abs(a - b) <= TOLERANCE * Math.max(Math.abs(a), Math.abs(b));
}

/** Rows of a CSV as objects, cells that look like numbers as numbers. */
function readRecords(text: string): unknown {
  const records: Record<string, string>[] = parse(text, { columns: true, bom: true });
  const cell = (value: string) =>
    value !== "" && Number.isFinite(Number(value)) ? Number(value) : value;
  return records.map((row) =>
    Object.fromEntries(Object.entries(row).map(([name, value]) => [name, cell(value)]))
  );
}

if (import.meta.main) {
  const [a, b] = Deno.args;
  const found = compareOutcomes(a, b);
  for (const line of found.slice(0, 20)) console.log(line);
  console.log(found.length === 0 ? `${a} and ${b} agree` : `${found.length} differences`);
  Deno.exit(found.length === 0 ? 0 : 1);
}
