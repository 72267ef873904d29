/**
 * The GDAL of the operating system, as the outside judge of files read and written here.
 *
 * @module
 */
import assert from "node:assert/strict";

/** Runs a GDAL program and returns what it printed. Fails the test where it is missing or fails. */
export async function nativeGdal(
  program: "ogr2ogr" | "ogrinfo",
  args: readonly string[],
): Promise<string> {
  const output = await new Deno.Command(program, { args: [...args] }).output().catch((error) => {
    if (!(error instanceof Deno.errors.NotFound)) throw error;
    assert.fail(`${program} is missing; install GDAL (package gdal-bin on Debian and Ubuntu)`);
  });
  const complaints = new TextDecoder().decode(output.stderr);
  assert.ok(output.success, `${program} ${args.join(" ")} failed: ${complaints}`);
  return new TextDecoder().decode(output.stdout);
}

/** What native GDAL reads in a file. */
export interface NativeLayer {
  /** GDAL's type of each field, such as `Integer64`. */
  readonly types: ReadonlyMap<string, string>;
  readonly geometryType: string;
  readonly features: readonly NativeFeature[];
  /** All that was printed, reference system included. */
  readonly text: string;
}

/** A feature as native GDAL prints it. */
export interface NativeFeature {
  /** Values as text; a null field that the file leaves out is missing here, too. */
  readonly values: ReadonlyMap<string, string>;
  /** WKT, or null. */
  readonly geometry: string | null;
}

/** Reads a single-layer file with native `ogrinfo`. */
export async function readNatively(path: string, ...args: string[]): Promise<NativeLayer> {
  const text = await nativeGdal("ogrinfo", ["-al", ...args, path]);
  const [head, ...features] = text.split(/^OGRFeature\(.*\):-?\d+$/m);
  const types = new Map(
    Array.from(
      head.matchAll(/^(\S+): (\w+(?:\(\w+\))?) \(\d+\.\d+\)/gm),
      ([, name, type]) => [name, type],
    ),
  );
  return {
    types,
    geometryType: /^Geometry: (.*)$/m.exec(head)?.[1] ?? "",
    features: features.map(parseFeature),
    text,
  };
}

function parseFeature(text: string): NativeFeature {
  const values = new Map(
    Array.from(text.matchAll(/^ {2}(\S+) \([^=]*\) = (.*)$/gm), ([, name, value]) => [name, value])
      .filter(([, value]) => value !== "(null)") as [string, string][],
  );
  return { values, geometry: /^ {2}([A-Z]+(?: [ZM]+)? \([^=]*\))$/m.exec(text)?.[1] ?? null };
}
