/**
 * The main job from file to file, against the same job scripted from general-purpose parts.
 *
 * @module
 */
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { benchLayer } from "./bench_layer.ts";
import { interleave, outputOf, type TimedCommand } from "./interleave.ts";
import { peerPython } from "./peer_python.ts";
import type { Comparison, Section } from "./section.ts";

const MAIN = fileURLToPath(new URL("../../cli/main.ts", import.meta.url));
const SCRIPT = fileURLToPath(new URL("../peers/whole_job.py", import.meta.url));

/** A size of the job and what is asked of it. */
interface Job {
  readonly columns: number;
  readonly rows: number;
  readonly rounds: number;
  readonly target: string;
  isMet(ours: number, peer: number): boolean;
}

const JOBS: readonly Job[] = [
  {
    columns: 50,
    rows: 40,
    rounds: 7,
    target: "at most 1.3 x",
    isMet: (ours, peer) => ours <= 1.3 * peer,
  },
  {
    columns: 400,
    rows: 250,
    rounds: 3,
    target: "at least 4 x faster",
    isMet: (ours, peer) => 4 * ours <= peer,
  },
];

/**
 * All defaults, report included, sweep off; the peer draws 999 conditional permutations, nearkin its 999,999. Once on
 * `cases`, which have no pattern, and once on `rate`, which is clustered: the peer's time is the same.
 */
export const WHOLE_JOB_SECTION: Section = {
  name: "whole-job",
  title: "assess --no-sweep on a GeoPackage against a script of general-purpose parts",
  run: () => JOBS.flatMap(compareJob),
};

function compareJob(job: Job): Comparison[] {
  const layer = benchLayer(job.columns, job.rows);
  const folder = mkdtempSync(join(tmpdir(), "nearkin-bench-"));
  try {
    const outcome = join(folder, "outcome");
    const plain = assessCommand(layer, "cases", outcome);
    const clustered = assessCommand(layer, "rate", outcome);
    const peer = scriptCommand(layer, "cases", join(folder, "peer.fgb"));
    if (peer !== null) checkSameJob(plain, peer, join(outcome, "results.json"));
    const commands = peer === null ? [plain, clustered] : [plain, clustered, peer];
    const seconds = interleave(commands, job.rounds);
    return ["cases", "rate"].map((field, i) => ({
      what: `${(job.columns * job.rows).toLocaleString("en-US")} polygons, ${field}`,
      ours: seconds[i],
      peer: seconds[2] ?? null,
      target: job.target,
      isMet: job.isMet,
    }));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function assessCommand(layer: string, field: string, out: string): TimedCommand {
  const job = ["assess", layer, "--value", field, "--out", out, "--no-sweep", "--quiet"];
  return {
    command: Deno.execPath(),
    args: ["run", "-A", MAIN, ...job],
    prepare: () => rmSync(out, { recursive: true, force: true }),
  };
}

function scriptCommand(layer: string, field: string, out: string): TimedCommand | null {
  const python = peerPython();
  if (python === null) return null;
  return {
    command: python,
    args: [SCRIPT, layer, field, out],
    // Settings for other processors would slow the peer's linear algebra.
    without: ["OPENBLAS_CORETYPE", "OPENBLAS_L2_SIZE"],
    prepare: () => rmSync(out, { force: true }),
  };
}

/** Both must find the same links and the same Moran's I, or the times say nothing. */
function checkSameJob(ours: TimedCommand, peer: TimedCommand, resultsPath: string): void {
  const theirs: { links: number; moranI: number } = JSON.parse(outputOf(peer));
  outputOf(ours);
  const [run] = JSON.parse(readFileSync(resultsPath, "utf8")).runs;
  const value: number = run.global.moranI.value;
  if (run.neighbors.links !== theirs.links || Math.abs(value - theirs.moranI) > 1e-9) {
    const both =
      `${run.neighbors.links} links, I ${value}, against ${theirs.links}, ${theirs.moranI}`;
    throw new Error(`Cannot compare times as the results differ: ${both}`);
  }
}
