/**
 * `deno task kernel`: compiles the kernel anew and writes it into the library.
 *
 * @module
 */
import { compileKernelModule, KERNEL_MODULE } from "./compile_kernel.ts";

const text = await compileKernelModule();
await Deno.writeTextFile(KERNEL_MODULE, text);
console.error(`Wrote the kernel, ${text.length} characters`);
