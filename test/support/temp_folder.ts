/**
 * A folder that is gone after the test.
 *
 * @module
 */

/** A fresh folder, held with `using`. */
export function tempFolder(): { readonly path: string } & Disposable {
  const path = Deno.makeTempDirSync({ prefix: "nearkin_" });
  return { path, [Symbol.dispose]: () => Deno.removeSync(path, { recursive: true }) };
}

/** Gives a test a folder of its own, by path. */
export async function withFolder(test: (path: string) => Promise<void>): Promise<void> {
  using folder = tempFolder();
  await test(folder.path);
}
