/**
 * A folder that is gone after the test.
 *
 * @module
 */

/** Gives a test a folder of its own. */
export async function withFolder(test: (folder: string) => Promise<void>): Promise<void> {
  const folder = await Deno.makeTempDir({ prefix: "nearkin-test-" });
  try {
    await test(folder);
  } finally {
    await Deno.remove(folder, { recursive: true });
  }
}
