/**
 * Renews the option reference in the README from the option table.
 *
 * @module
 */
import { withReference } from "./readme_reference.ts";

const readme = new URL("../../README.md", import.meta.url);
await Deno.writeTextFile(readme, withReference(await Deno.readTextFile(readme)));
