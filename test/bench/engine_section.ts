/**
 * The permutation engine against native C of the same algorithm, numpy and scipy.
 *
 * @module
 */
import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { type Job, openCounter, type PartOf, workloadOf } from "../../lib/inference/counters.ts";
import { compileKernel } from "../../lib/inference/load_kernel.ts";
import { permuteLocalMoran } from "../../lib/inference/permute_local.ts";
import { gridWeights, normalNumbers, unequalWeights } from "../support/maps.ts";
import { bandJob, globalJob, rankedJob, weighedJob, writeJob } from "./engine_jobs.ts";
import { median } from "./interleave.ts";
import { clangVersion, compilePeer, runPeer } from "./native_peer.ts";
import { peerPython } from "./peer_python.ts";
import type { Comparison, Section } from "./section.ts";

const PEERS = fileURLToPath(new URL("../peers/", import.meta.url));
const MEMORY = fileURLToPath(new URL("engine_memory.ts", import.meta.url));

/** Every row runs on one thread, unless it says otherwise; the peers count the same draws and must agree. */
export const ENGINE_SECTION: Section = {
  name: "engine",
  title: `the permutation engine against native C (${
    clangVersion() ?? "no clang"
  }), numpy and scipy`,
  async run() {
    const folder = mkdtempSync(join(tmpdir(), "nearkin-engine-"));
    try {
      return [
        ...localRows(folder),
        ...bandRows(folder),
        ...weighedRows(folder),
        ...globalRows(folder),
        await workersRow(),
        memoryRow(),
      ];
    } finally {
      rmSync(folder, { recursive: true, force: true });
    }
  },
};

const atMost = (most: number) => ({
  target: `at most ${most} x`,
  isMet: (ours: number, peer: number) => ours <= most * peer,
});
const fasterBy = (least: number) => ({
  target: `at least ${least} x faster`,
  isMet: (ours: number, peer: number) => least * ours <= peer,
});

function localRows(folder: string): Comparison[] {
  const timed = [100, 316, 1000].map((side) => {
    const job = rankedJob(gridWeights(side, side, { corners: true }), 999_999);
    return { side, ...againstNative(job, { folder, peer: "native_ranked", rounds: 7 }) };
  });
  const rows = timed.map(({ side, ours, peer }) => ({
    what: `local, equal weights, P = 999,999, ${areas(side)}`,
    ours,
    peer,
    ...(side === 100 ? { target: null } : atMost(1.6)),
  }));
  const exponent = Math.log(timed[2].ours / timed[0].ours) / Math.log(100);
  return [...rows, limit("exponent of time from 10,000 to 1,000,000 areas", exponent, 1.05)];
}

function bandRows(folder: string): Comparison[] {
  const jobs = [100, 400].map((largest) => bandJob(100_000, largest, 99_999));
  const { ours, peer } = againstNative(jobs[1], { folder, peer: "native_ranked", rounds: 3 });
  const kernel = compileKernel();
  // In turns, so that a slow minute of the machine falls on both.
  const rounds = [0, 1, 2, 3].map(() => jobs.map((job) => countAll(job, kernel).seconds));
  const [few, many] = jobs.map((_, j) => median(rounds.map((round) => round[j])));
  const what = "distance band, 200 neighbor counts up to 400, 100,000 areas, P = 99,999";
  return [
    { what, ours, peer, ...atMost(2) },
    limit(
      "exponent of time from 100 to 400 neighbors at most",
      Math.log(many / few) / Math.log(4),
      1.1,
    ),
  ];
}

function weighedRows(folder: string): Comparison[] {
  const weights = unequalWeights(gridWeights(316, 316, { corners: true }), "bench");
  const job = weighedJob(weights, 9_999);
  const what = `local, unequal weights, P = 9,999, ${areas(316)}`;
  const sample = 300;
  const script = { name: "scripted_weighed.py", args: [String(sample)] };
  const timed = againstNative(job, { folder, peer: "native_weighed", rounds: 5, script });
  const numpy = timed.script === null ? null : timed.script * job.areas.length / sample;
  return [
    { what, ours: timed.ours, peer: timed.peer, ...atMost(4) },
    {
      what: `${what}, numpy (from ${sample} areas)`,
      ours: timed.ours,
      peer: numpy,
      ...fasterBy(25),
    },
  ];
}

function globalRows(folder: string): Comparison[] {
  return [100, 316, 1000].flatMap((side) => {
    // Fewer are timed and the rest worked out, as each permutation is the same work: short turns, many of them.
    const permutations = side === 100 ? 992 : 96, share = 999 / permutations;
    const job = globalJob(gridWeights(side, side, { corners: true }), permutations);
    const what = `global, P = 999, ${areas(side)}`;
    const script = { name: "scripted_shuffle.py", args: [String(permutations)] };
    const timed = againstNative(job, { folder, peer: "native_shuffle", rounds: 7, script });
    const [ours, native, scipy] = [timed.ours, timed.peer, timed.script].map((seconds) =>
      seconds === null ? null : seconds * share
    );
    return [
      { what, ours: ours!, peer: native, ...atMost(1.3) },
      { what: `${what}, scipy`, ours: ours!, peer: scipy, ...fasterBy(8) },
    ];
  });
}

