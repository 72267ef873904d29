/**
 * Prints how many GiB finding the touching areas of a layer takes above its geometry, at most. `make PATH` writes the
 * layer's arrays, `measure PATH` reads them: what making them left behind is no part of it.
 *
 * @module
 */
import { readFileSync, writeFileSync } from "node:fs";
import { contiguityFinder } from "../../lib/neighbors/contiguity.ts";
import { voronoiGeometry } from "./neighbor_maps.ts";

const [what, path] = Deno.args;
if (what === "make") {
  const { vertexStarts, xy } = voronoiGeometry(1000, 1000);
  writeFileSync(`${path}.starts`, new Uint8Array(vertexStarts.buffer));
  writeFileSync(`${path}.xy`, new Uint8Array(xy.buffer));
} else console.log((measure() / 2 ** 20).toFixed(3));

/** KiB at most above what the layer takes. */
function measure(): number {
  const vertexStarts = Uint32Array.from(new Uint32Array(bytesOf(`${path}.starts`)));
  const xy = Float64Array.from(new Float64Array(bytesOf(`${path}.xy`)));
  const areas = vertexStarts.length - 1;
  const starts = Uint32Array.from({ length: areas + 1 }, (_, i) => i);
  const kinds = new Uint8Array(areas).fill(3);
  const geometry = { kinds, partStarts: starts, ringStarts: starts, vertexStarts, xy };
  const layer = (kinds.byteLength + starts.byteLength + vertexStarts.byteLength + xy.byteLength) /
    1024;
  const { touching } = contiguityFinder(geometry).find(null);
  if (touching.indices.length < 5_000_000) throw new Error("The areas of the bench do not touch");
  // The runtime itself counts too: this is an upper bound.
  return highestMark() - layer;
}

function bytesOf(file: string): ArrayBuffer {
  const { buffer, byteOffset, byteLength } = readFileSync(file);
  return (buffer as ArrayBuffer).slice(byteOffset, byteOffset + byteLength);
}

/** KiB that this process has taken at most, as Linux tells it. */
function highestMark(): number {
  return Number(readFileSync("/proc/self/status", "utf8").match(/VmHWM:\s+(\d+)/)?.[1]);
}
