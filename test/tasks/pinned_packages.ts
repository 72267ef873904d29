/**
 * The npm packages of the project in the exact versions that deno.json and deno.lock pin, in npm's own
 * terms.
 *
 * @module
 */

/** The parts of a package.json that fix versions. */
export interface PinnedPackages {
  /** Direct packages. */
  readonly dependencies: Readonly<Record<string, string>>;
  /** Versions of the packages they bring along; a package locked in several versions is left to npm. */
  readonly overrides: Readonly<Record<string, string>>;
}

/**
 * Reads the pins from the texts of deno.json and deno.lock, but for the `unused` direct packages.
 *
 * @throws Error for an import that is no npm package in an exact version.
 */
export function pinnedPackages(
  denoJson: string,
  denoLock: string,
  unused: readonly string[] = [],
): PinnedPackages {
  const { imports }: { imports: Record<string, string> } = JSON.parse(denoJson);
  const dependencies: Record<string, string> = {};
  for (const [name, specifier] of Object.entries(imports)) {
    const exact = /^npm:(@?[^@]+)@(\d+\.\d+\.\d+[^/]*)$/.exec(specifier);
    if (exact === null || exact[1] !== name) {
      throw new Error(`Cannot pin import ${name} as ${specifier} is not npm:${name}@X.Y.Z`);
    }
    if (!unused.includes(name)) dependencies[name] = exact[2];
  }

  const locked = new Map<string, Set<string>>();
  const { npm }: { npm: Record<string, unknown> } = JSON.parse(denoLock);
  for (const key of Object.keys(npm)) {
    const [, name, version] = /^(@?[^@]+)@([^_]+)/.exec(key)!;
    locked.set(name, (locked.get(name) ?? new Set()).add(version));
  }
  const overrides: Record<string, string> = {};
  for (const [name, versions] of locked) {
    if (versions.size === 1 && !(name in imports)) overrides[name] = [...versions][0];
  }
  return { dependencies, overrides };
}
