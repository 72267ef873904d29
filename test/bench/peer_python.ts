/**
 * The Python that runs the script peer.
 *
 * @module
 */
import { spawnSync } from "node:child_process";

/**
 * Command of a Python that has geopandas and scipy: `PEER_PYTHON` where set, else the first of the usual
 * ones; null where none has them.
 */
export function peerPython(): string | null {
  const named = Deno.env.get("PEER_PYTHON");
  const candidates = named ? [named] : ["python3", "/usr/bin/python3"];
  const hasParts = (python: string) =>
    spawnSync(python, ["-c", "import geopandas, scipy.sparse"]).status === 0;
  return candidates.find(hasParts) ?? null;
}
