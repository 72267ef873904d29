/**
 * Compiling the kernel's AssemblyScript to the text form that the library holds.
 *
 * @module
 */
import { fileURLToPath } from "node:url";

/** The compiler, pinned: another version may give other bytes. */
const COMPILER = "assemblyscript@0.28.20";
const SOURCE = new URL("../../lib/inference/kernel/index.ts", import.meta.url);
/** Where the library keeps the compiled kernel. */
export const KERNEL_MODULE = new URL("../../lib/inference/kernel_module.ts", import.meta.url);

/** Text of `lib/inference/kernel_module.ts` as the sources of the kernel give it now. */
export async function compileKernelModule(): Promise<string> {
  const folder = await Deno.makeTempDir();
  try {
    const output = `${folder}/kernel.wasm`;
    await run(folder, "npm", ["install", "--silent", "--no-save", COMPILER]);
    await run(folder, "npx", [
      "asc",
      fileURLToPath(SOURCE),
      "--outFile",
      output,
      "--optimizeLevel",
      "3",
      "--enable",
      "simd",
      "--runtime",
      "stub",
      "--importMemory",
      "--noAssert",
    ]);
    return moduleText(await Deno.readFile(output));
  } finally {
    await Deno.remove(folder, { recursive: true });
  }
}

async function run(folder: string, command: string, args: string[]): Promise<void> {
  const { success, stderr } = await new Deno.Command(command, {
    args,
    cwd: folder,
    stderr: "piped",
  }).output();
  if (!success) throw new Error(`${command} failed: ${new TextDecoder().decode(stderr)}`);
}

function moduleText(bytes: Uint8Array): string {
  const text = btoa(Array.from(bytes, (byte) => String.fromCharCode(byte)).join(""));
  const lines = text.match(/.{1,96}/g) ?? [];
  return [
    "/**",
    " * The kernel of `kernel/` compiled to WebAssembly: written by `deno task kernel`, not by hand.",
    " *",
    " * @module",
    " */",
    "",
    "/** The module's bytes in base64. */",
    "export const KERNEL_BASE64: string = [",
    ...lines.map((line) => `  "${line}",`),
    '].join("");',
    "",
  ].join("\n");
}
