/**
 * Writes `lib/write/results.schema.json` from the schema in `lib/write/results.ts`.
 *
 * @module
 */
import { resultsJsonSchema } from "../../lib/write/results.ts";
import { prettyJson } from "../../lib/write/record.ts";

await Deno.writeTextFile(
  new URL("../../lib/write/results.schema.json", import.meta.url),
  prettyJson(resultsJsonSchema()),
);
