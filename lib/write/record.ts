/**
 * The trail a reviewer reruns: what went in, with which versions, under which plan.
 *
 * @module
 */
import process from "node:process";
import type { RecordedInput } from "../read/record_input.ts";

/** Content of `record.json`. Without timestamps: the same input and options give the same bytes. */
export interface RunRecord {
  readonly tool: { readonly name: "nearkin"; readonly version: string };
  /** JavaScript engine, because the same engine gives the same bytes and another one floats within 1e-12. */
  readonly engine: string;
  readonly inputs: readonly RecordedInput[];
  readonly seed: string;
  /** Every option as decided, defaults included. */
  readonly plan: unknown;
  /** Names that changed on the way into a file, by file. */
  readonly renamedFields: Readonly<
    Record<string, readonly { readonly from: string; readonly to: string }[]>
  >;
}

/** Name and version of the JavaScript runtime, from `process.versions`. */
export function engineName(): string {
  const { deno, bun, node } = process.versions as Record<string, string | undefined>;
  if (deno) return `Deno ${deno}`;
  return bun ? `Bun ${bun}` : `Node ${node}`;
}

/** JSON as every file of an outcome writes it: two spaces, NaN as null, a final newline. */
export function prettyJson(value: unknown): string {
  return JSON.stringify(value, null, 2) + "\n";
}
