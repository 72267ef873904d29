/**
 * Fails when the kernel in the library is not what its sources compile to.
 *
 * @module
 */
import { compileKernelModule, KERNEL_MODULE } from "./compile_kernel.ts";

const committed = await Deno.readTextFile(KERNEL_MODULE);
if (await compileKernelModule() !== committed) {
  console.error(
    "The kernel differs from its sources; run `deno task kernel` and commit the result",
  );
  Deno.exit(1);
}
console.error("The kernel is what its sources compile to");
