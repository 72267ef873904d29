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
