/**
 * Neighbors: points against scipy's k-d tree, boundaries against the script peer, growth and memory.
 *
 * @module
 */
import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import type { FlatGeometry } from "../../lib/layer/geometry.ts";
import { contiguityFinder } from "../../lib/neighbors/contiguity.ts";
import { planeSpace } from "../../lib/neighbors/plane_space.ts";
import { parseLength } from "../../lib/project/length.ts";
import { readLayer } from "../../lib/read/vector.ts";
import { benchLayer } from "./bench_layer.ts";
import { median } from "./interleave.ts";
import { runPeer } from "./native_peer.ts";
import { clusteredPoints, evenPoints, voronoiGeometry } from "./neighbor_maps.ts";
import { peerPython } from "./peer_python.ts";
import type { Comparison, Section } from "./section.ts";

const PEERS = fileURLToPath(new URL("../peers/", import.meta.url));
const MEMORY = fileURLToPath(new URL("./neighbors_memory.ts", import.meta.url));

const MILLION = 1_000_000;
const ROUNDS = 3;
/** Radius at which points of one for each square kilometer have 8 neighbors on average. */
const BAND = 1000 * Math.sqrt(8 / Math.PI);

/** Everything single-threaded on both sides, trees and indexes made anew each time. */
export const NEIGHBORS_SECTION: Section = {
  name: "neighbors",
  title: "finding neighbors of points and polygons",
  run: async () => [
    ...pointRows(),
    ...await boundaryRows(),
    growthRow("nearest:8, even points", (count) => {
      const points = evenPoints(count);
      return () => planeSpace(points).nearest(8);
    }),
    growthRow("touching, Voronoi polygons", (count) => {
      const geometry = voronoiGeometry(Math.round(Math.sqrt(count)), Math.round(Math.sqrt(count)));
      return () => contiguityFinder(geometry).find(null);
    }),
    memoryRow(),
  ],
};

function pointRows(): Comparison[] {
  const even = evenPoints(MILLION);
  return [
    {
      what: "nearest:8, 1,000,000 even points",
      ...againstTree(even, ["nearest", "8"], (points) => planeSpace(points).nearest(8)),
      ...fasterBy(2),
    },
    {
      what: "nearest:8, 1,000,000 clustered points",
      ...againstTree(
        clusteredPoints(MILLION),
        ["nearest", "8"],
        (points) => planeSpace(points).nearest(8),
      ),
      ...fasterBy(2),
    },
    {
      what: "within, 8 neighbors on average, 1,000,000 points",
      ...againstTree(even, ["within", String(BAND)], (points) => planeSpace(points).within(BAND)),
      ...fasterBy(1),
    },
  ];
}

