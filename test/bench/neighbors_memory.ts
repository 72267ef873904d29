/**
 * Prints how many GiB finding the touching areas of a layer takes above its geometry, at most.
 *
 * @module
 */
import { readFileSync, writeFileSync } from "node:fs";
import { contiguityFinder } from "../../lib/neighbors/contiguity.ts";
import { voronoiGeometry } from "./neighbor_maps.ts";

const geometry = voronoiGeometry(1000, 1000);
// Run with --expose-gc: what making the input left behind is no part of it.
(globalThis as { gc?: () => void }).gc?.();
writeFileSync("/proc/self/clear_refs", "5"); // the highest mark begins anew
const before = residentKilobytes("VmRSS");
const { touching } = contiguityFinder(geometry).find(null);
if (touching.indices.length < 5_000_000) throw new Error("The areas of the bench do not touch");
console.log(((residentKilobytes("VmHWM") - before) / 2 ** 20).toFixed(3));

/** Memory in use now (`VmRSS`) or at most so far (`VmHWM`), as Linux tells it. */
function residentKilobytes(field: "VmRSS" | "VmHWM"): number {
  const line = readFileSync("/proc/self/status", "utf8").match(new RegExp(`${field}:\\s+(\\d+)`));
  return Number(line?.[1]);
}
