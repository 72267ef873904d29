/**
 * What stands in place of `lib/read/gdal_assets.ts` inside the single-file binary.
 *
 * @module
 */

/**
 * Source of the module: same exports, but the two files are embedded by bun and read from the file
 * system inside the executable. It is kept as text because only bun knows such imports.
 */
export const EMBEDDED_GDAL_ASSETS: string = `
import { readFile } from "node:fs/promises";
import wasmFile from "gdal3.js/dist/package/gdal3WebAssembly.wasm" with { type: "file" };
import dataFile from "gdal3.js/dist/package/gdal3WebAssembly.data" with { type: "file" };

export async function readGdalAssets() {
  const [wasm, data] = await Promise.all([readFile(wasmFile), readFile(dataFile)]);
  return { wasm, data };
}
`;