/** Median seconds of ours and of scipy's tree, in turns. */
function againstTree(
  points: Float64Array,
  job: readonly string[],
  work: (points: Float64Array) => unknown,
): { ours: number; peer: number | null } {
  const folder = mkdtempSync(join(tmpdir(), "nearkin-bench-"));
  try {
    const path = join(folder, "points");
    writeFileSync(path, new Uint8Array(points.buffer));
    const python = peerPython();
    const ours: number[] = [], theirs: number[] = [];
    for (let round = 0; round < ROUNDS; round++) {
      ours.push(secondsOf(() => work(points)));
      if (python === null) continue;
      const args = [join(PEERS, "scripted_neighbors.py"), path, ...job];
      theirs.push(runPeer(python, args).milliseconds / 1000);
    }
    return { ours: median(ours), peer: python === null ? null : median(theirs) };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

async function boundaryRows(): Promise<Comparison[]> {
  const path = benchLayer(400, 250);
  const { geometry } = await readLayer(path);
  const peer = scriptStage(path);
  const snap = parseLength("1m");
  const exact = () => contiguityFinder(geometry, { geographic: true }).find(null);
  const snapped = () => contiguityFinder(geometry, { geographic: true }).find(snap);
  return [
    {
      what: "touching and edge, 100,000 polygons",
      ours: medianSeconds(exact),
      peer,
      ...fasterBy(15),
    },
    {
      what: "the same with snap=1m",
      ours: medianSeconds(snapped),
      peer,
      ...fasterBy(4),
    },
    {
      what: "the same with snap=1m where 1 in 20 areas overlaps its neighbors by 0.3 m",
      ours: medianSeconds(() =>
        contiguityFinder(shaken(geometry), { geographic: true }).find(snap)
      ),
      peer,
      target: null,
    },
  ];
}

/** Every twentieth area moved a little north: gaps and overlaps all around it. */
function shaken(geometry: FlatGeometry): FlatGeometry {
  const { kinds, partStarts, ringStarts, vertexStarts } = geometry;
  const xy = geometry.xy.slice();
  for (let row = 0; row < kinds.length; row += 20) {
    const last = vertexStarts[ringStarts[partStarts[row + 1]]];
    for (let v = vertexStarts[ringStarts[partStarts[row]]]; v < last; v++) xy[2 * v + 1] += 2.7e-6;
  }
  return { ...geometry, xy };
}

/** Seconds of the script's "neighbors" stage; null where it cannot run. */
function scriptStage(layer: string): number | null {
  const python = peerPython();
  if (python === null) return null;
  const folder = mkdtempSync(join(tmpdir(), "nearkin-bench-"));
  const stage = (): number => {
    const args = [
      join(PEERS, "whole_job.py"),
      layer,
      "cases",
      join(folder, `${Math.random()}.fgb`),
    ];
    const { status, stdout, stderr } = spawnSync(python, [...args, "--permutations", "1"], {
      encoding: "utf8",
    });
    if (status !== 0) throw new Error(`The script peer failed: ${stderr}`);
    return JSON.parse(stdout).seconds.neighbors;
  };
  try {
    return median(Array.from({ length: ROUNDS }, stage));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Exponent of time from 10,000 to 1,000,000, each the median of three. */
function growthRow(what: string, prepare: (count: number) => () => unknown): Comparison {
  const [few, many] = [10_000, MILLION].map((count) => medianSeconds(prepare(count)));
  const exponent = Math.log(many / few) / Math.log(100);
  return limit(`exponent of time from 10,000 to 1,000,000, ${what}`, exponent, 1.15);
}

function memoryRow(): Comparison {
  const folder = mkdtempSync(join(tmpdir(), "nearkin-bench-"));
  try {
    const path = join(folder, "layer");
    memoryScript("make", path);
    const figure = Number(memoryScript("measure", path));
    return limit("GiB of memory above the layer, touching, 1,000,000 polygons", figure, 1.5);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function memoryScript(what: string, path: string): string {
  const args = ["run", "-A", "--v8-flags=--max-old-space-size=8192", MEMORY, what, path];
  const { status, stdout, stderr } = spawnSync(Deno.execPath(), args, { encoding: "utf8" });
  if (status !== 0) throw new Error(`The memory of contiguity cannot be measured: ${stderr}`);
  return stdout;
}

function medianSeconds(work: () => unknown): number {
  work(); // the first run is before the compiler has seen it
  return median(Array.from({ length: ROUNDS }, () => secondsOf(work)));
}

function secondsOf(work: () => unknown): number {
  const begun = performance.now();
  work();
  return (performance.now() - begun) / 1000;
}

function fasterBy(least: number): Pick<Comparison, "target" | "isMet"> {
  return {
    target: least === 1 ? "no slower" : `at least ${least} x faster`,
    isMet: (ours, peer) => least * ours <= peer,
  };
}

/** A figure that has a limit instead of a peer. */
function limit(what: string, figure: number, most: number): Comparison {
  return {
    what,
    ours: figure,
    peer: most,
    target: `at most ${most}`,
    isMet: (ours, most) => ours <= most,
  };
}
