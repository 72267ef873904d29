/**
 * Prints how many GiB the local and the global test of a million areas take above their inputs, at most.
 *
 * @module
 */
import { readFileSync, writeFileSync } from "node:fs";
import { permuteMoran } from "../../lib/inference/permute_global.ts";
import { permuteLocalMoran } from "../../lib/inference/permute_local.ts";
import { gridWeights, normalNumbers } from "../support/maps.ts";

const weights = gridWeights(1000, 1000, { corners: true });
const values = normalNumbers(1_000_000, "memory");
// Run with --expose-gc: what making the inputs left behind is no part of them.
(globalThis as { gc?: () => void }).gc?.();
writeFileSync("/proc/self/clear_refs", "5"); // the highest mark begins anew
const before = residentKilobytes("VmRSS");
await permuteLocalMoran(values, weights, { permutations: 999_999, workers: 1 });
await permuteMoran(values, [weights], { permutations: 99, workers: 1 });
console.log(((residentKilobytes("VmHWM") - before) / 2 ** 20).toFixed(3));

/** Memory in use now (`VmRSS`) or at most so far (`VmHWM`), as Linux tells it. */
function residentKilobytes(field: "VmRSS" | "VmHWM"): number {
  const line = readFileSync("/proc/self/status", "utf8").match(new RegExp(`${field}:\\s+(\\d+)`));
  return Number(line?.[1]);
}