async function workersRow(): Promise<Comparison> {
  const weights = gridWeights(316, 316, { corners: true });
  const values = normalNumbers(316 * 316, "bench");
  const seconds: number[][] = [[], []];
  for (let round = 0; round < 3; round++) {
    for (const workers of [2, 1]) {
      const begun = performance.now();
      await permuteLocalMoran(values, weights, { permutations: 9_999_999, workers });
      seconds[workers - 1].push((performance.now() - begun) / 1000);
    }
  }
  const what = "local, equal weights, P = 9,999,999, 99,856 areas: two workers against one";
  return { what, ours: median(seconds[1]), peer: median(seconds[0]), ...fasterBy(1.7) };
}

function memoryRow(): Comparison {
  const { status, stdout, stderr } = spawnSync(Deno.execPath(), [
    "run",
    "-A",
    "--v8-flags=--expose-gc",
    MEMORY,
  ], {
    encoding: "utf8",
  });
  if (status !== 0) throw new Error(`The memory of the engine cannot be measured: ${stderr}`);
  return limit(
    "GiB of memory above the inputs, local and global, 1,000,000 areas",
    Number(stdout),
    1,
  );
}

/** A figure that has a limit instead of a peer. */
function limit(what: string, figure: number, most: number): Comparison {
  return {
    what,
    ours: figure,
    peer: most,
    target: `at most ${most}`,
    isMet: (ours, peer) => ours <= peer,
  };
}

/** A job and what it is timed against. */
interface Against {
  readonly folder: string;
  /** Native peer; its result must be ours. */
  readonly peer: string;
  /** Script peer, with what it is told besides the job. */
  readonly script?: { readonly name: string; readonly args: readonly string[] };
  readonly rounds: number;
}

/** Median seconds of a job in the kernel and in its peers, in turns; null for peers that are not installed. */
function againstNative(
  job: Job,
  { folder, peer, script, rounds }: Against,
): { ours: number; peer: number | null; script: number | null } {
  const path = join(folder, "job");
  writeJob(path, job);
  const program = compilePeer(peer, folder), kernel = compileKernel();
  const python = script === undefined ? null : peerPython();
  const ours: number[] = [], theirs: number[] = [], scripted: number[] = [];
  for (let round = 0; round <= rounds; round++) {
    const { seconds, words } = countAll(job, kernel);
    const native = program === null ? null : runPeer(program, [path, "1"]);
    if (native !== null && job.kind !== "shuffle" && native.words !== words) {
      throw new Error(
        `Cannot compare times as the counts differ: ${words} against ${native.words}`,
      );
    }
    if (round === 0) continue; // the kernel's first calls run before it is optimized
    ours.push(seconds);
    if (native !== null) theirs.push(native.milliseconds / 1000);
    if (script === undefined || python === null) continue;
    const { milliseconds } = runPeer(python, [join(PEERS, script.name), path, ...script.args]);
    scripted.push(milliseconds / 1000);
  }
  const medianOrNull = (seconds: readonly number[]) => seconds.length ? median(seconds) : null;
  return { ours: median(ours), peer: medianOrNull(theirs), script: medianOrNull(scripted) };
}

/**
 * Does a job in this thread; says how long it took and what came of it in the words of the native peers. As with
 * these, the clock starts when the job lies in memory.
 */
function countAll(job: Job, kernel: WebAssembly.Module | null): { seconds: number; words: string } {
  const counter = openCounter(job, kernel);
  const begun = performance.now();
  for (let unit = 0; unit < workloadOf(job).units; unit++) for (const _ of counter.run(unit));
  const part = counter.finish();
  return { seconds: (performance.now() - begun) / 1000, words: wordsOf(part) };
}

/** The checksum of all counts that the peers print; nothing for sums, which differ in their last bits. */
function wordsOf(part: PartOf<Job>): string {
  let sum = 0;
  const add = (count: number) => sum = Math.imul(sum, 31) + count >>> 0;
  const parts = Array.isArray(part) ? part : [part];
  for (const each of parts) {
    if (!("atLeast" in each)) return "";
    each.atLeast.forEach((count: number, i: number) => {
      add(count);
      add(each.atMost[i]);
    });
  }
  return `checksum ${sum}`;
}

function areas(side: number): string {
  return `${(side * side).toLocaleString("en-US")} areas`;
}
