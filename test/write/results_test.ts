import assert from "node:assert/strict";
import { resultsJsonSchema } from "../../lib/write/results.ts";

Deno.test("results.schema.json is what the code describes", async () => {
  const file = new URL("../../lib/write/results.schema.json", import.meta.url);
  const published = JSON.parse(await Deno.readTextFile(file));
  assert.deepEqual(
    published,
    JSON.parse(JSON.stringify(resultsJsonSchema())),
    "run `deno run -A test/tasks/write_schema.ts`",
  );
});
