/**
 * The trail a reviewer reruns: what went in, with which versions, under which plan.
 *
 * @module
 */
import { createHash } from "node:crypto";
import process from "node:process";

/** One input file. */
export interface RecordedInput {
  /** What it was used for: `layer`, `table` or `links`. */
  readonly role: string;
  /** The path as the user gave it. */
  readonly path: string;
  readonly bytes: number;
  /** SHA-256 in hexadecimal. */
  readonly sha256: string;
}

/** Content of `record.json`. Without timestamps: the same input and options give the same bytes. */
export interface RunRecord {
  readonly tool: { readonly name: "nearkin"; readonly version: string };
  /** JavaScript engine, because the same engine gives the same bytes and another one floats within 1e-12. */
  readonly engine: string;
  readonly parts: Readonly<Record<string, string>>;
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

/** SHA-256 of bytes in hexadecimal. Cost: one pass. */
export function sha256(bytes: Uint8Array): string {
  return createHash("sha256").update(bytes).digest("hex");
}

/** JSON as every file of an outcome writes it: two spaces, NaN as null, a final newline. */
export function prettyJson(value: unknown): string {
  return JSON.stringify(value, null, 2) + "\n";
}
