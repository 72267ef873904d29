/**
 * `deno task bench [SECTION …]`: times nearkin against its peers on this machine and says which targets are met.
 *
 * Only ratios from one run mean anything: machines differ, and the same one differs from hour to hour.
 * Exit code 1 where a target is not met or a peer is missing. `test/peers/README.md` says what the peers need.
 *
 * @module
 */
import { spawnSync } from "node:child_process";
import { cpus, totalmem } from "node:os";
import { ENGINE_SECTION } from "./engine_section.ts";
import { HELP_SECTION } from "./help_section.ts";
import { NEIGHBORS_SECTION } from "./neighbors_section.ts";
import { peerPython } from "./peer_python.ts";
import { comparisonTable, isMet, type Section } from "./section.ts";
import { WHOLE_JOB_SECTION } from "./whole_job_section.ts";

/** All sections, in the order in which they run. */
const SECTIONS: readonly Section[] = [
  HELP_SECTION,
  ENGINE_SECTION,
  NEIGHBORS_SECTION,
  WHOLE_JOB_SECTION,
];

if (import.meta.main) Deno.exit(await bench(Deno.args));

/** Runs the sections named, or all, prints their tables and gives the exit code. */
async function bench(names: readonly string[]): Promise<number> {
  const known = SECTIONS.map((section) => section.name);
  const unknown = names.find((name) => !known.includes(name));
  if (unknown !== undefined) {
    console.error(`No section ${unknown}; there are ${known.join(", ")}`);
    return 2;
  }
  console.log(machineLine());
  console.log(peerLine());
  let allMet = true;
  for (const section of SECTIONS) {
    if (names.length > 0 && !names.includes(section.name)) continue;
    console.log(`\n${section.name}: ${section.title}`);
    const comparisons = await section.run();
    console.log(comparisonTable(comparisons));
    allMet &&= comparisons.every(isMet);
  }
  return allMet ? 0 : 1;
}

/** Processor, cores, memory and runtime in one line. */
function machineLine(): string {
  const cores = cpus();
  const gib = (totalmem() / 2 ** 30).toFixed(0);
  return `machine: ${cores.length} x ${
    cores[0].model.trim()
  }, ${gib} GiB, deno ${Deno.version.deno}`;
}

/** Versions of the script peer's parts in one line. */
function peerLine(): string {
  const python = peerPython();
  if (python === null) return "peer: no Python with geopandas and scipy (see test/peers/README.md)";
  const script = "import platform, geopandas, numpy, scipy; " +
    "print('python', platform.python_version(), 'geopandas', geopandas.__version__, " +
    "'numpy', numpy.__version__, 'scipy', scipy.__version__)";
  return `peer: ${spawnSync(python, ["-c", script], { encoding: "utf8" }).stdout.trim()}`;
}
