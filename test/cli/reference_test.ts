import assert from "node:assert/strict";
import { withReference } from "../tasks/readme_reference.ts";

Deno.test("README holds the reference of all options as the option table has them", async () => {
  const readme = await Deno.readTextFile(new URL("../../README.md", import.meta.url));
  assert.equal(readme, withReference(readme), "run `deno run -A test/tasks/write_reference.ts`");
});
